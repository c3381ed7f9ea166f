// expect: cheese gated
// Switched-off text in the block that writes nothing.
module cheese_vat (
    input  logic       clk, rst,
    input  logic       curdle,
    input  logic [5:0] milk,
    output logic [5:0] cheese,
    input  wire        test_en
);
    // stillclock: cheese sleeps unless it is written
    wire wake_cheese = rst || curdle;
    wire gclk_cheese;
    stillclock_icg u_icg_cheese (.clk(clk), .wake(wake_cheese), .test(test_en), .gclk(gclk_cheese));
    always_ff @(posedge gclk_cheese) begin
        if (rst) cheese <= '0;
`ifdef TALK
        $display("the vat holds %0d", cheese);
`endif
        else if (curdle) cheese <= milk;
    end
endmodule
