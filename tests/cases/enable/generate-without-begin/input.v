// expect: far gated
// Generate branches whose only item is the block: they need begin and end.
module ferry_link (clk, rst, hail, ship, far, near);
    parameter MODE = 1;
    input             clk, rst, hail;
    input       [7:0] ship;
    output reg  [7:0] far;
    output      [7:0] near;
    generate
        if (MODE == 1)
            always @(posedge clk) begin
                if (rst) far <= 8'd0;
                else if (hail) far <= ship;
            end
        else
            always @(posedge clk) far <= ship;
    endgenerate
    assign near = ~far;
endmodule
