// expect: dust refused clock-as-data
module dust_pan (input logic clk, input logic sweep, input logic [7:0] dirt, output logic [7:0] dust);
    always_ff @(posedge clk) if (sweep || clk) dust <= dirt;
endmodule
