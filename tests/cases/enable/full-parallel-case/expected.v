// expect: vent gated
// The attributes are promises about the original, not about the copy.
module green_house (clk, rst, season, heat, vent, test_en);
    input wire test_en;
    input            clk, rst;
    input      [1:0] season;
    input      [3:0] heat;
    output reg [3:0] vent;
    // stillclock: vent sleeps unless it is written; the branches are those of its block
    function wake_vent_f (input rst_i, input [1:0] season_i, input [3:3] heat_i);
        begin
            wake_vent_f = 1'b0;
            if (rst_i) wake_vent_f = 1'b1;
            else case (season_i)
                2'd0: wake_vent_f = 1'b1;
                2'd1: if (heat_i[3]) wake_vent_f = 1'b1;
                2'd3: wake_vent_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_vent = wake_vent_f(rst, season, heat[3:3]);
    wire gclk_vent;
    stillclock_icg u_icg_vent (.clk(clk), .wake(wake_vent), .test(test_en), .gclk(gclk_vent));
    always @(posedge gclk_vent)
        if (rst) vent <= 4'd0;
        else begin
            (* full_case, parallel_case *)
            case (season)
                2'd0: vent <= heat;
                2'd1: if (heat[3]) vent <= 4'hf;
                2'd2: vent <= vent;
                2'd3: vent <= heat >> 1;
            endcase
        end
endmodule
