// expect: sand refused clock-as-data
module hour_glass (
    input  logic       clk,
    input  logic       turn,
    input  logic [7:0] grain,
    output logic [7:0] sand
);
    wire both = turn & clk;
    always_ff @(posedge clk) if (both) sand <= grain;
endmodule
