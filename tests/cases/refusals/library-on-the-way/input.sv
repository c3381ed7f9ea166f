// expect: inner_q refused library-file
// The register stands in a file of ours, below a library module that would have to pass the override on.
module inner_part (input logic clk, input logic go, input logic [7:0] d, output logic [7:0] inner_q);
    always_ff @(posedge clk) if (go) inner_q <= d;
endmodule
module outer_part (
    input  logic       clk, go,
    input  logic [7:0] d,
    output logic [7:0] q
);
    middle_part u_middle (.clk(clk), .go(go), .d(d), .q(q));
endmodule
