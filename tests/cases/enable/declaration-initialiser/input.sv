// expect: level gated
module cistern (
    input  logic       clk, fill,
    input  logic [5:0] litres,
    output logic [5:0] shown
);
    logic [5:0] level = 6'd12;
    assign shown = level;
    always_ff @(posedge clk) if (fill) level <= level + litres;
endmodule
