// expect: tap gated
module echo_line #(parameter int DEPTH = 4) (
    input  logic       clk, rst_n,
    input  logic       step,
    input  logic [5:0] voice,
    output logic [DEPTH-1:0][5:0] tap
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            for (int i = 0; i < DEPTH; i++) tap[i] <= '0;
        end else if (step) begin
            tap[0] <= voice;
            for (int i = 1; i < DEPTH; i++) tap[i] <= tap[i-1];
        end
endmodule
