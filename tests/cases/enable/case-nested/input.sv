// expect: jar gated
// expect: lid gated
module jam_kitchen (
    input  logic       clk, rst,
    input  logic [1:0] stage,
    input  logic [1:0] fruit,
    input  logic [7:0] mass,
    input  logic       hot,
    output logic [7:0] jar,
    output logic [3:0] lid
);
    always_ff @(posedge clk)
        if (rst) begin
            jar <= '0;
            lid <= '0;
        end else
            case (stage)
                2'd0:
                    case (fruit)
                        2'd0: jar <= mass;
                        2'd1: if (hot) jar <= mass >> 1;
                              else     lid <= 4'd1;
                        default: begin
                            if (hot) lid <= fruit + 4'd2;
                        end
                    endcase
                2'd1: begin
                    case (fruit) 2'd3: jar <= '0; default: ; endcase
                end
                default: if (!hot) lid <= lid + 4'd1;
            endcase
endmodule
