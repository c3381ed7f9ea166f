// expect: tare gated
// expect: gross gated
// expect: crossed left never-holds
module market_scale (
    input  logic        clk, rst_n,
    input  logic        zero, weigh, invert,
    input  logic [13:0] cell_out,
    output logic [13:0] tare, gross,
    output logic [13:0] crossed
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) tare <= '0;
        else tare <= zero ? cell_out : tare;

    always_ff @(posedge clk)
        gross <= zero ? 14'd0 : !weigh ? gross : invert ? ~cell_out : cell_out - tare;

    // holds another register, not itself
    always_ff @(posedge clk)
        crossed <= zero ? cell_out : gross;
endmodule
