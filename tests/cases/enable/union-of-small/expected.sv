// expect: hour gated
// expect: alarm gated
// Two small registers of one block share a cell that wakes for either.
module clock_face (
    input  logic       clk, rst_n,
    input  logic       set_hour, set_alarm,
    input  logic [1:0] value,
    output logic [1:0] hour, alarm,
    input  wire        test_en
);
    // stillclock: hour and alarm sleep unless they are written
    wire wake_hour = set_hour || set_alarm;
    wire gclk_hour;
    stillclock_icg u_icg_hour (.clk(clk), .wake(wake_hour), .test(test_en), .gclk(gclk_hour));
    always_ff @(posedge gclk_hour or negedge rst_n)
        if (!rst_n) begin
            hour <= '0;
            alarm <= '0;
        end else begin
            if (set_hour)  hour  <= value;
            if (set_alarm) alarm <= value;
        end
endmodule
