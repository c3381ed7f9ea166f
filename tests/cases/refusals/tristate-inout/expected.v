// expect: line_q gated
// An inout port beside the bank.
module shared_line (clk, talk, word, wire_io, line_q, test_en);
    input wire test_en;
    input            clk, talk;
    input      [7:0] word;
    inout      [7:0] wire_io;
    output reg [7:0] line_q;
    assign wire_io = talk ? word : 8'bz;
    // stillclock: line_q sleeps unless it is written
    wire wake_line_q = talk;
    wire gclk_line_q;
    stillclock_icg u_icg_line_q (.clk(clk), .wake(wake_line_q), .test(test_en), .gclk(gclk_line_q));
    always @(posedge gclk_line_q) if (talk) line_q <= wire_io;
endmodule
