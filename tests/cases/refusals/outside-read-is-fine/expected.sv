// expect: gauge_q gated
// A register read from above by its path keeps its name and place.
module steam_gauge (input logic clk, input logic read, input logic [7:0] bar, output logic hot, input wire test_en);
    logic [7:0] gauge_q;
    assign hot = gauge_q[7];
    // stillclock: gauge_q sleeps unless it is written
    wire wake_gauge_q = read;
    wire gclk_gauge_q;
    stillclock_icg u_icg_gauge_q (.clk(clk), .wake(wake_gauge_q), .test(test_en), .gclk(gclk_gauge_q));
    always_ff @(posedge gclk_gauge_q) if (read) gauge_q <= bar;
endmodule
module boiler (input logic clk, input logic read, input logic [7:0] bar, output logic hot, output logic [7:0] seen, input wire test_en);
    steam_gauge u_gauge (.test_en(test_en), .clk(clk), .read(read), .bar(bar), .hot(hot));
    assign seen = u_gauge.gauge_q;
endmodule
