// expect: panel[7:0] gated
// expect: panel[15:8] gated
// Only one half copies itself; the other is swapped, which is no hold.
module quilt_panel (
    input  logic        clk,
    input  logic        stitch, swap,
    input  logic [7:0]  thread,
    output logic [15:0] panel,
    input  wire         test_en
);
    // stillclock: panel sleeps unless it is written
    wire wake_panel_2 = stitch;
    wire gclk_panel_2;
    stillclock_icg u_icg_panel_2 (.clk(clk), .wake(wake_panel_2), .test(test_en), .gclk(gclk_panel_2));
    always_ff @(posedge gclk_panel_2) begin
        if (stitch) panel[7:0] <= thread;
        else panel[7:0] <= panel[7:0];
    end
    // stillclock: panel sleeps unless it is written
    wire wake_panel = swap;
    wire gclk_panel;
    stillclock_icg u_icg_panel (.clk(clk), .wake(wake_panel), .test(test_en), .gclk(gclk_panel));
    always_ff @(posedge gclk_panel) begin
        if (swap) panel[15:8] <= panel[7:0];
        else panel[15:8] <= panel[15:8];
    end
endmodule
