// expect: speed gated
// `case (1'b1)` with overlapping labels: the first that is true wins, `brake` holds.
module belt_drive (
    input  logic       clk, rst_n,
    input  logic       stop, brake, faster, slower,
    output logic [6:0] speed
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) speed <= '0;
        else
            case (1'b1)
                stop:   speed <= '0;
                brake:  ;
                faster: speed <= speed + 7'd1;
                slower: speed <= speed - 7'd1;
            endcase
endmodule
