// expect: spare left never-written
module spare_part #(parameter bit FITTED = 1'b0) (
    input  logic       clk,
    input  logic       use_it,
    input  logic [7:0] part,
    output logic [7:0] spare
);
    always_ff @(posedge clk)
        if (FITTED && use_it) spare <= part;
endmodule
