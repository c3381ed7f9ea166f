// expect: either gated
// expect: both gated
// expect: picked gated
// expect: masked gated
// Operators that bind more loosely than `!=` and `&&`.
module orchestra_pit (
    input  logic       clk, rst,
    input  logic [2:0] strings, brass,
    input  logic       tutti,
    input  logic [6:0] bar,
    output logic [6:0] either, both, picked, masked,
    input  wire        test_en
);
    // stillclock: either sleeps unless it is written
    wire wake_either = rst || |(strings | brass);
    wire gclk_either;
    stillclock_icg u_icg_either (.clk(clk), .wake(wake_either), .test(test_en), .gclk(gclk_either));
    always_ff @(posedge gclk_either) if (rst) either <= '0; else if (strings | brass) either <= bar;
    // stillclock: both sleeps unless it is written
    wire wake_both = rst || |(strings & brass);
    wire gclk_both;
    stillclock_icg u_icg_both (.clk(clk), .wake(wake_both), .test(test_en), .gclk(gclk_both));
    always_ff @(posedge gclk_both) if (rst) both <= '0; else if (strings & brass) both <= bar;
    // stillclock: picked sleeps unless it is written
    wire wake_picked = rst || |(tutti ? strings : brass);
    wire gclk_picked;
    stillclock_icg u_icg_picked (.clk(clk), .wake(wake_picked), .test(test_en), .gclk(gclk_picked));
    always_ff @(posedge gclk_picked) if (rst) picked <= '0; else if (tutti ? strings : brass) picked <= bar;
    // stillclock: masked sleeps unless it is written
    wire wake_masked = !rst && |(strings ^ brass) && !(tutti || brass == 3'd0);
    wire gclk_masked;
    stillclock_icg u_icg_masked (.clk(clk), .wake(wake_masked), .test(test_en), .gclk(gclk_masked));
    always_ff @(posedge gclk_masked) if (!rst) if (strings ^ brass) begin if (!(tutti || brass == 3'd0)) masked <= bar; end
endmodule
