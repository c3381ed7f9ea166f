// expect: north gated
// expect: east gated
// expect: gust gated
// Three blocks under one condition share one cell; the fourth runs on the other edge.
module wind_rose (
    input  logic       clk, rst_n,
    input  logic       gust_in,
    input  logic [7:0] n, e,
    output logic [7:0] north, east, gust, late
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) north <= '0;
        else if (gust_in) north <= n;
    always_ff @(posedge clk)
        if (gust_in) east <= e;
    always_ff @(posedge clk) begin
        if (gust_in) gust <= n ^ e;
    end
    always_ff @(negedge clk)
        if (gust_in) late <= n;
endmodule
