// expect: price gated
// expect: stock gated
// expect: alarm left too-few-bits
module kiosk (clk, rst_n, op, data, late, price, stock, alarm, idle);
    input             clk, rst_n, late;
    input      [1:0]  op;
    input      [7:0]  data;
    output reg [7:0]  price, stock;
    output reg        alarm;
    output reg [3:0]  idle;
    always @(posedge clk or negedge rst_n) begin
        if (!rst_n) begin
            price <= 8'd0;
            stock <= 8'd0;
            alarm <= 1'b0;
            idle  <= 4'd0;
        end else begin
            idle <= idle + 4'd1;
            case (op)
                2'd0: price <= data;
                2'd1: begin
                    stock <= data;
                    idle <= 4'd0;
                end
                2'd2: if (late) begin
                    price <= price - 8'd1;
                    alarm <= 1'b1;
                end
                default: stock <= stock - 8'd1;
            endcase
        end
    end
endmodule
