// expect: vent gated
// The attributes are promises about the original, not about the copy.
module green_house (clk, rst, season, heat, vent);
    input            clk, rst;
    input      [1:0] season;
    input      [3:0] heat;
    output reg [3:0] vent;
    always @(posedge clk)
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
