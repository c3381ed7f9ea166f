// expect: plot[7:0] gated
// expect: plot[15:8] gated
// expect: plot[31:16] gated
module garden_plot (
    input  logic        clk, rst_n,
    input  logic        sow_low, sow_high, plough,
    input  logic [15:0] seed,
    output logic [31:0] plot
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            plot[7:0]   <= 8'h00;
            plot[15:8]  <= 8'hff;
            plot[31:16] <= 16'h1234;
        end else begin
            if (sow_low)  plot[7:0]    <= seed[7:0];
            if (sow_high) plot[15 -: 8] <= seed[15:8];
            if (plough)   plot[16 +: 16] <= seed;
        end
endmodule
