// expect: late refused blocking-source
module mail_train (clk, rst, bag, late);
    input            clk, rst;
    input      [7:0] bag;
    output reg [7:0] late;
    reg        [3:0] minutes;
    wire             due;
    assign due = minutes == 4'd9;
    always @(posedge clk)
        if (rst) minutes = 4'd0;
        else minutes = minutes + 4'd1;
    always @(posedge clk) if (due) late <= bag;
endmodule
