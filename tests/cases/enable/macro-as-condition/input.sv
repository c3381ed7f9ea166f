// expect: clay gated
`define TURNING wheel && foot
module potter (
    input  logic       clk,
    input  logic       wheel, foot, wet,
    input  logic [5:0] lump,
    output logic [5:0] clay
);
    // the macro's `&&` must not be torn apart by a neighbour
    always_ff @(posedge clk)
        if (wet) begin if (`TURNING) clay <= lump; end
        else if (!foot) clay <= '0;
endmodule
