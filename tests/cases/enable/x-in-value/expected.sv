// expect: code gated
// The original may write x; whether it writes is defined all the same.
module morse_key (
    input  logic       clk, rst_n,
    input  logic [1:0] key,
    output logic [4:0] code,
    input  wire        test_en
);
    // stillclock: code sleeps unless it is written; the branches are those of its block
    logic wake_code;
    always_comb begin
        wake_code = 1'b0;
        case (key)
            2'd0: ;
            2'd1: wake_code = 1'b1;
            2'd2: wake_code = 1'b1;
            default: wake_code = 1'b1;
        endcase
    end
    wire gclk_code;
    stillclock_icg u_icg_code (.clk(clk), .wake(wake_code), .test(test_en), .gclk(gclk_code));
    always_ff @(posedge gclk_code or negedge rst_n)
        if (!rst_n) code <= '0;
        else case (key)
            2'd0: ;
            2'd1: code <= 5'd1;
            2'd2: code <= code << 1;
            default: code <= 'x;
        endcase
endmodule
