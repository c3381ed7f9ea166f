// expect: price gated
// expect: stock gated
// expect: alarm left too-few-bits
module kiosk (clk, rst_n, op, data, late, price, stock, alarm, idle, test_en);
    input wire test_en;
    input             clk, rst_n, late;
    input      [1:0]  op;
    input      [7:0]  data;
    output reg [7:0]  price, stock;
    output reg        alarm;
    output reg [3:0]  idle;
    always @(posedge clk or negedge rst_n) begin
        if (!rst_n) begin
            alarm <= 1'b0;
            idle  <= 4'd0;
        end else begin
            idle <= idle + 4'd1;
            case (op)
                2'd1: begin
                    idle <= 4'd0;
                end
                2'd2: if (late) begin
                    alarm <= 1'b1;
                end
                default: ;
            endcase
        end
    end
    // stillclock: price sleeps unless it is written; the branches are those of its block
    function wake_price_f (input late_i, input [1:0] op_i);
        begin
            wake_price_f = 1'b0;
            case (op_i)
                2'd0: wake_price_f = 1'b1;
                2'd2: if (late_i) wake_price_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_price = wake_price_f(late, op);
    wire gclk_price;
    stillclock_icg u_icg_price (.clk(clk), .wake(wake_price), .test(test_en), .gclk(gclk_price));
    always @(posedge gclk_price or negedge rst_n) begin
        if (!rst_n) begin
            price <= 8'd0;
        end else begin
            case (op)
                2'd0: price <= data;
                2'd2: if (late) begin
                    price <= price - 8'd1;
                end
                default: ;
            endcase
        end
    end
    // stillclock: stock sleeps unless it is written; the branches are those of its block
    function wake_stock_f (input [1:0] op_i);
        begin
            wake_stock_f = 1'b0;
            case (op_i)
                2'd0: ;
                2'd1: wake_stock_f = 1'b1;
                2'd2: ;
                default: wake_stock_f = 1'b1;
            endcase
        end
    endfunction
    wire wake_stock = wake_stock_f(op);
    wire gclk_stock;
    stillclock_icg u_icg_stock (.clk(clk), .wake(wake_stock), .test(test_en), .gclk(gclk_stock));
    always @(posedge gclk_stock or negedge rst_n) begin
        if (!rst_n) begin
            stock <= 8'd0;
        end else begin
            case (op)
                2'd0: ;
                2'd1: begin
                    stock <= data;
                end
                2'd2: ;
                default: stock <= stock - 8'd1;
            endcase
        end
    end
endmodule
