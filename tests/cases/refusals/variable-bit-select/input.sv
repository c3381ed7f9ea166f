// expect: bitmap gated
// A variable index into a packed vector is no array: the whole vector is one register.
module seat_map (
    input  logic        clk, rst_n,
    input  logic        book,
    input  logic [3:0]  seat,
    output logic [15:0] bitmap
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) bitmap <= '0;
        else if (book) bitmap[seat] <= 1'b1;
endmodule
