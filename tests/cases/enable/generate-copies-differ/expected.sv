// expect: tanks.fill gated
// In copy 0 the register is written in every cycle, in the others it holds: the condition says so for each.
module tank_farm (
    input  logic        clk,
    input  logic [2:0]  valve,
    input  logic [7:0]  oil,
    output logic [23:0] level,
    input  wire         test_en
);
    for (genvar t = 0; t < 3; t++) begin : tanks
        logic [7:0] fill;
        // stillclock: fill sleeps unless it is written
        wire wake_fill = t == 0 || valve[t];
        wire gclk_fill;
        stillclock_icg u_icg_fill (.clk(clk), .wake(wake_fill), .test(test_en), .gclk(gclk_fill));
        always_ff @(posedge gclk_fill)
            if (t == 0) fill <= oil;
            else if (valve[t]) fill <= ~oil;
        assign level[8*t +: 8] = fill;
    end
endmodule
