// expect: shadow gated
module byte_mirror (clk, rst, write, mask, data, shadow);
    input             clk, rst, write;
    input      [3:0]  mask;
    input      [31:0] data;
    output reg [31:0] shadow;
    integer i;
    always @(posedge clk)
        if (rst) shadow <= 32'd0;
        else if (write) begin
            for (i = 0; i < 4; i = i + 1)
                if (mask[i]) shadow[8*i +: 8] <= data[8*i +: 8];
        end
endmodule
