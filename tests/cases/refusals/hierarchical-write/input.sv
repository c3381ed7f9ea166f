// expect: u_door.door_q refused hierarchical-name
// A register of the child is written from above.
module cell_door (input logic clk, input logic turn, input logic [3:0] key, output logic [3:0] shown);
    logic [3:0] door_q;
    assign shown = door_q;
endmodule
module prison (input logic clk, input logic turn, input logic [3:0] key, output logic [3:0] shown);
    cell_door u_door (.clk(clk), .turn(turn), .key(key), .shown(shown));
    always_ff @(posedge clk) if (turn) u_door.door_q <= key;
endmodule
