// expect: slow_q refused
// expect: half refused
// A divided clock, launched with `<=`: the wake condition launched on the parent races with it.
module clock_divider (clk, rst, go, data, half, slow_q);
    input            clk, rst, go;
    input      [7:0] data;
    output reg       half;
    output reg [7:0] slow_q;
    reg              go_q;
    always @(posedge clk)
        if (rst) half <= 1'b0;
        else half <= ~half;
    always @(posedge clk) go_q <= go;
    always @(posedge half) if (go_q) slow_q <= data;
endmodule
