// expect: seats gated
// expect: fares gated
// expect: clock_face left never-holds
module omnibus #(parameter int W = 12) (
    input  logic         clk, rst,
    input  logic         board, pay,
    input  logic [W-1:0] riders, fee,
    output logic [W-1:0] seats, fares,
    output logic [5:0]   clock_face,
    input  wire          test_en
);
    always_ff @(posedge clk) begin
        if (rst) begin
            clock_face <= '0;
        end else begin
            clock_face <= clock_face + 6'd1;
        end
    end
    // stillclock: seats sleeps unless it is written
    wire wake_seats = rst || board;
    wire gclk_seats;
    stillclock_icg u_icg_seats (.clk(clk), .wake(wake_seats), .test(test_en), .gclk(gclk_seats));
    always_ff @(posedge gclk_seats) begin
        if (rst) begin
            seats <= '0;
        end else begin
            if (board) seats <= riders;
        end
    end
    // stillclock: fares sleeps unless it is written
    wire wake_fares = rst || pay;
    wire gclk_fares;
    stillclock_icg u_icg_fares (.clk(clk), .wake(wake_fares), .test(test_en), .gclk(gclk_fares));
    always_ff @(posedge gclk_fares) begin
        if (rst) begin
            fares <= '0;
        end else begin
            if (pay)   fares <= fares + fee;
        end
    end
endmodule
