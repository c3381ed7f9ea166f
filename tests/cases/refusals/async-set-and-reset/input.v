// expect: gate_pos refused async-load: load different values
// When the reset ends while the set is still active nothing happens until the next clock edge, which would have to come.
module lock_gate (clk, rst_n, set_rst_n, lift, target, gate_pos);
    input clk, rst_n, set_rst_n, lift;
    input [5:0] target;
    output reg [5:0] gate_pos;
    always @(posedge clk or negedge rst_n or negedge set_rst_n)
        if (!rst_n) gate_pos <= 6'd0;
        else if (!set_rst_n) gate_pos <= 6'd63;
        else if (lift) gate_pos <= target;
endmodule
