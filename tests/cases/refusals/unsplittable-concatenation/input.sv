// expect: parity left never-holds
// One assignment writes both: they cannot be separated, and together they never hold.
module knitting (
    input  logic       clk,
    input  logic       purl,
    input  logic [7:0] yarn,
    output logic [7:0] row,
    output logic       parity
);
    always_ff @(posedge clk) begin
        {parity, row} <= {^yarn, yarn};
        if (purl) row <= ~yarn;
    end
endmodule
