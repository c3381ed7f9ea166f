// expect: barge_q refused no-test-path
`define BARGE_PORTS (input logic clk, input logic load, input logic [7:0] coal, output logic [7:0] barge_q)
module coal_barge `BARGE_PORTS;
    always_ff @(posedge clk) if (load) barge_q <= coal;
endmodule
