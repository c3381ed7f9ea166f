// expect: hop gated
module frog_hops (
    input  logic       clk, rst_n,
    input  logic       jump,
    input  logic [3:0] pad,
    output logic [3:0] landed,
    input  wire        test_en
);
    logic [3:0] hop [3];
    assign landed = hop[2];
    // stillclock: hop sleeps unless it is written
    wire wake_hop = jump;
    wire gclk_hop;
    stillclock_icg u_icg_hop (.clk(clk), .wake(wake_hop), .test(test_en), .gclk(gclk_hop));
    always_ff @(posedge gclk_hop or negedge rst_n)
        if (!rst_n) for (int i = 0; i < 3; i++) hop[i] <= '0;
        else if (jump) begin
            hop[0] <= pad;
            hop[1] <= hop[0];
            hop[2] <= hop[1];
        end
endmodule
