// expect: shadow gated
module byte_mirror (clk, rst, write, mask, data, shadow, test_en);
    input wire test_en;
    input             clk, rst, write;
    input      [3:0]  mask;
    input      [31:0] data;
    output reg [31:0] shadow;
    integer i;
    // stillclock: shadow sleeps unless it is written; the branches are those of its block
    function wake_shadow_f (input rst_i, write_i, input [3:0] mask_i);
        integer i_i;
        begin
            wake_shadow_f = 1'b0;
            if (rst_i) wake_shadow_f = 1'b1;
            else if (write_i) for (i_i = 0; i_i < 4; i_i = i_i + 1) if (mask_i[i_i]) wake_shadow_f = 1'b1;
        end
    endfunction
    wire wake_shadow = wake_shadow_f(rst, write, mask);
    wire gclk_shadow;
    stillclock_icg u_icg_shadow (.clk(clk), .wake(wake_shadow), .test(test_en), .gclk(gclk_shadow));
    always @(posedge gclk_shadow)
        if (rst) shadow <= 32'd0;
        else if (write) begin
            for (i = 0; i < 4; i = i + 1)
                if (mask[i]) shadow[8*i +: 8] <= data[8*i +: 8];
        end
endmodule
