// expect: boot_vec refused async-load
module boot_rom (
    input  logic       clk, rst_n,
    input  logic       jump,
    input  logic [7:0] straps, target,
    output logic [7:0] boot_vec
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) boot_vec <= straps;
        else if (jump) boot_vec <= target;
endmodule
