// expect: fleece refused foreign-reset
// The enable comes from a register of the parent, under another asynchronous reset: only the whole design shows it.
module shear_pen (
    input  logic       clk, rst_n, shear,
    input  logic [7:0] wool,
    output logic [7:0] fleece
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) fleece <= '0;
        else if (shear) fleece <= wool;
endmodule
module shear_farm (
    input  logic       clk, rst_n, other_rst_n, call,
    input  logic [7:0] wool,
    output logic [7:0] fleece
);
    logic call_q;
    always_ff @(posedge clk or negedge other_rst_n)
        if (!other_rst_n) call_q <= 1'b0;
        else call_q <= call;
    shear_pen u_pen (.clk(clk), .rst_n(rst_n), .shear(call_q), .wool(wool), .fleece(fleece));
endmodule
