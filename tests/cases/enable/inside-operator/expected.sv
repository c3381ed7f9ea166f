// expect: mailbox gated
module letter_sorter (
    input  logic       clk,
    input  logic [4:0] street,
    input  logic [7:0] letter,
    output logic [7:0] mailbox,
    input  wire        test_en
);
    // stillclock: mailbox sleeps unless it is written
    wire wake_mailbox = street inside {5'd3, [5'd8:5'd12], 5'b1?001};
    wire gclk_mailbox;
    stillclock_icg u_icg_mailbox (.clk(clk), .wake(wake_mailbox), .test(test_en), .gclk(gclk_mailbox));
    always_ff @(posedge gclk_mailbox)
        if (street inside {5'd3, [5'd8:5'd12], 5'b1?001}) mailbox <= letter;
endmodule
