// expect: slow.mark gated
// expect: fast.mark gated
module stop_watch #(parameter bit FAST = 1'b0) (
    input  logic       clk,
    input  logic       lap, split,
    input  logic [7:0] ticks,
    output logic [7:0] shown
);
    if (FAST) begin : fast
        logic [7:0] mark;
        always_ff @(posedge clk) if (lap) mark <= ticks;
        assign shown = mark;
    end else begin : slow
        logic [7:0] mark;
        always_ff @(posedge clk) if (lap && split) mark <= ticks;
        assign shown = mark;
    end
endmodule
module stop_watches (
    input  logic       clk, lap, split,
    input  logic [7:0] ticks,
    output logic [7:0] shown_slow, shown_fast
);
    stop_watch              u_slow (.clk(clk), .lap(lap), .split(split), .ticks(ticks), .shown(shown_slow));
    stop_watch #(.FAST(1)) u_fast (.clk(clk), .lap(lap), .split(split), .ticks(ticks), .shown(shown_fast));
endmodule
