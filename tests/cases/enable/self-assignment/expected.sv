// expect: hive gated
// expect: queen gated
// The hold is written out: `q <= q` wakes nothing.
module bee_counter (
    input  logic        clk, rst,
    input  logic        out, back,
    input  logic [10:0] swarm,
    input  logic        settle,
    output logic [10:0] hive,
    output logic [10:0] queen,
    input  wire         test_en
);
    // stillclock: hive sleeps unless it is written
    wire wake_hive = rst || (out && !back) || (back && !out);
    wire gclk_hive;
    stillclock_icg u_icg_hive (.clk(clk), .wake(wake_hive), .test(test_en), .gclk(gclk_hive));
    always_ff @(posedge gclk_hive)
        if (rst) hive <= '0;
        else if (out && !back) hive <= hive - 11'd1;
        else if (back && !out) hive <= hive + 11'd1;
        else hive <= hive;

    // stillclock: queen sleeps unless it is written
    wire wake_queen = settle;
    wire gclk_queen;
    stillclock_icg u_icg_queen (.clk(clk), .wake(wake_queen), .test(test_en), .gclk(gclk_queen));
    always_ff @(posedge gclk_queen) begin
        queen <= queen;
        if (settle) queen <= swarm;
    end
endmodule
