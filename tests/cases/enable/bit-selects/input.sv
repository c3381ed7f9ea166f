// expect: flag[2] gated
// expect: flag[1] left too-few-bits
module flag_line (
    input  logic       clk,
    input  logic       raise, lower, salute,
    input  logic [5:0] pennant,
    output logic [7:0] flag
);
    always_ff @(posedge clk) begin
        if (raise) begin
            flag[0] <= pennant[0];
            flag[2] <= pennant[1];
            flag[5:4] <= pennant[3:2];
        end
        if (lower) flag[1] <= 1'b0;
        if (salute) flag[7:6] <= pennant[5:4];
        flag[3] <= raise ^ lower;
    end
endmodule
