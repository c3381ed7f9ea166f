// expect: total gated
// The temporary belongs to the module and is an output as well: it stays on the original clock.
module coin_tray (clk, rst, coin, accept, total, worth);
    input            clk, rst;
    input      [1:0] coin;
    input            accept;
    output reg [9:0] total;
    output reg [6:0] worth;
    always @(posedge clk) begin
        case (coin)
            2'd0: worth = 7'd1;
            2'd1: worth = 7'd5;
            2'd2: worth = 7'd20;
            default: worth = 7'd0;
        endcase
        if (rst) total <= 10'd0;
        else if (accept && worth != 7'd0) total <= total + worth;
    end
endmodule
