// expect: oil_q gated
// expect: wick_q gated
// The top has a scan enable already; the child gets a port of its own for it.
module lamp_wick (input logic clk, trim, input logic [4:0] d, output logic [4:0] wick_q);
    always_ff @(posedge clk) if (trim) wick_q <= d;
endmodule
module oil_lamp (
    input  logic       clk, scan_enable, fill, trim,
    input  logic [4:0] d,
    output logic [4:0] oil_q, wick_q
);
    always_ff @(posedge clk) if (fill) oil_q <= d;
    lamp_wick u_wick (.clk(clk), .trim(trim), .d(d), .wick_q(wick_q));
endmodule
