// expect: speed gated
// `case (1'b1)` with overlapping labels: the first that is true wins, `brake` holds.
module belt_drive (
    input  logic       clk, rst_n,
    input  logic       stop, brake, faster, slower,
    output logic [6:0] speed,
    input  wire        test_en
);
    // stillclock: speed sleeps unless it is written; the branches are those of its block
    logic wake_speed;
    always_comb begin
        wake_speed = 1'b0;
        case (1'b1)
            stop: wake_speed = 1'b1;
            brake: ;
            faster: wake_speed = 1'b1;
            slower: wake_speed = 1'b1;
            default: ;
        endcase
    end
    wire gclk_speed;
    stillclock_icg u_icg_speed (.clk(clk), .wake(wake_speed), .test(test_en), .gclk(gclk_speed));
    always_ff @(posedge gclk_speed or negedge rst_n)
        if (!rst_n) speed <= '0;
        else
            case (1'b1)
                stop:   speed <= '0;
                brake:  ;
                faster: speed <= speed + 7'd1;
                slower: speed <= speed - 7'd1;
            endcase
endmodule
