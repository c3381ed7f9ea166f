// expect: total gated
// The temporary belongs to the module and is an output as well: it stays on the original clock.
module coin_tray (clk, rst, coin, accept, total, worth, test_en);
    input wire test_en;
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
    end
    // stillclock: total sleeps unless it is written; the branches are those of its block
    function wake_total_f (input rst_i, input [1:0] coin_i, input accept_i);
        reg [6:0] worth_i;
        begin
            wake_total_f = 1'b0;
            case (coin_i)
                2'd0: worth_i = 7'd1;
                2'd1: worth_i = 7'd5;
                2'd2: worth_i = 7'd20;
                default: worth_i = 7'd0;
            endcase
            if (rst_i) wake_total_f = 1'b1;
            else if (accept_i && worth_i != 7'd0) wake_total_f = 1'b1;
        end
    endfunction
    wire wake_total = wake_total_f(rst, coin, accept);
    wire gclk_total;
    stillclock_icg u_icg_total (.clk(clk), .wake(wake_total), .test(test_en), .gclk(gclk_total));
    always @(posedge gclk_total) begin : total_copy
        reg [6:0] worth_t;
        case (coin)
            2'd0: worth_t = 7'd1;
            2'd1: worth_t = 7'd5;
            2'd2: worth_t = 7'd20;
            default: worth_t = 7'd0;
        endcase
        if (rst) total <= 10'd0;
        else if (accept && worth_t != 7'd0) total <= total + worth_t;
    end
endmodule
