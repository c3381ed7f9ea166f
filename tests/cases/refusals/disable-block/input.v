// expect: mast_q refused
module mast_step (clk, skip, step, height, mast_q);
    input            clk, skip, step;
    input      [7:0] height;
    output reg [7:0] mast_q;
    always @(posedge clk) begin : stepping
        if (skip) disable stepping;
        if (step) mast_q <= height;
    end
endmodule
