// expect: crew gated
module crew_roll (
    input  logic       clk, rst_n,
    input  logic [7:0] badge,
    input  logic       aboard,
    output logic [7:0] crew
);
    function automatic logic is_even_parity(input logic [7:0] b);
        return ~^b;
    endfunction
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) crew <= '0;
        else if (aboard && is_even_parity(badge)) crew <= badge;
endmodule
