// expect: salt gated
// expect: pepper gated
// expect: stir left never-holds
// Two registers of a mixed block and one of another block wake together: one cell for all three.
module soup_pot (
    input  logic       clk, rst_n,
    input  logic       season,
    input  logic [3:0] pinch,
    output logic [3:0] salt, pepper, stir, herbs,
    input  wire        test_en
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) begin
            stir <= '0;
        end else begin
            stir <= stir + 4'd1;
        end
    // stillclock: salt, pepper and herbs sleep unless they are written
    wire wake_salt = season;
    wire gclk_salt;
    stillclock_icg u_icg_salt (.clk(clk), .wake(wake_salt), .test(test_en), .gclk(gclk_salt));
    always_ff @(posedge gclk_salt or negedge rst_n)
        if (!rst_n) begin
            salt <= '0;
            pepper <= '0;
        end else begin
            if (season) begin
                salt <= pinch;
                pepper <= ~pinch;
            end
        end
    always_ff @(posedge gclk_salt)
        if (season) herbs <= pinch;
endmodule
