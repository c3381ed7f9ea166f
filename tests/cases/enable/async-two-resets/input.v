// expect: chest gated
// Two asynchronous resets of different polarity that load the same value.
module tea_chest (clk, rst_n, sea_rst, stow, leaves, chest);
    input            clk, rst_n, sea_rst, stow;
    input      [5:0] leaves;
    output reg [5:0] chest;
    always @(posedge clk or negedge rst_n or posedge sea_rst)
        if (!rst_n) chest <= 6'd21;
        else if (sea_rst) chest <= 6'd21;
        else if (stow) chest <= leaves;
endmodule
