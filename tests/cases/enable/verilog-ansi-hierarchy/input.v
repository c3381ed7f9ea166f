// expect: count gated
// expect: latched gated
module dock_counter #(parameter W = 6) (
    input  wire         clk, rst_n, tick,
    output reg  [W-1:0] count
);
    always @(posedge clk or negedge rst_n) begin
        if (~rst_n)
            count <= {W{1'b0}};
        else if (tick)
            count <= count + 1'b1;
    end
endmodule
module dock_office (
    input  wire       clk,
    input  wire       rst_n,
    input  wire       tick, take,
    output wire [5:0] count,
    output reg  [5:0] latched
);
    dock_counter u_count (clk, rst_n, tick, count);
    always @(posedge clk)
        if (take) latched <= count;
endmodule
