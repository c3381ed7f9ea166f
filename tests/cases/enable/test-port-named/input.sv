// expect: seal_q gated
module seal_rock (input logic clk, bask, input logic [4:0] d, output logic [4:0] seal_q);
    always_ff @(posedge clk) if (bask) seal_q <= d;
endmodule
