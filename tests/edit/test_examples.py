"""How a rewrite reads: whole small files, before and after."""

from pathlib import Path

from tests.edit.rewriting import rewrite_files

ENABLE = """\
module lamp_log (
    input  logic        clk,
    input  logic        rst_n,
    input  logic        sample,
    input  logic [15:0] level,
    output logic [15:0] last,
    output logic [15:0] peak      // highest since reset
);
    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) last <= '0;
        else if (sample) last <= level;

    always_ff @(posedge clk or negedge rst_n)
        if (!rst_n) peak <= '0;
        else if (sample && level > peak) peak <= level;
endmodule
"""

ENABLE_AFTER = """\
module lamp_log (
    input  logic        clk,
    input  logic        rst_n,
    input  logic        sample,
    input  logic [15:0] level,
    output logic [15:0] last,
    output logic [15:0] peak,      // highest since reset
    input  wire         test_en
);
    // stillclock: last sleeps unless it is written
    wire wake_last = sample;
    wire gclk_last;
    stillclock_icg u_icg_last (.clk(clk), .wake(wake_last), .test(test_en), .gclk(gclk_last));
    always_ff @(posedge gclk_last or negedge rst_n)
        if (!rst_n) last <= '0;
        else if (sample) last <= level;

    // stillclock: peak sleeps unless it is written
    wire wake_peak = sample && level > peak;
    wire gclk_peak;
    stillclock_icg u_icg_peak (.clk(clk), .wake(wake_peak), .test(test_en), .gclk(gclk_peak));
    always_ff @(posedge gclk_peak or negedge rst_n)
        if (!rst_n) peak <= '0;
        else if (sample && level > peak) peak <= level;
endmodule
"""

SPLIT = """\
module gate_keeper #(parameter int W = 24) (
    input  logic         clk, rst,
    input  logic         load_gain, load_offset,
    input  logic [W-1:0] bus,
    output logic [W-1:0] gain, offset,
    output logic [7:0]   beat
);
    // settings and heartbeat
    always_ff @(posedge clk) begin
        if (rst) begin
            gain <= '0; offset <= '0; beat <= '0;
        end else begin
            beat <= beat + 8'd1;
            // what the operator set
            if (load_gain)   gain   <= bus;
            if (load_offset) offset <= bus;
        end
    end
endmodule
"""

SPLIT_AFTER = """\
module gate_keeper #(parameter int W = 24) (
    input  logic         clk, rst,
    input  logic         load_gain, load_offset,
    input  logic [W-1:0] bus,
    output logic [W-1:0] gain, offset,
    output logic [7:0]   beat,
    input  wire          test_en
);
    // settings and heartbeat
    always_ff @(posedge clk) begin
        if (rst) begin
            beat <= '0;
        end else begin
            beat <= beat + 8'd1;
        end
    end
    // stillclock: gain sleeps unless it is written
    wire wake_gain = rst || load_gain;
    wire gclk_gain;
    stillclock_icg u_icg_gain (.clk(clk), .wake(wake_gain), .test(test_en), .gclk(gclk_gain));
    always_ff @(posedge gclk_gain) begin
        if (rst) begin
            gain <= '0;
        end else begin
            // what the operator set
            if (load_gain)   gain   <= bus;
        end
    end
    // stillclock: offset sleeps unless it is written
    wire wake_offset = rst || load_offset;
    wire gclk_offset;
    stillclock_icg u_icg_offset (.clk(clk), .wake(wake_offset), .test(test_en), .gclk(gclk_offset));
    always_ff @(posedge gclk_offset) begin
        if (rst) begin
            offset <= '0;
        end else begin
            if (load_offset) offset <= bus;
        end
    end
endmodule
"""

CASE = """\
module surge_meter (
    input  logic        clk, start,
    input  logic [1:0]  phase,
    input  logic [3:0]  op,
    input  logic [31:0] x,
    output logic [31:0] acc
);
    localparam logic [1:0] REST = 0, RUN = 1, EMIT = 2;
    always_ff @(posedge clk)
        unique case (phase)
            REST: if (start) acc <= x;
            RUN: casez (op)
                4'b1???: acc <= acc + x;
                4'b01??: acc <= acc ^ x;
                default: ;                 // hold
            endcase
            default: ;
        endcase
endmodule
"""

CASE_AFTER = """\
    // stillclock: acc sleeps unless it is written; the branches are those of its block
    logic wake_acc;
    always_comb begin
        wake_acc = 1'b0;
        case (phase)
            REST: if (start) wake_acc = 1'b1;
            RUN: casez (op)
                4'b1???: wake_acc = 1'b1;
                4'b01??: wake_acc = 1'b1;
                default: ;
            endcase
            default: ;
        endcase
    end
    wire gclk_acc;
    stillclock_icg u_icg_acc (.clk(clk), .wake(wake_acc), .test(test_en), .gclk(gclk_acc));
    always_ff @(posedge gclk_acc)
        unique case (phase)
"""

