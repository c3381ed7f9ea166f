// expect: reel[0:3] gated
// expect: reel[4+:8] gated
module tape_reel (clk, load_a, load_b, tape, reel);
    input             clk, load_a, load_b;
    input      [0:11] tape;
    output reg [0:11] reel;
    always @(posedge clk) begin
        if (load_a) reel[0:3] <= tape[0:3];
        if (load_b) reel[4 +: 8] <= tape[4:11];
    end
endmodule
