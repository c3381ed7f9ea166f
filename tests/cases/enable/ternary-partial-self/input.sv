// expect: wheel left never-holds
// expect: cog[7:0] gated
// `wheel` reads itself turned round or widened, which is no hold.
module paddle_wheel (
    input  logic       clk,
    input  logic       push,
    input  logic [7:0] water,
    output logic [7:0] wheel,
    output logic [7:0] cog
);
    always_ff @(posedge clk)
        wheel <= push ? water : {wheel[0], wheel[7:1]};
    always_ff @(posedge clk)
        cog[7:0] <= push ? water : cog[7:0];
endmodule
