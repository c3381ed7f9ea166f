// expect: probe_q refused bind
module river_probe (input logic clk, input logic dip, input logic [7:0] silt, output logic [7:0] probe_q);
    always_ff @(posedge clk) if (dip) probe_q <= silt;
endmodule
module river (input logic clk, input logic dip, input logic [7:0] silt, output logic [7:0] flow);
    always_ff @(posedge clk) if (dip) flow <= ~silt;
endmodule
bind river river_probe u_probe (.clk(clk), .dip(dip), .silt(silt), .probe_q());
