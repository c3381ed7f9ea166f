// expect: armed left too-few-bits: 1 bit
// expect: code left too-few-bits: 3 bits
module small_lock (
    input  logic       clk, rst_n,
    input  logic       arm, enter,
    input  logic [2:0] digit,
    output logic       armed,
    output logic [2:0] code
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) armed <= 1'b0;
        else if (arm) armed <= 1'b1;
    always_ff @(posedge clk)
        if (enter) code <= digit;
endmodule
