// expect: float_q gated
module water_float (
    input  logic       clk, rst_n,
    input  logic       rise,
    input  logic [7:0] mark,
    output logic [7:0] float_q
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) float_q <= '0;
        else begin
            if (rise) float_q <= mark;
            assert (mark != 8'hff || !rise);
        end
endmodule
