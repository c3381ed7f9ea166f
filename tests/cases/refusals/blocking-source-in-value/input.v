// expect: copy_q refused blocking-source
// Only the value comes from the blocking register; gating would still change which value is seen.
module tally_copy (clk, rst, take, copy_q, run);
    input            clk, rst, take;
    output reg [7:0] copy_q, run;
    always @(posedge clk)
        if (rst) run = 8'd0;
        else run = run + 8'd1;
    always @(posedge clk)
        if (take) copy_q <= run;
endmodule
