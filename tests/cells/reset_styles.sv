// A gated register beside its ungated twin, under the ways in which testbenches start a clock and a reset.
//   RESET 0: low by initialiser    1: low by a first statement    2: high, then pulsed low    3: by clocked statements
//   CLOCK 0: low by initialiser    1: low by a first statement    2: high by initialiser      3: unknown for a while
// The register wakes on `en` alone when its reset is asynchronous, and on the reset as well when it is synchronous.
`ifdef FALLING
`define EDGE negedge
`define WRAPPER stillclock_icg_n
`else
`define EDGE posedge
`define WRAPPER stillclock_icg
`endif
module twin #(parameter RESET = 0, parameter CLOCK = 0) (output reg [31:0] bad, output reg [31:0] unknown);
    generate
        if (CLOCK == 0) begin : c reg clk = 1'b0; end
        else if (CLOCK == 2) begin : c reg clk = 1'b1; end
        else begin : c reg clk; end
        if (RESET == 0) begin : r reg rst_n = 1'b0; end
        else begin : r reg rst_n; end
    endgenerate
    wire clk = c.clk;
    wire rst_n = r.rst_n;

    initial begin
        if (CLOCK == 1) c.clk = 1'b0;
        if (CLOCK == 3) #7 c.clk = 1'b0;
        forever #5 c.clk = ~c.clk;
    end
    initial begin
        case (RESET)
            1: r.rst_n = 1'b0;
            2: begin r.rst_n = 1'b1; #8 r.rst_n = 1'b0; end
            3: begin r.rst_n <= 1'b0; @(`EDGE c.clk); end
            default: ;
        endcase
        repeat (2) @(`EDGE c.clk);
        if (RESET == 3) r.rst_n <= 1'b1;
        else #2 r.rst_n = 1'b1;
    end

    reg en;
    reg [7:0] d;
    reg [7:0] async_gold, async_gate, sync_gold, sync_gate;
    wire async_clk, sync_clk;
    // The test pin stays open, as it does in a testbench that was written before there was one.
    `WRAPPER u_async (.clk(clk), .wake(en), .test(), .gclk(async_clk));
    `WRAPPER u_sync (.clk(clk), .wake(en | ~rst_n), .test(), .gclk(sync_clk));
    always @(`EDGE clk or negedge rst_n) if (!rst_n) async_gold <= 8'h5a; else if (en) async_gold <= d;
    always @(`EDGE async_clk or negedge rst_n) if (!rst_n) async_gate <= 8'h5a; else if (en) async_gate <= d;
    always @(`EDGE clk) if (!rst_n) sync_gold <= 8'ha5; else if (en) sync_gold <= d;
    always @(`EDGE sync_clk) if (!rst_n) sync_gate <= 8'ha5; else if (en) sync_gate <= d;

    integer cycle;
    initial begin
        bad = 0; unknown = 0; en = 1'b0; d = 8'h00;
        for (cycle = 0; cycle < 40; cycle = cycle + 1) begin
            @(`EDGE c.clk);
            if (cycle >= 4) begin
                en <= (cycle % 3) == 0;
                d <= d + 8'd37;
            end
            #3;
            if (cycle >= 2 && async_gold !== async_gate) bad = bad + 1;
            if (cycle >= 2 && sync_gold !== sync_gate) bad = bad + 1;
            if (cycle >= 2 && (^async_gold === 1'bx || ^sync_gold === 1'bx)) unknown = unknown + 1;
        end
    end
endmodule

module reset_styles;
    genvar i, j;
    generate
        for (i = 0; i < 4; i = i + 1) begin : reset
            for (j = 0; j < 4; j = j + 1) begin : clock
                wire [31:0] bad, unknown;
                twin #(.RESET(i), .CLOCK(j)) t (.bad(bad), .unknown(unknown));
                initial begin
                    #1000 $display("reset %0d clock %0d bad %0d unknown %0d", i, j, bad, unknown);
                end
            end
        end
    endgenerate
    initial #1001 $finish;
endmodule
