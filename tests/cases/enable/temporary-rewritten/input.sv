// expect: stamp gated
// The temporary changes between two conditions; each must see its own value.
module post_office (
    input  logic       clk, rst,
    input  logic [3:0] weight, extra,
    output logic [5:0] stamp
);
    always_ff @(posedge clk) begin : price
        logic [4:0] load;
        load = weight;
        if (rst) stamp <= '0;
        else begin
            if (load > 5'd9) stamp <= 6'd2;
            load = load + extra;
            if (load > 5'd20) stamp <= 6'd7;
        end
    end
endmodule
