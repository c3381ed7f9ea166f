// expect: hive gated
// expect: queen gated
// The hold is written out: `q <= q` wakes nothing.
module bee_counter (
    input  logic        clk, rst,
    input  logic        out, back,
    input  logic [10:0] swarm,
    input  logic        settle,
    output logic [10:0] hive,
    output logic [10:0] queen
);
    always_ff @(posedge clk)
        if (rst) hive <= '0;
        else if (out && !back) hive <= hive - 11'd1;
        else if (back && !out) hive <= hive + 11'd1;
        else hive <= hive;

    always_ff @(posedge clk) begin
        queen <= queen;
        if (settle) queen <= swarm;
    end
endmodule
