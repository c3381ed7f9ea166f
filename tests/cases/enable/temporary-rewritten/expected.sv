// expect: stamp gated
// The temporary changes between two conditions; each must see its own value.
module post_office (
    input  logic       clk, rst,
    input  logic [3:0] weight, extra,
    output logic [5:0] stamp,
    input  wire        test_en
);
    // stillclock: stamp sleeps unless it is written; the branches are those of its block
    logic wake_stamp;
    always_comb begin : wake_stamp_branches
        logic [4:0] load_t;
        wake_stamp = 1'b0;
        load_t = weight;
        if (rst) wake_stamp = 1'b1;
        else begin
            if (load_t > 5'd9) wake_stamp = 1'b1;
            load_t = load_t + extra;
            if (load_t > 5'd20) wake_stamp = 1'b1;
        end
    end
    wire gclk_stamp;
    stillclock_icg u_icg_stamp (.clk(clk), .wake(wake_stamp), .test(test_en), .gclk(gclk_stamp));
    always_ff @(posedge gclk_stamp) begin : price
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
