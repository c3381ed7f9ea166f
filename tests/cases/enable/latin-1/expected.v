// expect: deich_q gated
// Höhenstand am Deich ä
module deich (clk, flut, hoehe, deich_q, test_en);
    input wire test_en;
    input            clk, flut;  /* größer é*/
    input      [7:0] hoehe;      // "ü"
    output reg [7:0] deich_q;
    // stillclock: deich_q sleeps unless it is written
    wire wake_deich_q = flut;
    wire gclk_deich_q;
    stillclock_icg u_icg_deich_q (.clk(clk), .wake(wake_deich_q), .test(test_en), .gclk(gclk_deich_q));
    always @(posedge gclk_deich_q) /* ß */ if (flut) deich_q <= hoehe; // ÿ
endmodule
