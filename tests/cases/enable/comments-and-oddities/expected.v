// expect: wool gated
module spindle (clk/*main*/,spin,fleece,wool, test_en); input wire test_en;input clk,spin;input[7:0]fleece;output reg[7:0]wool;
// stillclock: wool sleeps unless it is written
wire wake_wool = spin;
wire gclk_wool;
stillclock_icg u_icg_wool (.clk(clk), .wake(wake_wool), .test(test_en), .gclk(gclk_wool));
always@(posedge gclk_wool)/* twist */if(spin/* fast */)wool<=fleece;// end of line
endmodule
