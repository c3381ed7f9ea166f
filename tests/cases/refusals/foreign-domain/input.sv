// expect: catch_q refused foreign-domain
module fishing_net (
    input  logic       clk_a, clk_b,
    input  logic       cast_in,
    input  logic [7:0] fish,
    output logic [7:0] catch_q
);
    logic cast_q;
    always_ff @(posedge clk_a) cast_q <= cast_in;
    always_ff @(posedge clk_b) if (cast_q) catch_q <= fish;
endmodule
