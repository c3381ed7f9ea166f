// expect: basket refused foreign-reset
module apple_press (
    input  logic       clk, rst_n, other_rst_n,
    input  logic       crush,
    input  logic [7:0] apples,
    output logic [7:0] basket
);
    logic crush_q;
    always_ff @(posedge clk or negedge other_rst_n)
        if (!other_rst_n) crush_q <= 1'b0;
        else crush_q <= crush;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) basket <= '0;
        else if (crush_q) basket <= apples;
endmodule
