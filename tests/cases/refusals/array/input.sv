// expect: page left array
// Reset by a loop, written by a variable index.
module note_book (
    input  logic       clk, rst_n,
    input  logic       write,
    input  logic [1:0] line,
    input  logic [7:0] text,
    output logic [7:0] shown
);
    logic [7:0] page [4];
    assign shown = page[line];
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) for (int i = 0; i < 4; i++) page[i] <= '0;
        else if (write) page[line] <= text;
endmodule
