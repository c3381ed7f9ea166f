// expect: wreath gated
// Later assignments win; the register wakes for any of them.
module florist (
    input  logic       clk,
    input  logic       order, gift, cancel,
    input  logic [7:0] rose, lily,
    output logic [7:0] wreath
);
    always_ff @(posedge clk) begin
        wreath <= wreath;
        if (order) wreath <= rose;
        if (gift)  wreath <= lily;
        if (cancel) wreath <= wreath;   // undoes the two above
    end
endmodule
