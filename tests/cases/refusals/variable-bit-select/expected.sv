// expect: bitmap gated
// A variable index into a packed vector is no array: the whole vector is one register.
module seat_map (
    input  logic        clk, rst_n,
    input  logic        book,
    input  logic [3:0]  seat,
    output logic [15:0] bitmap,
    input  wire         test_en
);
    // stillclock: bitmap sleeps unless it is written
    wire wake_bitmap = book;
    wire gclk_bitmap;
    stillclock_icg u_icg_bitmap (.clk(clk), .wake(wake_bitmap), .test(test_en), .gclk(gclk_bitmap));
    always_ff @(posedge gclk_bitmap or negedge rst_n)
        if (!rst_n) bitmap <= '0;
        else if (book) bitmap[seat] <= 1'b1;
endmodule
