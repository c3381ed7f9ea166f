// expect: reed_q refused two-writers
// Half of the vector is an assign, and so is one bit of the other half.
module reed_pipe (clk, blow, air, reed_q);
    input            clk, blow;
    input      [7:0] air;
    output     [7:0] reed_q;
    reg        [7:0] reed_q;
    always @(posedge clk) if (blow) reed_q <= air;
    always @* if (air[0]) reed_q[7:4] = 4'd0;
endmodule
