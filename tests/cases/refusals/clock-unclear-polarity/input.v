// expect: kettle refused clock-unclear
// The reset is tested with the other polarity than its edge.
module copper_kettle (clk, rst_n, boil, heat, kettle);
    input            clk, rst_n, boil;
    input      [7:0] heat;
    output reg [7:0] kettle;
    always @(posedge clk or negedge rst_n)
        if (rst_n) kettle <= heat;
        else if (boil) kettle <= 8'd0;
endmodule
