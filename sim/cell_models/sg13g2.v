// Functional model, no timing, of the clock-gating cell of IHP SG13G2: for simulation and for proofs of the mapped wrapper.
// Written from the state table in the library's Liberty file (inputs: clock, enable, test; the latch's next state):
//   L L L -> L     L L H -> H     L H - -> H     H - - -> unchanged          GCLK = CLK and latch
`celldefine
module sg13g2_slgcp_1 (input wire CLK, input wire GATE, input wire SCE, output wire GCLK);
    reg latch;
`ifdef VERILATOR
    always_latch if (!CLK) latch = GATE | SCE;
`else
    always @* if (!CLK) latch = GATE | SCE;
`endif
    assign GCLK = CLK & latch;
endmodule
`endcelldefine