VERILOG = """\
module anchor_timer (clk, rst, arm, mode, limit, left);
    input clk, rst, arm;
    input [1:0] mode;
    input [11:0] limit;
    output [11:0] left;
    reg [11:0] left;
    always @(posedge clk)
        if (rst) left <= 0;
        else case (mode)
            2'd1: if (arm) left <= limit;
            2'd2: if (left != 0) left <= left - 1;
        endcase
endmodule

module anchor (clk, rst, arm, mode, limit, left);
    input clk, rst, arm;
    input [1:0] mode;
    input [11:0] limit;
    output [11:0] left;
    anchor_timer timer (clk, rst, arm, mode, limit, left);
endmodule
"""

VERILOG_AFTER = """\
module anchor_timer (clk, rst, arm, mode, limit, left, test_en);
    input wire test_en;
    input clk, rst, arm;
    input [1:0] mode;
    input [11:0] limit;
    output [11:0] left;
    reg [11:0] left;
    // stillclock: left sleeps unless it is written; the branches are those of its block
    function wake_left_f (input rst_i, arm_i, input [1:0] mode_i, input [11:0] left_i);
        begin
            wake_left_f = 1'b0;
            if (rst_i) wake_left_f = 1'b1;
            else case (mode_i)
                2'd1: if (arm_i) wake_left_f = 1'b1;
                2'd2: if (left_i != 0) wake_left_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_left = wake_left_f(rst, arm, mode, left);
    wire gclk_left;
    stillclock_icg u_icg_left (.clk(clk), .wake(wake_left), .test(test_en), .gclk(gclk_left));
    always @(posedge gclk_left)
        if (rst) left <= 0;
        else case (mode)
            2'd1: if (arm) left <= limit;
            2'd2: if (left != 0) left <= left - 1;
        endcase
endmodule

module anchor (clk, rst, arm, mode, limit, left, test_en);
    input wire test_en;
    input clk, rst, arm;
    input [1:0] mode;
    input [11:0] limit;
    output [11:0] left;
    anchor_timer timer (clk, rst, arm, mode, limit, left, test_en);
endmodule
"""


def test_an_enable_keeps_its_block(tmp_path: Path) -> None:
    done = rewrite_files(tmp_path, {"a.sv": ENABLE})
    assert done.text("a.sv") == ENABLE_AFTER
    assert {cell.instance: cell.wake_text for cell in done.rewrite.cells} == {
        "u_icg_last": "sample",
        "u_icg_peak": "sample && level > peak",
    }
    assert done.rewrite.test_ports == {"lamp_log": "test_en"}
    done.compile()


def test_a_block_is_split_with_its_comments(tmp_path: Path) -> None:
    done = rewrite_files(tmp_path, {"a.sv": SPLIT})
    assert done.text("a.sv") == SPLIT_AFTER
    done.compile()


def test_a_case_becomes_a_copy_of_its_branches(tmp_path: Path) -> None:
    done = rewrite_files(tmp_path, {"a.sv": CASE})
    assert CASE_AFTER in done.text("a.sv")
    done.compile()


def test_verilog_stays_verilog(tmp_path: Path) -> None:
    done = rewrite_files(tmp_path, {"a.v": VERILOG})
    assert done.text("a.v") == VERILOG_AFTER
    done.compile()


def test_a_second_run_changes_nothing(tmp_path: Path) -> None:
    done = rewrite_files(tmp_path, {"a.sv": ENABLE, "b.sv": SPLIT, "c.sv": CASE, "d.v": VERILOG, "top.sv": TOP})
    again = tmp_path / "again"
    again.mkdir()
    files: dict[str, str | bytes] = {name: done.data(name) for name in ("a.sv", "b.sv", "c.sv", "d.v", "top.sv")}
    cells: dict[str, str | bytes] = dict(done.rewrite.cell_files)
    second = rewrite_files(again, {**files, **cells}, "--top", "top")
    assert second.rewrite.files == ()
    assert second.rewrite.cell_files == {}


TOP = """\
module top (input logic clk, rst, go, input logic [1:0] m, input logic [31:0] x, output logic [31:0] y, z, a, b, c);
    logic [15:0] last, peak;
    logic [23:0] gain, offset;
    logic [7:0] beat;
    logic [31:0] acc;
    logic [11:0] left;
    lamp_log l (.clk, .rst_n(rst), .sample(go), .level(x[15:0]), .last, .peak);
    gate_keeper k (.clk, .rst, .load_gain(go), .load_offset(m[0]), .bus(x[23:0]), .gain, .offset, .beat);
    surge_meter s (.clk, .start(go), .phase(m), .op(x[3:0]), .x, .acc);
    anchor n (clk, rst, go, m, x[11:0], left);
    assign y = acc, z = {last, peak}, a = {8'd0, gain}, b = {offset, beat}, c = {20'd0, left};
endmodule
"""
