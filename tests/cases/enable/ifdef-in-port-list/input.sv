// expect: buoy gated
module buoy_chain (
    input  logic       clk,
    input  logic       drop,
    input  logic [5:0] depth,
`ifdef WITH_SONAR
    input  logic       ping,
    output logic       echo,
`endif
    output logic [5:0] buoy
`ifdef WITH_LIGHT
    , output logic     light
`endif
);
    always_ff @(posedge clk) if (drop) buoy <= depth;
`ifdef WITH_SONAR
    assign echo = ping;
`endif
`ifdef WITH_LIGHT
    assign light = |buoy;
`endif
endmodule
module buoy_field (
    input  logic       clk, drop,
    input  logic [5:0] depth,
    output logic [5:0] near, far
);
    buoy_chain u_near (
        .clk(clk), .drop(drop), .depth(depth),
`ifdef WITH_SONAR
        .ping(1'b0), .echo(),
`endif
        .buoy(near)
`ifdef WITH_LIGHT
        , .light()
`endif
    );
    buoy_chain u_far (
        clk, drop, ~depth,
`ifdef WITH_SONAR
        1'b0, ,
`endif
        far
`ifdef WITH_LIGHT
        ,
`endif
    );
endmodule
