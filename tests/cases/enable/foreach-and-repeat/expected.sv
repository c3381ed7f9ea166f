// expect: shelf gated
module book_shelf (
    input  logic            clk, rst_n,
    input  logic            stack,
    input  logic [2:0]      pick,
    input  logic [2:0][5:0] books,
    output logic [2:0][5:0] shelf,
    input  wire             test_en
);
    // stillclock: shelf sleeps unless it is written; the branches are those of its block
    logic wake_shelf;
    always_comb begin
        wake_shelf = 1'b0;
        if (stack) foreach (shelf[s]) if (pick[s]) wake_shelf = 1'b1;
    end
    wire gclk_shelf;
    stillclock_icg u_icg_shelf (.clk(clk), .wake(wake_shelf), .test(test_en), .gclk(gclk_shelf));
    always_ff @(posedge gclk_shelf or negedge rst_n)
        if (!rst_n) shelf <= '0;
        else if (stack)
            foreach (shelf[s])
                if (pick[s]) shelf[s] <= books[s];
endmodule
