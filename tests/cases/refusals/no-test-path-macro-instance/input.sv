// expect: tug_q refused no-test-path
`define TUG(n) tug_boat u_tug_``n (.clk(clk), .pull(pull), .tow(tow), .tug_q(n))
module tug_boat (input logic clk, input logic pull, input logic [7:0] tow, output logic [7:0] tug_q);
    always_ff @(posedge clk) if (pull) tug_q <= tow;
endmodule
module tug_fleet (input logic clk, input logic pull, input logic [7:0] tow, output logic [7:0] a, b);
    `TUG(a);
    `TUG(b);
endmodule
