// expect: yard refused temporary-holds
// A static variable of the block, read before it is written.
module brick_yard (
    input  logic       clk,
    input  logic       fire,
    input  logic [7:0] brick,
    output logic [7:0] yard
);
    always_ff @(posedge clk) begin : kiln
        static logic [7:0] heat;
        if (heat > 8'd9) yard <= brick;
        heat = fire ? heat + 8'd1 : 8'd0;
    end
endmodule
