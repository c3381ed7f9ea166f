// expect: wool gated
module spindle (clk/*main*/,spin,fleece,wool);input clk,spin;input[7:0]fleece;output reg[7:0]wool;
always@(posedge clk)/* twist */if(spin/* fast */)wool<=fleece;// end of line
endmodule
