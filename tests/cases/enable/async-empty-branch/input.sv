// expect: quota gated
module fish_quota (
    input  logic       clk, rst_n,
    input  logic       land,
    input  logic [7:0] haul,
    output logic [7:0] quota
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) ;
        else if (land) quota <= haul;
endmodule
