// expect: page gated
// A case in Verilog: the copy of its branches becomes a function of everything it reads, the register included.
module book_stand (clk, rst, turn, mark, page, top_page);
    input             clk, rst, mark;
    input       [2:0] turn;
    output reg  [9:0] page;
    output      [9:0] top_page;
    parameter [9:0] LAST = 10'd700;
    wire at_end = page == LAST;
    assign top_page = LAST;
    always @(posedge clk)
        if (rst)
            page <= 10'd0;
        else
            case (turn)
                3'd1: if (!at_end) page <= page + 10'd1;
                3'd2: if (page != 0) page <= page - 10'd1;
                3'd3, 3'd4: page <= LAST;
                3'd5: begin
                    if (mark)
                        page <= {page[0], page[9:1]};
                end
            endcase
endmodule
