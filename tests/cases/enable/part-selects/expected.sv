// expect: plot[7:0] gated
// expect: plot[15:8] gated
// expect: plot[31:16] gated
module garden_plot (
    input  logic        clk, rst_n,
    input  logic        sow_low, sow_high, plough,
    input  logic [15:0] seed,
    output logic [31:0] plot,
    input  wire         test_en
);
    // stillclock: plot sleeps unless it is written
    wire wake_plot_3 = sow_low;
    wire gclk_plot_3;
    stillclock_icg u_icg_plot_3 (.clk(clk), .wake(wake_plot_3), .test(test_en), .gclk(gclk_plot_3));
    always_ff @(posedge gclk_plot_3 or negedge rst_n)
        if (!rst_n) begin
            plot[7:0]   <= 8'h00;
        end else begin
            if (sow_low)  plot[7:0]    <= seed[7:0];
        end
    // stillclock: plot sleeps unless it is written
    wire wake_plot = sow_high;
    wire gclk_plot;
    stillclock_icg u_icg_plot (.clk(clk), .wake(wake_plot), .test(test_en), .gclk(gclk_plot));
    always_ff @(posedge gclk_plot or negedge rst_n)
        if (!rst_n) begin
            plot[15:8]  <= 8'hff;
        end else begin
            if (sow_high) plot[15 -: 8] <= seed[15:8];
        end
    // stillclock: plot sleeps unless it is written
    wire wake_plot_2 = plough;
    wire gclk_plot_2;
    stillclock_icg u_icg_plot_2 (.clk(clk), .wake(wake_plot_2), .test(test_en), .gclk(gclk_plot_2));
    always_ff @(posedge gclk_plot_2 or negedge rst_n)
        if (!rst_n) begin
            plot[31:16] <= 16'h1234;
        end else begin
            if (plough)   plot[16 +: 16] <= seed;
        end
endmodule
