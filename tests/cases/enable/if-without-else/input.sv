// expect: reading gated
// expect: beats left never-holds
// A rain gauge keeps its latest reading; the beat counter runs in every cycle.
module rain_gauge (
    input  logic        clk,
    input  logic        sample,
    input  logic [11:0] drops,
    output logic [11:0] reading,
    output logic [7:0]  beats
);
    always_ff @(posedge clk)
        if (sample) reading <= drops;

    always_ff @(posedge clk)
        beats <= beats + 8'd1;
endmodule
