// expect: route gated
module tram_switch (clk, code, lane, route);
    input        clk;
    input  [3:0] code;
    input  [4:0] lane;
    output [4:0] route;
    reg    [4:0] route;
    always @(posedge clk)
        casex (code)
            4'b00xx: route <= lane;
            4'bx1x1: route <= route + 5'd1;
            4'b1x00: ;
        endcase
endmodule
