// expect: grant gated
// The holding arm comes first and overlaps the writing ones: dropping it would wake and write at the wrong time.
module ferry_berth (
    input  logic       clk, rst_n,
    input  logic [3:0] claim,
    input  logic [7:0] ship,
    output logic [7:0] grant,
    input  wire        test_en
);
    // stillclock: grant sleeps unless it is written; the branches are those of its block
    logic wake_grant;
    always_comb begin
        wake_grant = 1'b0;
        casez (claim)
            4'b1???: ;
            4'b?1??: wake_grant = 1'b1;
            4'b??1?: ;
            4'b???1: wake_grant = 1'b1;
            default: ;
        endcase
    end
    wire gclk_grant;
    stillclock_icg u_icg_grant (.clk(clk), .wake(wake_grant), .test(test_en), .gclk(gclk_grant));
    always_ff @(posedge gclk_grant or negedge rst_n)
        if (!rst_n) grant <= '0;
        else
            casez (claim)
                4'b1???: ;                       // harbour master holds the berth
                4'b?1??: grant <= ship;
                4'b??1?: ;
                4'b???1: grant <= ~ship;
                default: ;
            endcase
endmodule
