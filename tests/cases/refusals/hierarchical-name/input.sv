// expect: guard_q refused hierarchical-name
module watch_tower (input logic clk, input logic [3:0] sky, output logic [3:0] seen);
    logic alert;
    assign alert = ^sky;
    always_ff @(posedge clk) seen <= sky;
endmodule
module castle_guard (
    input  logic       clk,
    input  logic [3:0] sky,
    input  logic [7:0] men,
    output logic [3:0] seen,
    output logic [7:0] guard_q
);
    watch_tower u_tower (.clk(clk), .sky(sky), .seen(seen));
    always_ff @(posedge clk) if (u_tower.alert) guard_q <= men;
endmodule
