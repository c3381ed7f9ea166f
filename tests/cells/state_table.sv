// Walks a wrapper through every move of its inputs and compares it with the state table of the libraries' cells.
// Source: the `statetable` and `latch_posedge_precontrol` entries of the clock-gating cells in the Liberty files of
// the sky130, SG13G2, GF180 and ASAP7 libraries (rising form); the falling form is its mirror image.
`ifndef WRAPPER
`define WRAPPER stillclock_icg
`endif
`ifdef FALLING
`define LEVEL 1'b1
`else
`define LEVEL 1'b0
`endif
module state_table;
    reg clk, wake, test;
    wire gclk;
    `WRAPPER dut (.clk(clk), .wake(wake), .test(test), .gclk(gclk));

    reg latch, expected;
    reg [47:0] seen;  // one bit for each state (clk, wake, test, latch) and each of the three moves
    integer bad, step, move;
    reg [31:0] random;

    task look;
        begin
            #1;
            casez ({clk !== `LEVEL, wake, test})
                3'b000: latch = 1'b0;
                3'b001: latch = 1'b1;
                3'b01?: latch = 1'b1;
                default: ;
            endcase
            expected = latch ? clk : `LEVEL;
            if (gclk !== expected) begin
                bad = bad + 1;
                $display("clk %b wake %b test %b latch %b: gclk %b", clk, wake, test, latch, gclk);
            end
        end
    endtask

    initial begin
        bad = 0; seen = 0; random = 32'h1234_5678;
        clk = `LEVEL; wake = 0; test = 0;
        look;
        for (step = 0; step < 3000; step = step + 1) begin
            random = random ^ (random << 13);
            random = random ^ (random >> 17);
            random = random ^ (random << 5);
            move = random[15:0] % 3;
            seen[{clk, wake, test, latch} * 3 + move] = 1'b1;
            case (move)
                0: clk = ~clk;
                1: wake = ~wake;
                default: test = ~test;
            endcase
            look;
        end
        // Of the 16 states 12 exist: with the latch open, it follows wake or test. Each has three moves.
        $display("state-table bad %0d moves %0d", bad, $countones(seen));
        $finish;
    end
endmodule
