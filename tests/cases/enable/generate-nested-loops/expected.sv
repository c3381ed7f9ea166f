// expect: rows.cols.seed gated
module seed_tray (
    input  logic        clk,
    input  logic [1:0]  row_on, col_on,
    input  logic [3:0]  grain,
    output logic [15:0] tray,
    input  wire         test_en
);
    for (genvar r = 0; r < 2; r++) begin : rows
        for (genvar c = 0; c < 2; c++) begin : cols
            logic [3:0] seed;
            wire picked = row_on[r] & col_on[c];
            // stillclock: seed sleeps unless it is written
            wire wake_seed = picked;
            wire gclk_seed;
            stillclock_icg u_icg_seed (.clk(clk), .wake(wake_seed), .test(test_en), .gclk(gclk_seed));
            always_ff @(posedge gclk_seed) if (picked) seed <= grain;
            assign tray[4*(2*r + c) +: 4] = seed;
        end
    end
endmodule
