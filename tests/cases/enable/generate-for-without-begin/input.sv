// expect: step gated
module stair_lights (
    input  logic       clk,
    input  logic       walk,
    input  logic [3:0] tread,
    output logic [3:0] step
);
    if (1)
        always_ff @(posedge clk)
            if (walk) step <= tread;
endmodule
