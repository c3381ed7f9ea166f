// expect: clay gated
`define TURNING wheel && foot
module potter (
    input  logic       clk,
    input  logic       wheel, foot, wet,
    input  logic [5:0] lump,
    output logic [5:0] clay,
    input  wire        test_en
);
    // the macro's `&&` must not be torn apart by a neighbour
    // stillclock: clay sleeps unless it is written
    wire wake_clay = (wet && `TURNING) || (!wet && !foot);
    wire gclk_clay;
    stillclock_icg u_icg_clay (.clk(clk), .wake(wake_clay), .test(test_en), .gclk(gclk_clay));
    always_ff @(posedge gclk_clay)
        if (wet) begin if (`TURNING) clay <= lump; end
        else if (!foot) clay <= '0;
endmodule
