// expect: brook_q refused
// The condition comes out of a latch that is open while the clock is high: it still moves when the cell samples.
module brook_sluice (
    input  logic       clk,
    input  logic       open,
    input  logic [7:0] flow,
    output logic [7:0] brook_q
);
    logic open_l;
    always_latch if (clk) open_l = open;
    always_ff @(posedge clk) if (open_l) brook_q <= flow;
endmodule
