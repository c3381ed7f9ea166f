// expect: pond refused x-in-wake
module duck_pond (
    input  logic       clk,
    input  logic [1:0] ducks,
    input  logic [7:0] bread,
    output logic [7:0] pond
);
    always_ff @(posedge clk)
        if (ducks == 2'b1x) pond <= bread;
endmodule
