// expect: final gated
// Verilog identifiers that are keywords of SystemVerilog stay what they are.
module museum_case (clk, do, unique, final);
    input            clk, do;
    input      [5:0] unique;
    output reg [5:0] final;
    always @(posedge clk) if (do) final <= unique;
endmodule
