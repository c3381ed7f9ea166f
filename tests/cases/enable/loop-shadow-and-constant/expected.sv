// expect: bar gated
// The loop variable has the name of a port; a condition that only reads it is constant in each turn.
module xylophone (
    input  logic        clk,
    input  logic        i,
    input  logic [3:0]  mallet,
    output logic [15:0] bar,
    input  wire         test_en
);
    // stillclock: bar sleeps unless it is written; the branches are those of its block
    logic wake_bar;
    always_comb begin
        wake_bar = 1'b0;
        if (i)
            for (int i = 0; i < 4; i++)
                if (i < 3) wake_bar = 1'b1;
                else if (mallet[i]) wake_bar = 1'b1;
    end
    wire gclk_bar;
    stillclock_icg u_icg_bar (.clk(clk), .wake(wake_bar), .test(test_en), .gclk(gclk_bar));
    always_ff @(posedge gclk_bar)
        if (i)
            for (int i = 0; i < 4; i++)
                if (i < 3) bar[4*i +: 4] <= mallet;
                else if (mallet[i]) bar[4*i +: 4] <= ~mallet;
endmodule
