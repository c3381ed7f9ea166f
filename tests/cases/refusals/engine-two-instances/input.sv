// expect: crop_q refused foreign-domain
// One instance is fine, the other has its enable from another clock: they share their text.
module crop_row (
    input  logic       clk, sow,
    input  logic [7:0] seed,
    output logic [7:0] crop_q
);
    always_ff @(posedge clk) if (sow) crop_q <= seed;
endmodule
module crop_rows (
    input  logic       clk_a, clk_b, go,
    input  logic [7:0] seed,
    output logic [7:0] left, right
);
    logic go_q;
    always_ff @(posedge clk_a) go_q <= go;
    crop_row u_left (.clk(clk_a), .sow(go_q), .seed(seed), .crop_q(left));
    crop_row u_right (.clk(clk_b), .sow(go_q), .seed(seed), .crop_q(right));
endmodule
