// expect: phase refused drives-clock
module step_motor (clk, rst, step, phase, turns);
    input            clk, rst, step;
    output reg [3:0] phase;
    output reg [7:0] turns;
    always @(posedge clk)
        if (rst) phase <= 4'd1;
        else if (step) phase <= {phase[2:0], phase[3]};
    always @(posedge phase[0]) turns <= turns + 8'd1;
endmodule
