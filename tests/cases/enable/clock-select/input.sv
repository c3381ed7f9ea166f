// expect: fleet gated
// The clock is one bit of a bus.
module fleet_radio (
    input  logic [1:0] clk,
    input  logic       hail,
    input  logic [4:0] ship,
    output logic [4:0] fleet
);
    always_ff @(posedge clk[1]) if (hail) fleet <= ship;
endmodule
