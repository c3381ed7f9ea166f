// expect: north gated
// expect: east gated
// expect: gust gated
// Three blocks under one condition share one cell; the fourth runs on the other edge.
module wind_rose (
    input  logic       clk, rst_n,
    input  logic       gust_in,
    input  logic [7:0] n, e,
    output logic [7:0] north, east, gust, late,
    input  wire        test_en
);
    // stillclock: north, east and gust sleep unless they are written
    wire wake_north = gust_in;
    wire gclk_north;
    stillclock_icg u_icg_north (.clk(clk), .wake(wake_north), .test(test_en), .gclk(gclk_north));
    always_ff @(posedge gclk_north or negedge rst_n)
        if (!rst_n) north <= '0;
        else if (gust_in) north <= n;
    always_ff @(posedge gclk_north)
        if (gust_in) east <= e;
    always_ff @(posedge gclk_north) begin
        if (gust_in) gust <= n ^ e;
    end
    // stillclock: late sleeps unless it is written
    wire wake_late = gust_in;
    wire gclk_late;
    stillclock_icg_n u_icg_late (.clk(clk), .wake(wake_late), .test(test_en), .gclk(gclk_late));
    always_ff @(negedge gclk_late)
        if (gust_in) late <= n;
endmodule
