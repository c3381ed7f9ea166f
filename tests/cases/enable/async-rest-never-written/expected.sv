// expect: gate_q gated
// expect: spare left never-written
// What stays in the block is written by the reset alone; the reset keeps its else, which engines ask for.
module lock_keeper (
    input  logic       clk, rst,
    input  logic       open,
    input  logic [5:0] level,
    output logic [5:0] gate_q,
    output logic [4:0] spare,
    input  wire        test_en
);
    always_ff @(posedge clk or posedge rst) begin
        if (rst) begin
            spare <= 5'd17;
        end else begin end
    end
    // stillclock: gate_q sleeps unless it is written
    wire wake_gate_q = open;
    wire gclk_gate_q;
    stillclock_icg u_icg_gate_q (.clk(clk), .wake(wake_gate_q), .test(test_en), .gclk(gclk_gate_q));
    always_ff @(posedge gclk_gate_q or posedge rst) begin
        if (rst) begin
            gate_q <= 6'd6;
        end else begin
            if (open) gate_q <= level;
        end
    end
endmodule
