// expect: seal refused side-effect
module seal_press (
    input  logic       clk,
    input  logic       press,
    input  logic [7:0] wax,
    output logic [7:0] seal
);
    logic [7:0] store [0:3];
    always @(posedge clk)
        if (press) begin
            seal <= wax;
            $readmemh("wax.hex", store);
        end
endmodule
