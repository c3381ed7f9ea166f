// expect: shelf gated
module pantry_sorter (
    input  logic       clk, rst,
    input  logic [5:0] weight,
    input  logic [7:0] slot,
    output logic [7:0] shelf
);
    always_ff @(posedge clk)
        if (rst) shelf <= 8'h01;
        else
            case (weight) inside
                6'd0:          ;
                [6'd1:6'd9]:   shelf <= slot;
                6'b1?_???1:    shelf <= slot ^ 8'h55;
                default:       ;
            endcase
endmodule
