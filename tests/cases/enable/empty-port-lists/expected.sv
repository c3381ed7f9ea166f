// expect: pebble gated
// The top has no ports at all, its child an empty connection list.
module beach_stone (input wire test_en);
    logic       clk = 1'b0;
    logic [4:0] pebble, sand = 5'd3;
    logic       wash = 1'b1;
    // stillclock: pebble sleeps unless it is written
    wire wake_pebble = wash;
    wire gclk_pebble;
    stillclock_icg u_icg_pebble (.clk(clk), .wake(wake_pebble), .test(test_en), .gclk(gclk_pebble));
    always_ff @(posedge gclk_pebble) if (wash) pebble <= sand;
endmodule
module beach (input wire test_en);
    beach_stone u_stone (.test_en(test_en));
endmodule
