// expect: tide_q gated
// Only the default writes: the holding arms must stay in the copy.
module harbour_gauge (
    input  logic       clk,
    input  logic [2:0] mode,
    input  logic [7:0] level,
    output logic [7:0] tide_q,
    input  wire        test_en
);
    // stillclock: tide_q sleeps unless it is written; the branches are those of its block
    logic wake_tide_q;
    always_comb begin
        wake_tide_q = 1'b0;
        case (mode)
            3'd0, 3'd1, 3'd4: ;
            default: wake_tide_q = 1'b1;
        endcase
    end
    wire gclk_tide_q;
    stillclock_icg u_icg_tide_q (.clk(clk), .wake(wake_tide_q), .test(test_en), .gclk(gclk_tide_q));
    always_ff @(posedge gclk_tide_q)
        case (mode)
            3'd0, 3'd1: ;
            3'd4: tide_q <= tide_q;
            default: tide_q <= level;
        endcase
endmodule
