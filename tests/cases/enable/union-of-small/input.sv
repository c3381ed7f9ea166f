// expect: hour gated
// expect: alarm gated
// Two small registers of one block share a cell that wakes for either.
module clock_face (
    input  logic       clk, rst_n,
    input  logic       set_hour, set_alarm,
    input  logic [1:0] value,
    output logic [1:0] hour, alarm
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            hour <= '0;
            alarm <= '0;
        end else begin
            if (set_hour)  hour  <= value;
            if (set_alarm) alarm <= value;
        end
endmodule
