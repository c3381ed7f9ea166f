// expect: calm refused drives-clock
module storm_guard (
    input  logic       clk,
    input  logic       test_calm,
    input  logic [3:0] wind,
    output logic [3:0] calm, mast_q
);
    always_ff @(posedge clk) if (test_calm) calm <= wind;
    always_ff @(posedge clk or negedge calm[0])
        if (!calm[0]) mast_q <= '0;
        else mast_q <= wind;
endmodule
