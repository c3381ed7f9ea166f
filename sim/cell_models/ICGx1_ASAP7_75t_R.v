// ASAP7 (RVT): functional model of its clock-gating cell, without timing, for simulation and
// for proofs of the mapped wrapper.
// Written from the state table in the library's Liberty file; clock, enable, test and next state of the latch:
//   L L L -> L,  L L H -> H,  L H - -> H,  H - - -> unchanged;  GCLK is CLK and latch
`ifdef VERILATOR
`begin_keywords "1800-2012"
`endif
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
`ifdef VERILATOR
`end_keywords
`endif
