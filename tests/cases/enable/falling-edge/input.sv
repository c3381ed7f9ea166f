// expect: dusk gated
// expect: dawn gated
module day_lamp (
    input  logic       clk, rst_n,
    input  logic       note_dusk, note_dawn,
    input  logic [7:0] lux,
    output logic [7:0] dusk, dawn
);
    always_ff @(negedge clk or negedge rst_n)
        if (!rst_n) dusk <= '0;
        else if (note_dusk) dusk <= lux;
    always_ff @(posedge clk)
        if (note_dawn) dawn <= lux;
endmodule
