// expect: lot_q refused impure-call
module lot_drawer (
    input  logic       clk,
    input  logic       draw,
    input  logic [7:0] lot,
    output logic [7:0] lot_q, drawn
);
    function automatic logic counted(input logic go);
        drawn = drawn + 8'd1;
        return go;
    endfunction
    always @(posedge clk) if (counted(draw)) lot_q <= lot;
endmodule
