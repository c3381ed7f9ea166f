// expect: jar gated
// expect: lid gated
module jam_kitchen (
    input  logic       clk, rst,
    input  logic [1:0] stage,
    input  logic [1:0] fruit,
    input  logic [7:0] mass,
    input  logic       hot,
    output logic [7:0] jar,
    output logic [3:0] lid,
    input  wire        test_en
);
    // stillclock: jar sleeps unless it is written; the branches are those of its block
    logic wake_jar;
    always_comb begin
        wake_jar = 1'b0;
        if (rst) wake_jar = 1'b1;
        else case (stage)
            2'd0: case (fruit)
                2'd0: wake_jar = 1'b1;
                2'd1: if (hot) wake_jar = 1'b1;
                default: ;
            endcase
            2'd1: case (fruit)
                2'd3: wake_jar = 1'b1;
                default: ;
            endcase
            default: ;
        endcase
    end
    wire gclk_jar;
    stillclock_icg u_icg_jar (.clk(clk), .wake(wake_jar), .test(test_en), .gclk(gclk_jar));
    always_ff @(posedge gclk_jar)
        if (rst) begin
            jar <= '0;
        end else
            case (stage)
                2'd0:
                    case (fruit)
                        2'd0: jar <= mass;
                        2'd1: if (hot) jar <= mass >> 1;
                        default: ;
                    endcase
                2'd1: begin
                    case (fruit) 2'd3: jar <= '0; default: ; endcase
                end
                default: ;
            endcase
    // stillclock: lid sleeps unless it is written; the branches are those of its block
    logic wake_lid;
    always_comb begin
        wake_lid = 1'b0;
        if (rst) wake_lid = 1'b1;
        else case (stage)
            2'd0: case (fruit)
                2'd0: ;
                2'd1:
                    if (hot) ;
                    else wake_lid = 1'b1;
                default: if (hot) wake_lid = 1'b1;
            endcase
            2'd1: ;
            default: if (!hot) wake_lid = 1'b1;
        endcase
    end
    wire gclk_lid;
    stillclock_icg u_icg_lid (.clk(clk), .wake(wake_lid), .test(test_en), .gclk(gclk_lid));
    always_ff @(posedge gclk_lid)
        if (rst) begin
            lid <= '0;
        end else
            case (stage)
                2'd0:
                    case (fruit)
                        2'd0: ;
                        2'd1: if (hot) ;
                              else     lid <= 4'd1;
                        default: begin
                            if (hot) lid <= fruit + 4'd2;
                        end
                    endcase
                2'd1: ;
                default: if (!hot) lid <= lid + 4'd1;
            endcase
endmodule
