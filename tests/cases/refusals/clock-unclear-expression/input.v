// expect: pail refused clock-unclear
module milk_pail (clk, off, milk, flow, pail);
    input            clk, off, milk;
    input      [5:0] flow;
    output reg [5:0] pail;
    always @(posedge (clk & ~off)) if (milk) pail <= flow;
endmodule
