// expect: perch gated
// The temporary is declared above the branch that the asynchronous reset leaves to the clock.
module crow_nest (clk, rst, fish, lookout, perch);
    input            clk, rst;
    input      [5:0] fish;
    input            lookout;
    output reg [5:0] perch;
    always @(posedge clk or posedge rst) begin : watch
        reg [3:0] seen;
        if (rst)
            perch <= 6'd21;
        else begin
            seen = fish[3:0];
            if (seen != 4'd9 && lookout) perch <= {seen, fish[5:4]};
        end
    end
endmodule
