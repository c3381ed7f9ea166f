// GlobalFoundries 180 nm MCU, 7 tracks: functional model of its clock-gating cell, without timing, for simulation and
// for proofs of the mapped wrapper.
// Written from the state table in the library's Liberty file; clock, enable, test and next state of the latch:
//   L L L -> L,  L L H -> H,  L H - -> H,  H - - -> unchanged;  Q is CLK and latch
`ifdef VERILATOR
`begin_keywords "1800-2012"
`endif
`celldefine
module gf180mcu_fd_sc_mcu7t5v0__icgtp_1 (input wire CLK, input wire E, input wire TE, output wire Q);
    reg latch;
`ifdef VERILATOR
    always_latch if (!CLK) latch = E | TE;
`else
    always @* if (!CLK) latch = E | TE;
`endif
    assign Q = CLK & latch;
endmodule
`endcelldefine
`ifdef VERILATOR
`end_keywords
`endif
