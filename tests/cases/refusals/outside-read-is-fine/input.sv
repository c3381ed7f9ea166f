// expect: gauge_q gated
// A register read from above by its path keeps its name and place.
module steam_gauge (input logic clk, input logic read, input logic [7:0] bar, output logic hot);
    logic [7:0] gauge_q;
    assign hot = gauge_q[7];
    always_ff @(posedge clk) if (read) gauge_q <= bar;
endmodule
module boiler (input logic clk, input logic read, input logic [7:0] bar, output logic hot, output logic [7:0] seen);
    steam_gauge u_gauge (.clk(clk), .read(read), .bar(bar), .hot(hot));
    assign seen = u_gauge.gauge_q;
endmodule
