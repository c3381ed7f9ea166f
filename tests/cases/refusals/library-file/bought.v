module bought_part (input wire clk, input wire go, input wire [7:0] d, output reg [7:0] bought_q);
    always @(posedge clk) if (go) bought_q <= d;
endmodule
