// expect: oil refused
// expect: wax refused
// The assignments come out of a macro; the block mixes two registers, so a split would have to cut the macro.
`define FILL(en, d) if (en) begin oil <= d; wax <= ~d; end
module lamp_store (
    input  logic       clk,
    input  logic       deliver, count_it,
    input  logic [7:0] barrels,
    output logic [7:0] oil, wax, days
);
    always_ff @(posedge clk) begin
        days <= days + 8'd1;
        `FILL(deliver, barrels)
    end
endmodule
