// expect: heap[0].a gated
// expect: heap[0].b gated
module ore_heap (
    input  logic       clk,
    input  logic       dig, sort_it,
    input  logic [7:0] ore,
    output logic [15:0] shown,
    input  wire         test_en
);
    typedef struct packed { logic [7:0] a; logic [7:0] b; } heap_t;
    heap_t [0:0] heap;
    assign shown = heap;
    // stillclock: heap sleeps unless it is written
    wire wake_heap = dig;
    wire gclk_heap;
    stillclock_icg u_icg_heap (.clk(clk), .wake(wake_heap), .test(test_en), .gclk(gclk_heap));
    always_ff @(posedge gclk_heap) begin
        if (dig) heap[0].a <= ore;
    end
    // stillclock: heap sleeps unless it is written
    wire wake_heap_2 = sort_it;
    wire gclk_heap_2;
    stillclock_icg u_icg_heap_2 (.clk(clk), .wake(wake_heap_2), .test(test_en), .gclk(gclk_heap_2));
    always_ff @(posedge gclk_heap_2) begin
        if (sort_it) heap[0].b <= heap[0].a;
    end
endmodule
