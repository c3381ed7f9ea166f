// Functional model, no timing, of the clock-gating cell of GlobalFoundries 180 nm MCU, 7 tracks: for simulation and for proofs of the mapped wrapper.
// Written from the state table in the library's Liberty file (inputs: clock, enable, test; the latch's next state):
//   L L L -> L     L L H -> H     L H - -> H     H - - -> unchanged          Q = CLK and latch
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
