// expect: hutch refused x-in-wake
// `case` compares x literally, unlike casex.
module rabbit_hutch (clk, door, carrot, hutch);
    input            clk;
    input      [1:0] door;
    input      [7:0] carrot;
    output reg [7:0] hutch;
    always @(posedge clk)
        case (door)
            2'b0x: hutch <= carrot;
            2'b11: hutch <= 8'd0;
        endcase
endmodule
