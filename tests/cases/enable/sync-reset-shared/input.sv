// expect: oven gated
// expect: crumbs gated
module bread_oven (
    input  logic       clk, rst,
    input  logic       bake,
    input  logic [9:0] heat,
    output logic [9:0] oven,
    output logic [5:0] crumbs
);
    // the reset is part of the condition
    always_ff @(posedge clk)
        if (rst) oven <= '0;
        else if (bake) oven <= heat;
    // here the reset comes last, and wins
    always_ff @(posedge clk) begin
        if (bake) crumbs <= crumbs + 6'd1;
        if (rst) crumbs <= '0;
    end
endmodule
