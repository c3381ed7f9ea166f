// expect: crew gated
module crew_roll (
    input  logic       clk, rst_n,
    input  logic [7:0] badge,
    input  logic       aboard,
    output logic [7:0] crew,
    input  wire        test_en
);
    function automatic logic is_even_parity(input logic [7:0] b);
        return ~^b;
    endfunction
    // stillclock: crew sleeps unless it is written
    wire wake_crew = aboard && is_even_parity(badge);
    wire gclk_crew;
    stillclock_icg u_icg_crew (.clk(clk), .wake(wake_crew), .test(test_en), .gclk(gclk_crew));
    always_ff @(posedge gclk_crew or negedge rst_n)
        if (!rst_n) crew <= '0;
        else if (aboard && is_even_parity(badge)) crew <= badge;
endmodule
