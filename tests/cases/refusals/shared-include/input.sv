// expect: drum refused shared-include
module left_drum (input logic clk, input logic hit, input logic [5:0] skin, output logic [5:0] drum);
`include "drum.svh"
endmodule
module right_drum (input logic clk, input logic hit, input logic [5:0] skin, output logic [5:0] drum);
`include "drum.svh"
endmodule
module drum_kit (input logic clk, input logic hit, input logic [5:0] skin, output logic [5:0] a, b);
    left_drum u_left (.clk(clk), .hit(hit), .skin(skin), .drum(a));
    right_drum u_right (.clk(clk), .hit(hit), .skin(skin), .drum(b));
endmodule
