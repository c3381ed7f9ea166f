// expect: grant gated
// The holding arm comes first and overlaps the writing ones: dropping it would wake and write at the wrong time.
module ferry_berth (
    input  logic       clk, rst_n,
    input  logic [3:0] claim,
    input  logic [7:0] ship,
    output logic [7:0] grant
);
    always_ff @(posedge clk or negedge rst_n)
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
