// expect: dune[1:-2] gated
// expect: dune[5:2] gated
module sand_dune (
    input  logic         clk, blow,
    input  logic [5:-2]  gust,
    output logic [5:-2]  dune,
    output logic [10:4]  crest
);
    always_ff @(posedge clk) begin
        if (blow) dune[1:-2] <= gust[1:-2];
        if (blow) dune[5:2] <= gust[5:2];
        if (gust[5]) crest[10:4] <= gust[4:-2];
    end
endmodule
