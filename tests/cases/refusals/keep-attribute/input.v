// expect: sync_q refused keep-attribute
// expect: plain_q gated
module crossing_gate (clk, open, lane, sync_q, plain_q);
    input            clk, open;
    input      [3:0] lane;
    (* ASYNC_REG = "TRUE" *) output reg [3:0] sync_q;
    output reg [3:0] plain_q;
    always @(posedge clk) if (open) sync_q <= lane;
    always @(posedge clk) if (open) plain_q <= lane;
endmodule
