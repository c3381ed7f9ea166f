// expect: tide_q refused
// `return` and loops that break leave the branches.
module tide_table (
    input  logic       clk,
    input  logic [3:0] hour,
    input  logic [7:0] tide,
    output logic [7:0] tide_q
);
    always_ff @(posedge clk) begin
        for (int i = 0; i < 4; i++) begin
            if (hour[i]) begin
                tide_q <= tide + 8'(i);
                break;
            end
        end
    end
endmodule
