// expect: drawer[0] gated
// expect: drawer[1] gated
module tool_drawer (
    input  logic       clk, rst,
    input  logic       put_top, put_low,
    input  logic [7:0] tool,
    output logic [7:0] top, low,
    input  wire        test_en
);
    logic [7:0] drawer [0:1];
    assign top = drawer[0];
    assign low = drawer[1];
    // stillclock: drawer sleeps unless it is written
    wire wake_drawer = rst || put_top;
    wire gclk_drawer;
    stillclock_icg u_icg_drawer (.clk(clk), .wake(wake_drawer), .test(test_en), .gclk(gclk_drawer));
    always_ff @(posedge gclk_drawer)
        if (rst) begin
            drawer[0] <= '0;
        end else begin
            if (put_top) drawer[0] <= tool;
        end
    // stillclock: drawer sleeps unless it is written
    wire wake_drawer_2 = rst || put_low;
    wire gclk_drawer_2;
    stillclock_icg u_icg_drawer_2 (.clk(clk), .wake(wake_drawer_2), .test(test_en), .gclk(gclk_drawer_2));
    always_ff @(posedge gclk_drawer_2)
        if (rst) begin
            drawer[1] <= '0;
        end else begin
            if (put_low) drawer[1] <= tool;
        end
endmodule
