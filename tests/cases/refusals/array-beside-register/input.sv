// expect: depot left array
// expect: last gated
// The array keeps its clock; the register beside it in the block is still gated.
module truck_depot (
    input  logic       clk,
    input  logic       arrive,
    input  logic [2:0] bay,
    input  logic [7:0] truck,
    output logic [7:0] last, out
);
    logic [7:0] depot [0:7];
    assign out = depot[bay];
    always_ff @(posedge clk)
        if (arrive) begin
            depot[bay] <= truck;
            last <= truck;
        end
endmodule
