// expect: quota gated
module fish_quota (
    input  logic       clk, rst_n,
    input  logic       land,
    input  logic [7:0] haul,
    output logic [7:0] quota,
    input  wire        test_en
);
    // stillclock: quota sleeps unless it is written
    wire wake_quota = land;
    wire gclk_quota;
    stillclock_icg u_icg_quota (.clk(clk), .wake(wake_quota), .test(test_en), .gclk(gclk_quota));
    always_ff @(posedge gclk_quota or negedge rst_n)
        if (!rst_n) ;
        else if (land) quota <= haul;
endmodule
