// expect: wheel left never-holds
// expect: cog[7:0] gated
// `wheel` reads itself turned round or widened, which is no hold.
module paddle_wheel (
    input  logic       clk,
    input  logic       push,
    input  logic [7:0] water,
    output logic [7:0] wheel,
    output logic [7:0] cog,
    input  wire        test_en
);
    always_ff @(posedge clk)
        wheel <= push ? water : {wheel[0], wheel[7:1]};
    // stillclock: cog sleeps unless it is written
    wire wake_cog = push;
    wire gclk_cog;
    stillclock_icg u_icg_cog (.clk(clk), .wake(wake_cog), .test(test_en), .gclk(gclk_cog));
    always_ff @(posedge gclk_cog)
        cog[7:0] <= push ? water : cog[7:0];
endmodule
