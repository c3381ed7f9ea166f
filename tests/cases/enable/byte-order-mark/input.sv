// expect: mark_q gated
// A byte order mark at the start of the file.
module mark_file (input logic clk, go, input logic [3:0] d, output logic [3:0] mark_q);
    always_ff @(posedge clk) if (go) mark_q <= d;
endmodule
