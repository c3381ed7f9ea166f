// expect: shelf_q refused celldefine
`celldefine
module shelf_cell (clk, en, d, shelf_q);
    input            clk, en;
    input      [3:0] d;
    output reg [3:0] shelf_q;
    always @(posedge clk) if (en) shelf_q <= d;
endmodule
`endcelldefine
module shelf_top (clk, en, d, q);
    input        clk, en;
    input  [3:0] d;
    output [3:0] q;
    shelf_cell u_cell (clk, en, d, q);
endmodule
