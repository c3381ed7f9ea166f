// expect: heap[0].a gated
// expect: heap[0].b gated
module ore_heap (
    input  logic       clk,
    input  logic       dig, sort_it,
    input  logic [7:0] ore,
    output logic [15:0] shown
);
    typedef struct packed { logic [7:0] a; logic [7:0] b; } heap_t;
    heap_t [0:0] heap;
    assign shown = heap;
    always_ff @(posedge clk) begin
        if (dig) heap[0].a <= ore;
        if (sort_it) heap[0].b <= heap[0].a;
    end
endmodule
