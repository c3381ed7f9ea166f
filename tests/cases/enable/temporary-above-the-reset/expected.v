// expect: perch gated
// The temporary is declared above the branch that the asynchronous reset leaves to the clock.
module crow_nest (clk, rst, fish, lookout, perch, test_en);
    input wire test_en;
    input            clk, rst;
    input      [5:0] fish;
    input            lookout;
    output reg [5:0] perch;
    // stillclock: perch sleeps unless it is written; the branches are those of its block
    function wake_perch_f (input [3:0] fish_i, input lookout_i);
        reg [3:0] seen_i;
        begin
            wake_perch_f = 1'b0;
            seen_i = fish_i[3:0];
            if (seen_i != 4'd9 && lookout_i) wake_perch_f = 1'b1;
        end
    endfunction
    wire wake_perch = wake_perch_f(fish[3:0], lookout);
    wire gclk_perch;
    stillclock_icg u_icg_perch (.clk(clk), .wake(wake_perch), .test(test_en), .gclk(gclk_perch));
    always @(posedge gclk_perch or posedge rst) begin : watch
        reg [3:0] seen;
        if (rst)
            perch <= 6'd21;
        else begin
            seen = fish[3:0];
            if (seen != 4'd9 && lookout) perch <= {seen, fish[5:4]};
        end
    end
endmodule
