// expect: word gated
// expect: guard gated
// Two parameterisations of one text: both must be right, though only one is read.
module relay_word #(parameter int W = 8, parameter bit GUARD = 1'b1) (
    input  logic         clk,
    input  logic         pass, check,
    input  logic [W-1:0] din,
    output logic [W-1:0] word,
    output logic [4:0]   guard,
    input  wire          test_en
);
    // stillclock: word sleeps unless it is written
    wire wake_word = pass;
    wire gclk_word;
    stillclock_icg u_icg_word (.clk(clk), .wake(wake_word), .test(test_en), .gclk(gclk_word));
    always_ff @(posedge gclk_word)
        if (pass) word <= din;
    // stillclock: guard sleeps unless it is written
    wire wake_guard = GUARD ? pass && check : check;
    wire gclk_guard;
    stillclock_icg u_icg_guard (.clk(clk), .wake(wake_guard), .test(test_en), .gclk(gclk_guard));
    always_ff @(posedge gclk_guard)
        if (GUARD ? pass && check : check) guard <= guard + 5'd1;
endmodule
module relay_pair (
    input  logic        clk,
    input  logic        pass, check,
    input  logic [19:0] din,
    output logic [19:0] wide,
    output logic [4:0]  narrow, guard_wide, guard_narrow,
    input  wire         test_en
);
    relay_word #(.W(20)) u_wide (.test_en(test_en), .clk, .pass, .check, .din, .word(wide), .guard(guard_wide));
    relay_word #(.W(5), .GUARD(1'b0)) u_narrow (.test_en(test_en), .clk, .pass(check), .check(pass), .din(din[4:0]), .word(narrow), .guard(guard_narrow));
endmodule
