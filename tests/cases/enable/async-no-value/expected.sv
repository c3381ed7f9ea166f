// expect: kept gated
// expect: shown gated
// `kept` has no reset value: while the reset lasts it holds, also at clock edges.
module tide_memory (
    input  logic       clk, rst_n,
    input  logic       store,
    input  logic [7:0] level,
    output logic [7:0] kept, shown,
    input  wire        test_en
);
    // stillclock: shown and kept sleep unless they are written
    wire wake_shown = store;
    wire gclk_shown;
    stillclock_icg u_icg_shown (.clk(clk), .wake(wake_shown), .test(test_en), .gclk(gclk_shown));
    always_ff @(posedge gclk_shown or negedge rst_n)
        if (!rst_n) shown <= '0;
        else if (store) begin
            shown <= level;
            kept <= level;
        end
endmodule
