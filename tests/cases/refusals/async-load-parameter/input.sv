// expect: depth_q gated
// A parameter, a localparam and a cast are constant.
module deep_well #(parameter logic [7:0] START = 8'd7) (
    input  logic       clk, rst_n,
    input  logic       draw,
    input  logic [7:0] rope,
    output logic [7:0] depth_q
);
    localparam int EXTRA = 3;
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) depth_q <= START + 8'(EXTRA);
        else if (draw) depth_q <= rope;
endmodule
