// expect: end_q gated
// No line end at the end, and everything on one line.
module line_end (input logic clk, go, input logic [3:0] d, output logic [3:0] end_q); always_ff @(posedge clk) if (go) end_q <= d; endmodule