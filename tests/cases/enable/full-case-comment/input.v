// expect: sail gated
module yacht_sail (clk, wind, sheet, sail);
    input            clk;
    input      [2:0] wind;
    input      [4:0] sheet;
    output reg [4:0] sail;
    always @(posedge clk)
        casez (wind) // synthesis full_case parallel_case
            3'b1??: sail <= 5'd0;
            3'b01?: if (sheet[0]) sail <= sheet;
            3'b001: sail <= sail + 5'd1;
            3'b000: ;
        endcase
endmodule
