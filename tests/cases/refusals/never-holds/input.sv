// expect: beat left never-holds
// expect: blink left never-holds
// expect: both left never-holds
// Every branch writes, whatever the conditions are.
module metronome (
    input  logic       clk, rst_n,
    input  logic       fast,
    input  logic [1:0] mode,
    output logic [7:0] beat, blink, both
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) beat <= '0;
        else if (fast) beat <= beat + 8'd2;
        else beat <= beat + 8'd1;
    always_ff @(posedge clk)
        case (mode)
            2'd0: blink <= beat;
            2'd1: if (fast) blink <= ~beat; else blink <= '0;
            default: blink <= '1;
        endcase
    always_ff @(posedge clk) begin
        both <= beat;
        if (fast) both <= both;   // too late to hold: but only then
        if (fast) both <= blink;
    end
endmodule
