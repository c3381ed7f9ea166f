// expect: page gated
// A case in Verilog: the copy of its branches becomes a function of everything it reads, the register included.
module book_stand (clk, rst, turn, mark, page, top_page, test_en);
    input wire test_en;
    input             clk, rst, mark;
    input       [2:0] turn;
    output reg  [9:0] page;
    output      [9:0] top_page;
    parameter [9:0] LAST = 10'd700;
    wire at_end = page == LAST;
    assign top_page = LAST;
    // stillclock: page sleeps unless it is written; the branches are those of its block
    function wake_page_f (input rst_i, mark_i, input [2:0] turn_i, input [9:0] page_i, input at_end_i);
        begin
            wake_page_f = 1'b0;
            if (rst_i) wake_page_f = 1'b1;
            else case (turn_i)
                3'd1: if (!at_end_i) wake_page_f = 1'b1;
                3'd2: if (page_i != 0) wake_page_f = 1'b1;
                3'd3, 3'd4: wake_page_f = 1'b1;
                3'd5: if (mark_i) wake_page_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_page = wake_page_f(rst, mark, turn, page, at_end);
    wire gclk_page;
    stillclock_icg u_icg_page (.clk(clk), .wake(wake_page), .test(test_en), .gclk(gclk_page));
    always @(posedge gclk_page)
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
