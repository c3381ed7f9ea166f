// expect: tap gated
module echo_line #(parameter int DEPTH = 4) (
    input  logic       clk, rst_n,
    input  logic       step,
    input  logic [5:0] voice,
    output logic [DEPTH-1:0][5:0] tap,
    input  wire                   test_en
);
    // stillclock: tap sleeps unless it is written
    wire wake_tap = step;
    wire gclk_tap;
    stillclock_icg u_icg_tap (.clk(clk), .wake(wake_tap), .test(test_en), .gclk(gclk_tap));
    always_ff @(posedge gclk_tap or negedge rst_n)
        if (!rst_n) begin
            for (int i = 0; i < DEPTH; i++) tap[i] <= '0;
        end else if (step) begin
            tap[0] <= voice;
            for (int i = 1; i < DEPTH; i++) tap[i] <= tap[i-1];
        end
endmodule
