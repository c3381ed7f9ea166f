// expect: shelf gated
module book_shelf (
    input  logic            clk, rst_n,
    input  logic            stack,
    input  logic [2:0]      pick,
    input  logic [2:0][5:0] books,
    output logic [2:0][5:0] shelf
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) shelf <= '0;
        else if (stack)
            foreach (shelf[s])
                if (pick[s]) shelf[s] <= books[s];
endmodule
