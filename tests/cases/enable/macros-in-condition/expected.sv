// expect: plot gated
// expect: trace gated
`define BUSY(bus) (bus[3] | bus[0])
`define GO        start && !halt
`define WIDE      8
module plotter (
    input  logic             clk, rst,
    input  logic             start, halt,
    input  logic [3:0]       bus,
    input  logic [`WIDE-1:0] ink,
    output logic [`WIDE-1:0] plot,
    output logic [`WIDE-1:0] trace,
    input  wire              test_en
);
    // stillclock: plot sleeps unless it is written
    wire wake_plot = rst || (`BUSY(bus) && halt);
    wire gclk_plot;
    stillclock_icg u_icg_plot (.clk(clk), .wake(wake_plot), .test(test_en), .gclk(gclk_plot));
    always_ff @(posedge gclk_plot)
        if (rst) plot <= '0;
        else if (`BUSY(bus) && halt) plot <= ink;
    // stillclock: trace sleeps unless it is written
    wire wake_trace = bus == `WIDE || (`GO);
    wire gclk_trace;
    stillclock_icg u_icg_trace (.clk(clk), .wake(wake_trace), .test(test_en), .gclk(gclk_trace));
    always_ff @(posedge gclk_trace)
        if (bus == `WIDE || (`GO)) trace <= ink;
endmodule
