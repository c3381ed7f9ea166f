// expect: sail gated
module yacht_sail (clk, wind, sheet, sail, test_en);
    input wire test_en;
    input            clk;
    input      [2:0] wind;
    input      [4:0] sheet;
    output reg [4:0] sail;
    // stillclock: sail sleeps unless it is written; the branches are those of its block
    function wake_sail_f (input [2:0] wind_i, input [0:0] sheet_i);
        begin
            wake_sail_f = 1'b0;
            casez (wind_i)
                3'b1??: wake_sail_f = 1'b1;
                3'b01?: if (sheet_i[0]) wake_sail_f = 1'b1;
                3'b001: wake_sail_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_sail = wake_sail_f(wind, sheet[0:0]);
    wire gclk_sail;
    stillclock_icg u_icg_sail (.clk(clk), .wake(wake_sail), .test(test_en), .gclk(gclk_sail));
    always @(posedge gclk_sail)
        casez (wind) // synthesis full_case parallel_case
            3'b1??: sail <= 5'd0;
            3'b01?: if (sheet[0]) sail <= sheet;
            3'b001: sail <= sail + 5'd1;
            3'b000: ;
        endcase
endmodule
