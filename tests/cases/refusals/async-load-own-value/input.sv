// expect: tally_q refused async-load
module sheep_tally (
    input  logic       clk, rst_n,
    input  logic       pass,
    output logic [7:0] tally_q
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) tally_q <= tally_q ^ 8'h01;
        else if (pass) tally_q <= tally_q + 8'd1;
endmodule
