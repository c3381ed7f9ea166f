// expect: slow.mark gated
// expect: fast.mark gated
module stop_watch #(parameter bit FAST = 1'b0) (
    input  logic       clk,
    input  logic       lap, split,
    input  logic [7:0] ticks,
    output logic [7:0] shown,
    input  wire        test_en
);
    if (FAST) begin : fast
        logic [7:0] mark;
        // stillclock: mark sleeps unless it is written
        wire wake_mark = lap;
        wire gclk_mark;
        stillclock_icg u_icg_mark (.clk(clk), .wake(wake_mark), .test(test_en), .gclk(gclk_mark));
        always_ff @(posedge gclk_mark) if (lap) mark <= ticks;
        assign shown = mark;
    end else begin : slow
        logic [7:0] mark;
        // stillclock: mark sleeps unless it is written
        wire wake_mark_2 = lap && split;
        wire gclk_mark_2;
        stillclock_icg u_icg_mark_2 (.clk(clk), .wake(wake_mark_2), .test(test_en), .gclk(gclk_mark_2));
        always_ff @(posedge gclk_mark_2) if (lap && split) mark <= ticks;
        assign shown = mark;
    end
endmodule
module stop_watches (
    input  logic       clk, lap, split,
    input  logic [7:0] ticks,
    output logic [7:0] shown_slow, shown_fast,
    input  wire        test_en
);
    stop_watch              u_slow (.test_en(test_en), .clk(clk), .lap(lap), .split(split), .ticks(ticks), .shown(shown_slow));
    stop_watch #(.FAST(1)) u_fast (.test_en(test_en), .clk(clk), .lap(lap), .split(split), .ticks(ticks), .shown(shown_fast));
endmodule
