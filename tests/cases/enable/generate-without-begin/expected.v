// expect: far gated
// Generate branches whose only item is the block: they need begin and end.
module ferry_link (clk, rst, hail, ship, far, near, test_en);
    input wire test_en;
    parameter MODE = 1;
    input             clk, rst, hail;
    input       [7:0] ship;
    output reg  [7:0] far;
    output      [7:0] near;
    generate
        if (MODE == 1)
            begin
            // stillclock: far sleeps unless it is written
            wire wake_far = rst || hail;
            wire gclk_far;
            stillclock_icg u_icg_far (.clk(clk), .wake(wake_far), .test(test_en), .gclk(gclk_far));
            always @(posedge gclk_far) begin
                if (rst) far <= 8'd0;
                else if (hail) far <= ship;
            end
            end
        else
            always @(posedge clk) far <= ship;
    endgenerate
    assign near = ~far;
endmodule
