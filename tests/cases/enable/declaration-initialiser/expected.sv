// expect: level gated
module cistern (
    input  logic       clk, fill,
    input  logic [5:0] litres,
    output logic [5:0] shown,
    input  wire        test_en
);
    logic [5:0] level = 6'd12;
    assign shown = level;
    // stillclock: level sleeps unless it is written
    wire wake_level = fill;
    wire gclk_level;
    stillclock_icg u_icg_level (.clk(clk), .wake(wake_level), .test(test_en), .gclk(gclk_level));
    always_ff @(posedge gclk_level) if (fill) level <= level + litres;
endmodule
