// expect: tanks.fill gated
// In copy 0 the register is written in every cycle, in the others it holds: the condition says so for each.
module tank_farm (
    input  logic        clk,
    input  logic [2:0]  valve,
    input  logic [7:0]  oil,
    output logic [23:0] level
);
    for (genvar t = 0; t < 3; t++) begin : tanks
        logic [7:0] fill;
        always_ff @(posedge clk)
            if (t == 0) fill <= oil;
            else if (valve[t]) fill <= ~oil;
        assign level[8*t +: 8] = fill;
    end
endmodule
