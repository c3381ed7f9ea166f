// expect: dune[1:-2] gated
// expect: dune[5:2] gated
module sand_dune (
    input  logic         clk, blow,
    input  logic [5:-2]  gust,
    output logic [5:-2]  dune,
    output logic [10:4]  crest,
    input  wire          test_en
);
    // stillclock: dune sleeps unless it is written
    wire wake_dune = blow;
    wire gclk_dune;
    stillclock_icg u_icg_dune (.clk(clk), .wake(wake_dune), .test(test_en), .gclk(gclk_dune));
    always_ff @(posedge gclk_dune) begin
        if (blow) dune[1:-2] <= gust[1:-2];
        if (blow) dune[5:2] <= gust[5:2];
    end
    // stillclock: crest sleeps unless it is written
    wire wake_crest = gust[5];
    wire gclk_crest;
    stillclock_icg u_icg_crest (.clk(clk), .wake(wake_crest), .test(test_en), .gclk(gclk_crest));
    always_ff @(posedge gclk_crest) begin
        if (gust[5]) crest[10:4] <= gust[4:-2];
    end
endmodule
