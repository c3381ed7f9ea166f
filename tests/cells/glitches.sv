// Counts what a wrapper's clock does while its wake pin changes in every part of the cycle: pulses of a wrong shape,
// pulses in all, and cycles that asked for one before the active edge.
`ifdef FALLING
`define ACTIVE negedge
`define PASSIVE posedge
`define OPEN 1'b1
`else
`define ACTIVE posedge
`define PASSIVE negedge
`define OPEN 1'b0
`endif
`ifndef WRAPPER
`define WRAPPER stillclock_icg
`endif
module glitches;
    reg clk, wake, test;
    wire gclk;
    `WRAPPER dut (.clk(clk), .wake(wake), .test(test), .gclk(gclk));

    integer pulses, asked, misshapen, cycle;
    reg [31:0] random;
    time active_at;
    reg counting;

    always @(`ACTIVE gclk) if (counting) begin
        pulses = pulses + 1;
        if (active_at != $time) misshapen = misshapen + 1;
    end
    always @(`PASSIVE gclk) if (counting && clk !== `OPEN) misshapen = misshapen + 1;

    task draw;
        begin
            random = random ^ (random << 13);
            random = random ^ (random >> 17);
            random = random ^ (random << 5);
            wake = random[7];
            test = &random[13:11];
        end
    endtask

    initial begin
        counting = 0; pulses = 0; asked = 0; misshapen = 0; random = 32'hbeef_cafe;
        clk = `OPEN; wake = 0; test = 0; active_at = 0;
        #5 counting = 1;
        for (cycle = 0; cycle < 1000; cycle = cycle + 1) begin
            #1 draw;
            #2 draw;
            #2 if (wake || test) asked = asked + 1;
            active_at = $time;
            clk = ~`OPEN;
            if (cycle % 2) draw;  // in the same instant as the active edge
            #1 draw;
            #2 draw;
            #2 clk = `OPEN;
        end
        #1 $display("glitches pulses %0d asked %0d misshapen %0d", pulses, asked, misshapen);
        $finish;
    end
endmodule
