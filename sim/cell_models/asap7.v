// Functional model, no timing, of the clock-gating cell of ASAP7 (RVT): for simulation and for proofs of the mapped wrapper.
// Written from the state table in the library's Liberty file (inputs: clock, enable, test; the latch's next state):
//   L L L -> L     L L H -> H     L H - -> H     H - - -> unchanged          GCLK = CLK and latch
`celldefine
module ICGx1_ASAP7_75t_R (input wire CLK, input wire ENA, input wire SE, output wire GCLK);
    reg latch;
`ifdef VERILATOR
    always_latch if (!CLK) latch = ENA | SE;
`else
    always @* if (!CLK) latch = ENA | SE;
`endif
    assign GCLK = CLK & latch;
endmodule
`endcelldefine
