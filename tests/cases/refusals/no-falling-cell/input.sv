// expect: low_q refused no-falling-cell
// expect: high_q gated
module two_edges (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] low_q, high_q);
    always_ff @(negedge clk) if (go) low_q <= d;
    always_ff @(posedge clk) if (go) high_q <= d;
endmodule
