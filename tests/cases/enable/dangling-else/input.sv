// expect: bolt gated
// expect: latch_no gated
// Whose else is it? Taking an `if` out of a branch must not give its else to another.
module barn_door (
    input  logic       clk,
    input  logic       push, pull, jam,
    input  logic [5:0] force_in,
    output logic [5:0] bolt, latch_no
);
    always_ff @(posedge clk)
        if (push)
            if (jam) bolt <= force_in;
            else latch_no <= force_in;
        else if (pull) begin
            if (jam) latch_no <= '0;
        end else
            bolt <= '0;
endmodule
