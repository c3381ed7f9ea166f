// expect: flag[2] gated
// expect: flag[1] left too-few-bits
module flag_line (
    input  logic       clk,
    input  logic       raise, lower, salute,
    input  logic [5:0] pennant,
    output logic [7:0] flag,
    input  wire        test_en
);
    always_ff @(posedge clk) begin
        if (lower) flag[1] <= 1'b0;
        if (salute) flag[7:6] <= pennant[5:4];
        flag[3] <= raise ^ lower;
    end
    // stillclock: flag sleeps unless it is written
    wire wake_flag = raise;
    wire gclk_flag;
    stillclock_icg u_icg_flag (.clk(clk), .wake(wake_flag), .test(test_en), .gclk(gclk_flag));
    always_ff @(posedge gclk_flag) begin
        if (raise) begin
            flag[0] <= pennant[0];
            flag[2] <= pennant[1];
            flag[5:4] <= pennant[3:2];
        end
    end
endmodule
