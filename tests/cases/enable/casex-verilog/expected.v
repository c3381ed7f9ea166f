// expect: route gated
module tram_switch (clk, code, lane, route, test_en);
    input wire test_en;
    input        clk;
    input  [3:0] code;
    input  [4:0] lane;
    output [4:0] route;
    reg    [4:0] route;
    // stillclock: route sleeps unless it is written; the branches are those of its block
    function wake_route_f (input [3:0] code_i);
        begin
            wake_route_f = 1'b0;
            casex (code_i)
                4'b00xx: wake_route_f = 1'b1;
                4'bx1x1: wake_route_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_route = wake_route_f(code);
    wire gclk_route;
    stillclock_icg u_icg_route (.clk(clk), .wake(wake_route), .test(test_en), .gclk(gclk_route));
    always @(posedge gclk_route)
        casex (code)
            4'b00xx: route <= lane;
            4'bx1x1: route <= route + 5'd1;
            4'b1x00: ;
        endcase
endmodule
