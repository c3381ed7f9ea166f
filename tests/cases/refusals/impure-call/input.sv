// expect: dice_q refused impure-call
module dice_cup (
    input  logic       clk,
    input  logic       shake,
    input  logic [7:0] roll,
    output logic [7:0] dice_q
);
    always @(posedge clk) if (shake && ($random & 1) != 0) dice_q <= roll;
endmodule
