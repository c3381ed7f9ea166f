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
    output logic [`WIDE-1:0] trace
);
    always_ff @(posedge clk)
        if (rst) plot <= '0;
        else if (`BUSY(bus) && halt) plot <= ink;
    always_ff @(posedge clk)
        if (bus == `WIDE || (`GO)) trace <= ink;
endmodule
