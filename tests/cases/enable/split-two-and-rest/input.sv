// expect: seats gated
// expect: fares gated
// expect: clock_face left never-holds
module omnibus #(parameter int W = 12) (
    input  logic         clk, rst,
    input  logic         board, pay,
    input  logic [W-1:0] riders, fee,
    output logic [W-1:0] seats, fares,
    output logic [5:0]   clock_face
);
    always_ff @(posedge clk) begin
        if (rst) begin
            seats <= '0; fares <= '0; clock_face <= '0;
        end else begin
            clock_face <= clock_face + 6'd1;
            if (board) seats <= riders;
            if (pay)   fares <= fares + fee;
        end
    end
endmodule
