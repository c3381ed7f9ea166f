// expect: pebble gated
// The top has no ports at all, its child an empty connection list.
module beach_stone ();
    logic       clk = 1'b0;
    logic [4:0] pebble, sand = 5'd3;
    logic       wash = 1'b1;
    always_ff @(posedge clk) if (wash) pebble <= sand;
endmodule
module beach;
    beach_stone u_stone ();
endmodule
