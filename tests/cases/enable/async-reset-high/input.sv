// expect: mast gated
module radio_mast (
    input  logic       clk, rst,
    input  logic       hoist,
    input  logic [6:0] height,
    output logic [6:0] mast
);
    always_ff @(posedge clk, posedge rst)
        if (rst) mast <= 7'h55;
        else if (hoist) mast <= height;
endmodule
