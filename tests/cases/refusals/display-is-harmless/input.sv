// expect: toll gated
// A message at every clock edge must go on at every clock edge: the bank moves, the message stays.
module toll_gate (
    input  logic       clk,
    input  logic       pass,
    input  logic [7:0] coins,
    output logic [7:0] toll
);
    always @(posedge clk) begin
        if (pass) toll <= coins;
        $display("the gate stands, %0d", toll);
    end
endmodule
