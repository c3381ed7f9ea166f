// expect: spare gated
// In one of two instances the branch can never run; the condition as written serves both.
module winch_unit #(parameter bit FITTED = 1'b1) (
    input  logic       clk, rst,
    input  logic       haul,
    input  logic [5:0] line_in,
    output logic [5:0] spare,
    input  wire        test_en
);
    // stillclock: spare sleeps unless it is written
    wire wake_spare = rst || (FITTED && haul);
    wire gclk_spare;
    stillclock_icg u_icg_spare (.clk(clk), .wake(wake_spare), .test(test_en), .gclk(gclk_spare));
    always_ff @(posedge gclk_spare)
        if (rst) spare <= 6'd1;
        else if (FITTED && haul) spare <= line_in;
endmodule
module winch_deck (
    input  logic       clk, rst, haul,
    input  logic [5:0] line_in,
    output logic [5:0] fore, aft,
    input  wire        test_en
);
    winch_unit u_fore (.test_en(test_en), .clk(clk), .rst(rst), .haul(haul), .line_in(line_in), .spare(fore));
    winch_unit #(.FITTED(1'b0)) u_aft (.test_en(test_en), .clk(clk), .rst(rst), .haul(haul), .line_in(line_in), .spare(aft));
endmodule
