// expect: rail gated
// expect: points gated
// expect: whistle gated
module shunting_yard (
    input  logic       clk, rst_n,
    input  logic [1:0] track,
    input  logic [5:0] wagon,
    input  logic       blow, echo,
    output logic [5:0] rail, points, whistle
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) rail <= '0;
        else unique case (track)
            2'd0: rail <= wagon;
            2'd1: rail <= rail + 6'd1;
            2'd2: ;
            default: ;
        endcase
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) points <= '0;
        else begin
            priority if (track == 2'd3) points <= wagon;
            else if (track == 2'd2) points <= ~wagon;
            else points <= points;
        end
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) whistle <= '0;
        else begin
            unique0 if (blow && !echo) whistle <= wagon;
            else if (echo && !blow) whistle <= '1;
        end
endmodule
