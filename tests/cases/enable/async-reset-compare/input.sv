// expect: bell gated
// The reset is tested by comparison.
module bell_tower (
    input  logic       clk, rst_n,
    input  logic       ring,
    input  logic [4:0] note,
    output logic [4:0] bell
);
    always_ff @(posedge clk or negedge rst_n)
        if (rst_n == 1'b0) bell <= '0;
        else if (ring) bell <= note;
endmodule
