// expect: oar refused clock-unclear
module rowing_boat (input logic clk, input logic pull, input logic [5:0] way, output logic [5:0] oar);
    always @(posedge clk or negedge clk) if (pull) oar <= way;
endmodule
