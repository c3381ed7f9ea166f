// expect: fleet gated
// The clock is one bit of a bus.
module fleet_radio (
    input  logic [1:0] clk,
    input  logic       hail,
    input  logic [4:0] ship,
    output logic [4:0] fleet,
    input  wire        test_en
);
    // stillclock: fleet sleeps unless it is written
    wire wake_fleet = hail;
    wire gclk_fleet;
    stillclock_icg u_icg_fleet (.clk(clk[1]), .wake(wake_fleet), .test(test_en), .gclk(gclk_fleet));
    always_ff @(posedge gclk_fleet) if (hail) fleet <= ship;
endmodule
