// expect: rail gated
// expect: points gated
// expect: whistle gated
module shunting_yard (
    input  logic       clk, rst_n,
    input  logic [1:0] track,
    input  logic [5:0] wagon,
    input  logic       blow, echo,
    output logic [5:0] rail, points, whistle,
    input  wire        test_en
);
    // stillclock: rail sleeps unless it is written; the branches are those of its block
    logic wake_rail;
    always_comb begin
        wake_rail = 1'b0;
        case (track)
            2'd0: wake_rail = 1'b1;
            2'd1: wake_rail = 1'b1;
            default: ;
        endcase
    end
    wire gclk_rail;
    stillclock_icg u_icg_rail (.clk(clk), .wake(wake_rail), .test(test_en), .gclk(gclk_rail));
    always_ff @(posedge gclk_rail or negedge rst_n)
        if (!rst_n) rail <= '0;
        else unique case (track)
            2'd0: rail <= wagon;
            2'd1: rail <= rail + 6'd1;
            2'd2: ;
            default: ;
        endcase
    // stillclock: points sleeps unless it is written
    wire wake_points = track == 2'd3 || track == 2'd2;
    wire gclk_points;
    stillclock_icg u_icg_points (.clk(clk), .wake(wake_points), .test(test_en), .gclk(gclk_points));
    always_ff @(posedge gclk_points or negedge rst_n)
        if (!rst_n) points <= '0;
        else begin
            priority if (track == 2'd3) points <= wagon;
            else if (track == 2'd2) points <= ~wagon;
            else points <= points;
        end
    // stillclock: whistle sleeps unless it is written
    wire wake_whistle = (blow && !echo) || (echo && !blow);
    wire gclk_whistle;
    stillclock_icg u_icg_whistle (.clk(clk), .wake(wake_whistle), .test(test_en), .gclk(gclk_whistle));
    always_ff @(posedge gclk_whistle or negedge rst_n)
        if (!rst_n) whistle <= '0;
        else begin
            unique0 if (blow && !echo) whistle <= wagon;
            else if (echo && !blow) whistle <= '1;
        end
endmodule
