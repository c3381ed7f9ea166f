// expect: thermo refused not-copyable
module thermo_meter (input logic clk, input logic [7:0] mercury, output logic [7:0] thermo);
    real heat;
    initial heat = 0.5;
    always @(posedge clk) if (heat > 0.25 && mercury[0]) thermo <= mercury;
endmodule
