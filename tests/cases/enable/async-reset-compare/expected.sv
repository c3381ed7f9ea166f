// expect: bell gated
// The reset is tested by comparison.
module bell_tower (
    input  logic       clk, rst_n,
    input  logic       ring,
    input  logic [4:0] note,
    output logic [4:0] bell,
    input  wire        test_en
);
    // stillclock: bell sleeps unless it is written
    wire wake_bell = ring;
    wire gclk_bell;
    stillclock_icg u_icg_bell (.clk(clk), .wake(wake_bell), .test(test_en), .gclk(gclk_bell));
    always_ff @(posedge gclk_bell or negedge rst_n)
        if (rst_n == 1'b0) bell <= '0;
        else if (ring) bell <= note;
endmodule
