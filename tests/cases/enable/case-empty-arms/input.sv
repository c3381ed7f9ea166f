// expect: lamp gated
// expect: dwell gated
module signal_mast (
    input  logic       clk, rst_n,
    input  logic [2:0] aspect,
    input  logic [5:0] pattern,
    input  logic       confirm,
    output logic [5:0] lamp,
    output logic [7:0] dwell
);
    always_ff @(posedge clk or negedge rst_n) begin
        if (!rst_n) begin
            lamp  <= '0;
            dwell <= 8'd9;
        end else begin
            case (aspect)
                3'd0, 3'd5: ;                    // dark and reserved: hold
                3'd1: lamp <= pattern;
                3'd2: begin
                    if (confirm) lamp <= ~pattern;
                    dwell <= dwell + 8'd3;
                end
                3'd3: begin end
                default: if (confirm) dwell <= '0;
            endcase
        end
    end
endmodule
