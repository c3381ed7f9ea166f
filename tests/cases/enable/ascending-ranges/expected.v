// expect: reel[0:3] gated
// expect: reel[4+:8] gated
module tape_reel (clk, load_a, load_b, tape, reel, test_en);
    input wire test_en;
    input             clk, load_a, load_b;
    input      [0:11] tape;
    output reg [0:11] reel;
    // stillclock: reel sleeps unless it is written
    wire wake_reel = load_a;
    wire gclk_reel;
    stillclock_icg u_icg_reel (.clk(clk), .wake(wake_reel), .test(test_en), .gclk(gclk_reel));
    always @(posedge gclk_reel) begin
        if (load_a) reel[0:3] <= tape[0:3];
    end
    // stillclock: reel sleeps unless it is written
    wire wake_reel_2 = load_b;
    wire gclk_reel_2;
    stillclock_icg u_icg_reel_2 (.clk(clk), .wake(wake_reel_2), .test(test_en), .gclk(gclk_reel_2));
    always @(posedge gclk_reel_2) begin
        if (load_b) reel[4 +: 8] <= tape[4:11];
    end
endmodule
