// expect: deich_q gated
// Höhenstand am Deich ä
module deich (clk, flut, hoehe, deich_q);
    input            clk, flut;  /* größer é*/
    input      [7:0] hoehe;      // "ü"
    output reg [7:0] deich_q;
    always @(posedge clk) /* ß */ if (flut) deich_q <= hoehe; // ÿ
endmodule
