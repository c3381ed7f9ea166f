// expect: vault refused inactive-code
module bank_vault (clk, rst, lock, code, vault);
    input            clk, rst, lock;
    input      [7:0] code;
    output reg [7:0] vault;
    always @(posedge clk)
        if (rst) vault <= 8'd0;
`ifdef DRILL
        else if (code == 8'd99) vault <= 8'd1;
`endif
        else if (lock) vault <= code;
endmodule
