// expect: panel[7:0] gated
// expect: panel[15:8] gated
// Only one half copies itself; the other is swapped, which is no hold.
module quilt_panel (
    input  logic        clk,
    input  logic        stitch, swap,
    input  logic [7:0]  thread,
    output logic [15:0] panel
);
    always_ff @(posedge clk) begin
        if (stitch) panel[7:0] <= thread;
        else panel[7:0] <= panel[7:0];
        if (swap) panel[15:8] <= panel[7:0];
        else panel[15:8] <= panel[15:8];
    end
endmodule
