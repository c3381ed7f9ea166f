// expect: warren refused x-in-wake
module rabbit_warren (clk, door, carrot, warren);
    input            clk, door;
    input      [7:0] carrot;
    output reg [7:0] warren;
    always @(posedge clk) if (door !== 1'bx) warren <= carrot;
endmodule
