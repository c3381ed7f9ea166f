// expect: lamp gated
// expect: dwell gated
module signal_mast (
    input  logic       clk, rst_n,
    input  logic [2:0] aspect,
    input  logic [5:0] pattern,
    input  logic       confirm,
    output logic [5:0] lamp,
    output logic [7:0] dwell,
    input  wire        test_en
);
    // stillclock: lamp sleeps unless it is written; the branches are those of its block
    logic wake_lamp;
    always_comb begin
        wake_lamp = 1'b0;
        case (aspect)
            3'd1: wake_lamp = 1'b1;
            3'd2: if (confirm) wake_lamp = 1'b1;
            default: ;
        endcase
    end
    wire gclk_lamp;
    stillclock_icg u_icg_lamp (.clk(clk), .wake(wake_lamp), .test(test_en), .gclk(gclk_lamp));
    always_ff @(posedge gclk_lamp or negedge rst_n) begin
        if (!rst_n) begin
            lamp  <= '0;
        end else begin
            case (aspect)
                3'd1: lamp <= pattern;
                3'd2: begin
                    if (confirm) lamp <= ~pattern;
                end
                default: ;
            endcase
        end
    end
    // stillclock: dwell sleeps unless it is written; the branches are those of its block
    logic wake_dwell;
    always_comb begin
        wake_dwell = 1'b0;
        case (aspect)
            3'd0, 3'd5, 3'd1: ;
            3'd2: wake_dwell = 1'b1;
            3'd3: ;
            default: if (confirm) wake_dwell = 1'b1;
        endcase
    end
    wire gclk_dwell;
    stillclock_icg u_icg_dwell (.clk(clk), .wake(wake_dwell), .test(test_en), .gclk(gclk_dwell));
    always_ff @(posedge gclk_dwell or negedge rst_n) begin
        if (!rst_n) begin
            dwell <= 8'd9;
        end else begin
            case (aspect)
                3'd0, 3'd5, 3'd1: ;
                3'd2: begin
                    dwell <= dwell + 8'd3;
                end
                3'd3: ;
                default: if (confirm) dwell <= '0;
            endcase
        end
    end
endmodule
