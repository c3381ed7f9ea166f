// expect: minutes gated
// expect: carry_out gated
module lap_clock (
    input  logic       clk, rst,
    input  logic       tick, clear,
    input  logic [5:0] start,
    output logic       carry_out,
    output logic [5:0] minutes,
    input  wire        test_en
);
    // stillclock: minutes sleeps unless it is written
    wire wake_minutes = rst || clear || tick;
    wire gclk_minutes;
    stillclock_icg u_icg_minutes (.clk(clk), .wake(wake_minutes), .test(test_en), .gclk(gclk_minutes));
    always_ff @(posedge gclk_minutes)
        if (rst || clear) begin
            minutes <= start;
            carry_out <= 1'b0;
        end else if (tick)
            {carry_out, minutes} <= {1'b0, minutes} + 7'd1;
endmodule
