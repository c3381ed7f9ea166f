// expect: lane gated
// Byte lanes with their own strobes, written through one loop: the bank wakes when any strobe is set.
module freight_lanes (
    input  logic        clk,
    input  logic        dock,
    input  logic [3:0]  strobe,
    input  logic [31:0] crate,
    output logic [31:0] lane
);
    always_ff @(posedge clk)
        if (dock)
            for (int b = 0; b < 4; b++)
                if (strobe[b]) lane[8*b +: 8] <= crate[8*b +: 8];
endmodule
