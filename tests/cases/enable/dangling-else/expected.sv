// expect: bolt gated
// expect: latch_no gated
// Whose else is it? Taking an `if` out of a branch must not give its else to another.
module barn_door (
    input  logic       clk,
    input  logic       push, pull, jam,
    input  logic [5:0] force_in,
    output logic [5:0] bolt, latch_no,
    input  wire        test_en
);
    // stillclock: bolt sleeps unless it is written
    wire wake_bolt = (push && jam) || (!push && !pull);
    wire gclk_bolt;
    stillclock_icg u_icg_bolt (.clk(clk), .wake(wake_bolt), .test(test_en), .gclk(gclk_bolt));
    always_ff @(posedge gclk_bolt)
        if (push)
            if (jam) bolt <= force_in;
            else begin end
        else if (pull) ; else
            bolt <= '0;
    // stillclock: latch_no sleeps unless it is written
    wire wake_latch_no = (push && !jam) || (!push && pull && jam);
    wire gclk_latch_no;
    stillclock_icg u_icg_latch_no (.clk(clk), .wake(wake_latch_no), .test(test_en), .gclk(gclk_latch_no));
    always_ff @(posedge gclk_latch_no)
        if (push)
            if (jam) ;
            else latch_no <= force_in;
        else if (pull) begin
            if (jam) latch_no <= '0;
        end
endmodule
