// expect: freight refused foreign-domain
// Child and parent run on different clocks.
module rail_wagon (
    input  logic       clk, couple,
    input  logic [7:0] load,
    output logic [7:0] freight
);
    always_ff @(posedge clk) if (couple) freight <= load;
endmodule
module rail_yard (
    input  logic       clk_a, clk_b, call,
    input  logic [7:0] load,
    output logic [7:0] freight
);
    logic call_q;
    always_ff @(posedge clk_a) call_q <= call;
    rail_wagon u_wagon (.clk(clk_b), .couple(call_q), .load(load), .freight(freight));
endmodule
