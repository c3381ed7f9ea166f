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
    output order_t      order,
    input  wire         test_en
);
    // stillclock: order sleeps unless it is written
    wire wake_order = pay;
    wire gclk_order;
    stillclock_icg u_icg_order (.clk(clk), .wake(wake_order), .test(test_en), .gclk(gclk_order));
    always_ff @(posedge gclk_order or negedge rst_n)
        if (!rst_n) begin
            order.amount <= '0;
        end else begin
            if (pay) order.amount <= cents;
        end
    // stillclock: order sleeps unless it is written
    wire wake_order_2 = sit;
    wire gclk_order_2;
    stillclock_icg u_icg_order_2 (.clk(clk), .wake(wake_order_2), .test(test_en), .gclk(gclk_order_2));
    always_ff @(posedge gclk_order_2 or negedge rst_n)
        if (!rst_n) begin
            order.seat <= '0;
        end else begin
            if (sit) order.seat <= chair;
        end
endmodule
