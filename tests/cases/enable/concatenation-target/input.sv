// expect: minutes gated
// expect: carry_out gated
module lap_clock (
    input  logic       clk, rst,
    input  logic       tick, clear,
    input  logic [5:0] start,
    output logic       carry_out,
    output logic [5:0] minutes
);
    always_ff @(posedge clk)
        if (rst || clear) begin
            minutes <= start;
            carry_out <= 1'b0;
        end else if (tick)
            {carry_out, minutes} <= {1'b0, minutes} + 7'd1;
endmodule
