// expect: bottle refused foreign-reset
module cider_mill (
    input  logic       clk, rst_n, other_rst_n,
    input  logic       press, clean,
    input  logic [7:0] juice,
    output logic [7:0] bottle
);
    logic [1:0] step;
    logic ready;
    always_comb
        case (step)
            2'd2: ready = clean;
            default: ready = 1'b0;
        endcase
    always_ff @(posedge clk or negedge other_rst_n)
        if (!other_rst_n) step <= '0;
        else step <= step + {1'b0, press};
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) bottle <= '0;
        else if (ready) bottle <= juice;
endmodule
