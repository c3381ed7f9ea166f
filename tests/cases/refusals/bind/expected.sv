// expect: probe_q refused bind
module river_probe (input logic clk, input logic dip, input logic [7:0] silt, output logic [7:0] probe_q);
    always_ff @(posedge clk) if (dip) probe_q <= silt;
endmodule
module river (input logic clk, input logic dip, input logic [7:0] silt, output logic [7:0] flow, input wire test_en);
    // stillclock: flow sleeps unless it is written
    wire wake_flow = dip;
    wire gclk_flow;
    stillclock_icg u_icg_flow (.clk(clk), .wake(wake_flow), .test(test_en), .gclk(gclk_flow));
    always_ff @(posedge gclk_flow) if (dip) flow <= ~silt;
endmodule
bind river river_probe u_probe (.clk(clk), .dip(dip), .silt(silt), .probe_q());
