// expect: berth refused inactive-code
module sleeping_car (clk, stop, berth_in, berth);
    input            clk;
    input      [1:0] stop;
    input      [7:0] berth_in;
    output reg [7:0] berth;
    always @(posedge clk)
        case (stop)
            2'd0: berth <= berth_in;
`ifdef NIGHT_TRAIN
            2'd1: berth <= ~berth_in;
`endif
            default: ;
        endcase
endmodule
