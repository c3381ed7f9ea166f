// expect: ticket gated
// expect: issued gated
module ticket_desk (
    input  logic        clk, rst_n,
    input  logic        open, request, vip,
    input  logic [3:0]  left,
    input  logic [15:0] serial,
    output logic [15:0] ticket,
    output logic [15:0] issued
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            ticket <= '0;
            issued <= '0;
        end else if (open) begin
            if (request)
                if (left != 0) begin
                    ticket <= serial;
                    issued <= issued + 16'd1;
                end
                else if (vip) begin
                    ticket <= 16'hffff;
                end
        end
endmodule
