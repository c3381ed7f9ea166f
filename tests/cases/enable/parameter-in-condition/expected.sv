// expect: fog gated
// The condition keeps the parameter: it is copied, not folded.
module fog_horn #(parameter bit QUIET = 1'b0, parameter logic [3:0] LIMIT = 4'd9) (
    input  logic       clk, rst_n,
    input  logic [3:0] haze,
    input  logic       manual,
    output logic [7:0] fog,
    input  wire        test_en
);
    localparam logic [3:0] HALF = LIMIT / 2;
    // stillclock: fog sleeps unless it is written
    wire wake_fog = (!QUIET && haze > LIMIT) || (manual && haze > HALF);
    wire gclk_fog;
    stillclock_icg u_icg_fog (.clk(clk), .wake(wake_fog), .test(test_en), .gclk(gclk_fog));
    always_ff @(posedge gclk_fog or negedge rst_n)
        if (!rst_n) fog <= '0;
        else if (!QUIET && haze > LIMIT) fog <= fog + 8'd1;
        else if (manual && haze > HALF) fog <= 8'd200;
endmodule
