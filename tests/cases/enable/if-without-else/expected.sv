// expect: reading gated
// expect: beats left never-holds
// A rain gauge keeps its latest reading; the beat counter runs in every cycle.
module rain_gauge (
    input  logic        clk,
    input  logic        sample,
    input  logic [11:0] drops,
    output logic [11:0] reading,
    output logic [7:0]  beats,
    input  wire         test_en
);
    // stillclock: reading sleeps unless it is written
    wire wake_reading = sample;
    wire gclk_reading;
    stillclock_icg u_icg_reading (.clk(clk), .wake(wake_reading), .test(test_en), .gclk(gclk_reading));
    always_ff @(posedge gclk_reading)
        if (sample) reading <= drops;

    always_ff @(posedge clk)
        beats <= beats + 8'd1;
endmodule
