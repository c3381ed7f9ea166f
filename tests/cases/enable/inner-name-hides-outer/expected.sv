// expect: keel gated
// The same name in a generate branch hides the module's own: the condition reads the inner one.
module keel_box (
    input  logic       clk, en,
    input  logic [7:0] ballast,
    output logic [7:0] keel,
    input  wire        test_en
);
    logic shut;
    assign shut = en;
    generate
        if (1) begin : inner
            logic shut;
            assign shut = ballast[0] & en;
            // stillclock: keel sleeps unless it is written
            wire wake_keel = shut;
            wire gclk_keel;
            stillclock_icg u_icg_keel (.clk(clk), .wake(wake_keel), .test(test_en), .gclk(gclk_keel));
            always_ff @(posedge gclk_keel) if (shut) keel <= ballast;
        end
    endgenerate
    logic unused;
    assign unused = shut;
endmodule
