// expect: quilt_q refused temporary-holds
// The temporary keeps its value from one edge to the next: it is a register.
module patch_work (clk, sew, patch, quilt_q);
    input            clk, sew;
    input      [7:0] patch;
    output reg [7:0] quilt_q;
    reg        [7:0] scrap;
    always @(posedge clk) begin
        if (sew) scrap = patch;
        if (scrap != 8'd0) quilt_q <= scrap;
    end
endmodule
