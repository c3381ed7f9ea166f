// expect: code gated
// The original may write x; whether it writes is defined all the same.
module morse_key (
    input  logic       clk, rst_n,
    input  logic [1:0] key,
    output logic [4:0] code
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) code <= '0;
        else case (key)
            2'd0: ;
            2'd1: code <= 5'd1;
            2'd2: code <= code << 1;
            default: code <= 'x;
        endcase
endmodule
