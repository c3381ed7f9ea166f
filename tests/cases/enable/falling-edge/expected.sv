// expect: dusk gated
// expect: dawn gated
module day_lamp (
    input  logic       clk, rst_n,
    input  logic       note_dusk, note_dawn,
    input  logic [7:0] lux,
    output logic [7:0] dusk, dawn,
    input  wire        test_en
);
    // stillclock: dusk sleeps unless it is written
    wire wake_dusk = note_dusk;
    wire gclk_dusk;
    stillclock_icg_n u_icg_dusk (.clk(clk), .wake(wake_dusk), .test(test_en), .gclk(gclk_dusk));
    always_ff @(negedge gclk_dusk or negedge rst_n)
        if (!rst_n) dusk <= '0;
        else if (note_dusk) dusk <= lux;
    // stillclock: dawn sleeps unless it is written
    wire wake_dawn = note_dawn;
    wire gclk_dawn;
    stillclock_icg u_icg_dawn (.clk(clk), .wake(wake_dawn), .test(test_en), .gclk(gclk_dawn));
    always_ff @(posedge gclk_dawn)
        if (note_dawn) dawn <= lux;
endmodule
