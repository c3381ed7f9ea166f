// expect: plough_q gated
// Same reset for both: fine.
module plough_team (
    input  logic       clk, rst_n,
    input  logic       pull,
    input  logic [7:0] field,
    output logic [7:0] plough_q,
    input  wire        test_en
);
    logic pull_q;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) pull_q <= 1'b0;
        else pull_q <= pull;
    // stillclock: plough_q sleeps unless it is written
    wire wake_plough_q = pull_q;
    wire gclk_plough_q;
    stillclock_icg u_icg_plough_q (.clk(clk), .wake(wake_plough_q), .test(test_en), .gclk(gclk_plough_q));
    always_ff @(posedge gclk_plough_q or negedge rst_n)
        if (!rst_n) plough_q <= '0;
        else if (pull_q) plough_q <= field;
endmodule
