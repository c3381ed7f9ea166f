// expect: wreath gated
// Later assignments win; the register wakes for any of them.
module florist (
    input  logic       clk,
    input  logic       order, gift, cancel,
    input  logic [7:0] rose, lily,
    output logic [7:0] wreath,
    input  wire        test_en
);
    // stillclock: wreath sleeps unless it is written
    wire wake_wreath = order || gift;
    wire gclk_wreath;
    stillclock_icg u_icg_wreath (.clk(clk), .wake(wake_wreath), .test(test_en), .gclk(gclk_wreath));
    always_ff @(posedge gclk_wreath) begin
        wreath <= wreath;
        if (order) wreath <= rose;
        if (gift)  wreath <= lily;
        if (cancel) wreath <= wreath;   // undoes the two above
    end
endmodule
