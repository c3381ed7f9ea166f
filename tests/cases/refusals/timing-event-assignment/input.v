// expect: post refused timing-control
module relay_post (clk, other, ride, rider, post);
    input            clk, other, ride;
    input      [7:0] rider;
    output reg [7:0] post;
    always @(posedge clk)
        if (ride) post <= @(posedge other) rider;
endmodule
