// expect: pearl refused foreign-domain
module pearl_diver (
    input  logic       clk_a, clk_b,
    input  logic       dive, deep,
    input  logic [7:0] shell,
    output logic [7:0] pearl
);
    logic dive_q, ready;
    wire  early = dive_q & deep;
    always_comb begin
        ready = 1'b0;
        if (early) ready = shell[0];
    end
    always_ff @(posedge clk_a) dive_q <= dive;
    always_ff @(posedge clk_b) if (ready) pearl <= shell;
endmodule
