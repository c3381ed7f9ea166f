// expect: plough_q gated
// Same reset for both: fine.
module plough_team (
    input  logic       clk, rst_n,
    input  logic       pull,
    input  logic [7:0] field,
    output logic [7:0] plough_q
);
    logic pull_q;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) pull_q <= 1'b0;
        else pull_q <= pull;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) plough_q <= '0;
        else if (pull_q) plough_q <= field;
endmodule
