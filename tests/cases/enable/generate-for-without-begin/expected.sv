// expect: step gated
module stair_lights (
    input  logic       clk,
    input  logic       walk,
    input  logic [3:0] tread,
    output logic [3:0] step,
    input  wire        test_en
);
    if (1)
        begin
        // stillclock: step sleeps unless it is written
        wire wake_step = walk;
        wire gclk_step;
        stillclock_icg u_icg_step (.clk(clk), .wake(wake_step), .test(test_en), .gclk(gclk_step));
        always_ff @(posedge gclk_step)
            if (walk) step <= tread;
        end
endmodule
