// expect: buoy gated
module buoy_chain (
    input wire test_en,
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
    // stillclock: buoy sleeps unless it is written
    wire wake_buoy = drop;
    wire gclk_buoy;
    stillclock_icg u_icg_buoy (.clk(clk), .wake(wake_buoy), .test(test_en), .gclk(gclk_buoy));
    always_ff @(posedge gclk_buoy) if (drop) buoy <= depth;
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
    output logic [5:0] near, far,
    input  wire        test_en
);
    buoy_chain u_near (.test_en(test_en), 
        .clk(clk), .drop(drop), .depth(depth),
`ifdef WITH_SONAR
        .ping(1'b0), .echo(),
`endif
        .buoy(near)
`ifdef WITH_LIGHT
        , .light()
`endif
    );
    buoy_chain u_far (test_en, 
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
