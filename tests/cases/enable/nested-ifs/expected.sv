// expect: ticket gated
// expect: issued gated
module ticket_desk (
    input  logic        clk, rst_n,
    input  logic        open, request, vip,
    input  logic [3:0]  left,
    input  logic [15:0] serial,
    output logic [15:0] ticket,
    output logic [15:0] issued,
    input  wire         test_en
);
    // stillclock: ticket sleeps unless it is written
    wire wake_ticket = open && request && (left != 0 || vip);
    wire gclk_ticket;
    stillclock_icg u_icg_ticket (.clk(clk), .wake(wake_ticket), .test(test_en), .gclk(gclk_ticket));
    always_ff @(posedge gclk_ticket or negedge rst_n)
        if (!rst_n) begin
            ticket <= '0;
        end else if (open) begin
            if (request)
                if (left != 0) begin
                    ticket <= serial;
                end
                else if (vip) begin
                    ticket <= 16'hffff;
                end
        end
    // stillclock: issued sleeps unless it is written
    wire wake_issued = open && request && left != 0;
    wire gclk_issued;
    stillclock_icg u_icg_issued (.clk(clk), .wake(wake_issued), .test(test_en), .gclk(gclk_issued));
    always_ff @(posedge gclk_issued or negedge rst_n)
        if (!rst_n) begin
            issued <= '0;
        end else if (open) begin
            if (request)
                if (left != 0) begin
                    issued <= issued + 16'd1;
                end
        end
endmodule
