// expect: float_q gated
module water_float (
    input  logic       clk, rst_n,
    input  logic       rise,
    input  logic [7:0] mark,
    output logic [7:0] float_q,
    input  wire        test_en
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) ;
        else begin
            assert (mark != 8'hff || !rise);
        end
    // stillclock: float_q sleeps unless it is written
    wire wake_float_q = rise;
    wire gclk_float_q;
    stillclock_icg u_icg_float_q (.clk(clk), .wake(wake_float_q), .test(test_en), .gclk(gclk_float_q));
    always_ff @(posedge gclk_float_q or negedge rst_n)
        if (!rst_n) float_q <= '0;
        else begin
            if (rise) float_q <= mark;
        end
endmodule
