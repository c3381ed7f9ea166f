// expect: keel gated
// The same name in a generate branch hides the module's own: the condition reads the inner one.
module keel_box (
    input  logic       clk, en,
    input  logic [7:0] ballast,
    output logic [7:0] keel
);
    logic shut;
    assign shut = en;
    generate
        if (1) begin : inner
            logic shut;
            assign shut = ballast[0] & en;
            always_ff @(posedge clk) if (shut) keel <= ballast;
        end
    endgenerate
    logic unused;
    assign unused = shut;
endmodule
