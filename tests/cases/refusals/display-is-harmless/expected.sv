// expect: toll gated
// A message at every clock edge must go on at every clock edge: the bank moves, the message stays.
module toll_gate (
    input  logic       clk,
    input  logic       pass,
    input  logic [7:0] coins,
    output logic [7:0] toll,
    input  wire        test_en
);
    always @(posedge clk) begin
        $display("the gate stands, %0d", toll);
    end
    // stillclock: toll sleeps unless it is written
    wire wake_toll = pass;
    wire gclk_toll;
    stillclock_icg u_icg_toll (.clk(clk), .wake(wake_toll), .test(test_en), .gclk(gclk_toll));
    always @(posedge gclk_toll) begin
        if (pass) toll <= coins;
    end
endmodule
