// expect: gate_q refused
module turnstile (
    input  logic       clk,
    input  logic       pass,
    input  logic [7:0] fare,
    output logic [7:0] gate_q
);
    logic [3:0] n;
    initial n = 0;
    always @(posedge clk) if (pass && (n++ > 4'd3)) gate_q <= fare;
endmodule
