// expect: depth_q gated
// A parameter, a localparam and a cast are constant.
module deep_well #(parameter logic [7:0] START = 8'd7) (
    input  logic       clk, rst_n,
    input  logic       draw,
    input  logic [7:0] rope,
    output logic [7:0] depth_q,
    input  wire        test_en
);
    localparam int EXTRA = 3;
    // stillclock: depth_q sleeps unless it is written
    wire wake_depth_q = draw;
    wire gclk_depth_q;
    stillclock_icg u_icg_depth_q (.clk(clk), .wake(wake_depth_q), .test(test_en), .gclk(gclk_depth_q));
    always_ff @(posedge gclk_depth_q or negedge rst_n)
        if (!rst_n) depth_q <= START + 8'(EXTRA);
        else if (draw) depth_q <= rope;
endmodule
