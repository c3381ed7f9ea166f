// expect: cup gated
module tea_cup (clk, pour, tea, cup);
    input clk, pour;
    input [`CUP-1:0] tea;
    output reg [`CUP-1:0] cup;
`ifdef HOT
    always @(posedge clk) if (pour && tea[0]) cup <= tea;
`else
    always @(posedge clk) cup <= tea;
`endif
endmodule
