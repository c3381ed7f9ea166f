// expect: bought_q refused library-file
// expect: own_q gated
module own_part (
    input  logic       clk, go,
    input  logic [7:0] d,
    output logic [7:0] bought, own_q
);
    bought_part u_bought (.clk(clk), .go(go), .d(d), .bought_q(bought));
    always_ff @(posedge clk) if (go) own_q <= d;
endmodule
