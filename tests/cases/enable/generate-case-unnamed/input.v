// expect: tone gated
module chime_box #(parameter KIND = 2) (
    input  wire       clk, strike,
    input  wire [4:0] note,
    output reg  [4:0] tone
);
    generate
        case (KIND)
            1: begin
                always @(posedge clk) tone <= note;
            end
            2: begin
                always @(posedge clk) if (strike) tone <= note;
            end
            default: begin
                always @(posedge clk) tone <= 5'd0;
            end
        endcase
    endgenerate
endmodule
