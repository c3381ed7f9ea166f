// expect: cells.honey gated
module honeycomb #(parameter int N = 3) (
    input  logic           clk, rst_n,
    input  logic [N-1:0]   fill,
    input  logic [5:0]     nectar,
    output logic [6*N-1:0] comb,
    input  wire            test_en
);
    for (genvar c = 0; c < N; c++) begin : cells
        logic [5:0] honey;
        // stillclock: honey sleeps unless it is written
        wire wake_honey = fill[c];
        wire gclk_honey;
        stillclock_icg u_icg_honey (.clk(clk), .wake(wake_honey), .test(test_en), .gclk(gclk_honey));
        always_ff @(posedge gclk_honey or negedge rst_n)
            if (!rst_n) honey <= '0;
            else if (fill[c]) honey <= nectar + 6'(c);
        assign comb[6*c +: 6] = honey;
    end
endmodule
