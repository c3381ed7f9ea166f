// expect: order.amount gated
// expect: order.seat gated
package cafe_types;
    typedef struct packed {
        logic [11:0] amount;
        logic [7:0]  seat;
    } order_t;
endpackage
module cafe_order import cafe_types::*; (
    input  logic        clk, rst_n,
    input  logic        pay, sit,
    input  logic [11:0] cents,
    input  logic [7:0]  chair,
    output order_t      order
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            order.amount <= '0;
            order.seat <= '0;
        end else begin
            if (pay) order.amount <= cents;
            if (sit) order.seat <= chair;
        end
endmodule
