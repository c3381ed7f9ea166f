// expect: word gated
// expect: guard gated
// Two parameterisations of one text: both must be right, though only one is read.
module relay_word #(parameter int W = 8, parameter bit GUARD = 1'b1) (
    input  logic         clk,
    input  logic         pass, check,
    input  logic [W-1:0] din,
    output logic [W-1:0] word,
    output logic [4:0]   guard
);
    always_ff @(posedge clk)
        if (pass) word <= din;
    always_ff @(posedge clk)
        if (GUARD ? pass && check : check) guard <= guard + 5'd1;
endmodule
module relay_pair (
    input  logic        clk,
    input  logic        pass, check,
    input  logic [19:0] din,
    output logic [19:0] wide,
    output logic [4:0]  narrow, guard_wide, guard_narrow
);
    relay_word #(.W(20)) u_wide (.clk, .pass, .check, .din, .word(wide), .guard(guard_wide));
    relay_word #(.W(5), .GUARD(1'b0)) u_narrow (.clk, .pass(check), .check(pass), .din(din[4:0]), .word(narrow), .guard(guard_narrow));
endmodule
