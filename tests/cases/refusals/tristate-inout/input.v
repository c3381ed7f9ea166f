// expect: line_q gated
// An inout port beside the bank.
module shared_line (clk, talk, word, wire_io, line_q);
    input            clk, talk;
    input      [7:0] word;
    inout      [7:0] wire_io;
    output reg [7:0] line_q;
    assign wire_io = talk ? word : 8'bz;
    always @(posedge clk) if (talk) line_q <= wire_io;
endmodule
