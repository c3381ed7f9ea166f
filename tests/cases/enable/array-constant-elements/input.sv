// expect: drawer[0] gated
// expect: drawer[1] gated
module tool_drawer (
    input  logic       clk, rst,
    input  logic       put_top, put_low,
    input  logic [7:0] tool,
    output logic [7:0] top, low
);
    logic [7:0] drawer [0:1];
    assign top = drawer[0];
    assign low = drawer[1];
    always_ff @(posedge clk)
        if (rst) begin
            drawer[0] <= '0;
            drawer[1] <= '0;
        end else begin
            if (put_top) drawer[0] <= tool;
            if (put_low) drawer[1] <= tool;
        end
endmodule
