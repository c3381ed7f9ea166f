// expect: toy_q refused impure-call
module toy_box (
    input  logic       clk,
    input  logic       grab,
    output logic [7:0] toy_q
);
    always @(posedge clk) if (grab) toy_q <= $random;
endmodule
