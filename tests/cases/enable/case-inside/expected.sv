// expect: shelf gated
module pantry_sorter (
    input  logic       clk, rst,
    input  logic [5:0] weight,
    input  logic [7:0] slot,
    output logic [7:0] shelf,
    input  wire        test_en
);
    // stillclock: shelf sleeps unless it is written; the branches are those of its block
    logic wake_shelf;
    always_comb begin
        wake_shelf = 1'b0;
        if (rst) wake_shelf = 1'b1;
        else case (weight) inside
            6'd0: ;
            [6'd1:6'd9]: wake_shelf = 1'b1;
            6'b1?_???1: wake_shelf = 1'b1;
            default: ;
        endcase
    end
    wire gclk_shelf;
    stillclock_icg u_icg_shelf (.clk(clk), .wake(wake_shelf), .test(test_en), .gclk(gclk_shelf));
    always_ff @(posedge gclk_shelf)
        if (rst) shelf <= 8'h01;
        else
            case (weight) inside
                6'd0:          ;
                [6'd1:6'd9]:   shelf <= slot;
                6'b1?_???1:    shelf <= slot ^ 8'h55;
                default:       ;
            endcase
endmodule
