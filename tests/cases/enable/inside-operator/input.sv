// expect: mailbox gated
module letter_sorter (
    input  logic       clk,
    input  logic [4:0] street,
    input  logic [7:0] letter,
    output logic [7:0] mailbox
);
    always_ff @(posedge clk)
        if (street inside {5'd3, [5'd8:5'd12], 5'b1?001}) mailbox <= letter;
endmodule
