// expect: cheese gated
// Switched-off text in the block that writes nothing.
module cheese_vat (
    input  logic       clk, rst,
    input  logic       curdle,
    input  logic [5:0] milk,
    output logic [5:0] cheese
);
    always_ff @(posedge clk) begin
        if (rst) cheese <= '0;
`ifdef TALK
        $display("the vat holds %0d", cheese);
`endif
        else if (curdle) cheese <= milk;
    end
endmodule
