module middle_part (input wire clk, input wire go, input wire [7:0] d, output wire [7:0] q);
    inner_part u_inner (.clk(clk), .go(go), .d(d), .inner_q(q));
endmodule
