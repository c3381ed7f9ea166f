// expect: tally gated
// expect: drift gated
module drift_meter (
    input  logic              clk, rst_n,
    input  logic              step,
    input  logic signed [5:0] delta,
    output logic signed [5:0] drift,
    output logic [7:0]        low
);
    int tally;
    assign low = tally[7:0];
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) tally <= 0;
        else if (step) tally <= tally + delta;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) drift <= -6'sd1;
        else if (delta < 0) drift <= delta >>> 1;
endmodule
