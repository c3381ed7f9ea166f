// expect: bar gated
// The loop variable has the name of a port; a condition that only reads it is constant in each turn.
module xylophone (
    input  logic        clk,
    input  logic        i,
    input  logic [3:0]  mallet,
    output logic [15:0] bar
);
    always_ff @(posedge clk)
        if (i)
            for (int i = 0; i < 4; i++)
                if (i < 3) bar[4*i +: 4] <= mallet;
                else if (mallet[i]) bar[4*i +: 4] <= ~mallet;
endmodule
