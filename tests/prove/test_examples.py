"""Rewrites as they should read prove, on the module alone."""

import pytest

from rewriter.model.reasons import EvidenceKind
from tests.prove.harbour import answer, cell

pytestmark = pytest.mark.engine

ENABLE = """
module lamp (input logic clk, rst_n, flash, input logic [7:0] level, output logic [7:0] glow, peak{port});
    {a}always_ff @(posedge {ca} or negedge rst_n)
        if (!rst_n) glow <= '0; else if (flash) glow <= level;
    {b}always_ff @(posedge {cb} or negedge rst_n)
        if (!rst_n) peak <= '0; else if (flash && level > peak) peak <= level;
endmodule
"""


def icg(name: str, wake: str, *, clock: str = "clk", test: str = "test_en", cell: str = "stillclock_icg") -> str:
    return f"wire gclk_{name}; {cell} u_icg_{name} (.clk({clock}), .wake({wake}), .test({test}), .gclk(gclk_{name})); "


def test_enable() -> None:
    gold = ENABLE.format(port="", a="", ca="clk", b="", cb="clk")
    gate = ENABLE.format(
        port=", input wire test_en",
        a=icg("glow", "flash"), ca="gclk_glow",
        b=icg("peak", "flash && level > peak"), cb="gclk_peak",
    )  # fmt: skip
    result = answer(gold, gate)
    assert result.proved
    assert cell(result, "u_icg_glow").registers == ("glow",)
    assert cell(result, "u_icg_peak").kind is EvidenceKind.PROVED
    assert all(c.wider is None for c in result.cells)
    assert (result.registers, result.bits) == (2, 16)


def test_split_of_a_block_with_a_free_register() -> None:
    gold = """
    module lamp #(parameter int W = 12) (input logic clk, rst, set_on, set_off, input logic [W-1:0] bus,
                 output logic [W-1:0] on_time, off_time, output logic [3:0] tick);
        always_ff @(posedge clk)
            if (rst) begin on_time <= '0; off_time <= '0; tick <= '0; end
            else begin tick <= tick + 1; if (set_on) on_time <= bus; if (set_off) off_time <= bus; end
    endmodule"""
    gate = f"""
    module lamp #(parameter int W = 12) (input logic clk, rst, set_on, set_off, input logic [W-1:0] bus,
                 output logic [W-1:0] on_time, off_time, output logic [3:0] tick, input wire test_en);
        always_ff @(posedge clk) if (rst) tick <= '0; else tick <= tick + 1;
        {icg("on_time", "rst || set_on")}
        always_ff @(posedge gclk_on_time) if (rst) on_time <= '0; else if (set_on) on_time <= bus;
        {icg("off_time", "rst || set_off")}
        always_ff @(posedge gclk_off_time) if (rst) off_time <= '0; else if (set_off) off_time <= bus;
    endmodule"""
    result = answer(gold, gate)
    assert result.proved
    assert {c.cell: c.registers for c in result.cells} == {
        "u_icg_on_time": ("on_time",), "u_icg_off_time": ("off_time",)
    }  # fmt: skip


CASE = """
    case (phase)
        2'd1: if (arm) {one}
        2'd2: if (left != 0) {two}
        default: ;
    endcase"""


def test_case_with_a_function_in_verilog_below_the_top() -> None:
    gold = f"""
    module fuse (input clk, rst, arm, input [1:0] phase, input [9:0] limit, output reg [9:0] left);
        always @(posedge clk) if (rst) left <= 0; else {CASE.format(one="left <= limit;", two="left <= left - 1;")}
    endmodule
    module lamp (input clk, rst, arm, input [1:0] phase, input [9:0] limit, output [9:0] left);
        fuse f (clk, rst, arm, phase, limit, left);
    endmodule"""
    gate = f"""
    module fuse (input clk, rst, arm, input [1:0] phase, input [9:0] limit, output reg [9:0] left, input test_en);
        function wake_left_f (input rst, arm, input [1:0] phase, input [9:0] left); begin
            wake_left_f = 1'b0;
            if (rst) wake_left_f = 1'b1; else {CASE.format(one="wake_left_f = 1'b1;", two="wake_left_f = 1'b1;")}
        end endfunction
        {icg("left", "wake_left_f(rst, arm, phase, left)")}
        always @(posedge gclk_left)
            if (rst) left <= 0; else {CASE.format(one="left <= limit;", two="left <= left - 1;")}
    endmodule
    module lamp (input clk, rst, arm, input [1:0] phase, input [9:0] limit, output [9:0] left, input test_en);
        fuse f (clk, rst, arm, phase, limit, left, test_en);
    endmodule"""
    result = answer(gold, gate)
    assert result.proved
    assert (result.cells[0].module, result.cells[0].definition) == ("lamp.f", "fuse")


def test_equal_instances_share_a_proof_and_each_has_evidence() -> None:
    gold = """
    module slot (input logic clk, en, input logic [3:0] d, output logic [3:0] q);
        always_ff @(posedge clk) if (en) q <= d;
    endmodule
    module lamp (input logic clk, input logic [2:0] en, input logic [3:0] d, output logic [11:0] q);
        for (genvar i = 0; i < 3; i++) begin : gen slot s (.clk, .en(en[i]), .d, .q(q[4*i+:4])); end
    endmodule"""
    gate = (
        gold.replace("q);", "q, input wire test_en);")
        .replace(".q(q[4*i+:4])", ".q(q[4*i+:4]), .test_en")
        .replace("always_ff @(posedge clk)", icg("q", "en") + "always_ff @(posedge gclk_q)")
    )
    result = answer(gold, gate)
    assert result.proved
    assert [c.module for c in result.cells] == [f"lamp.gen[{i}].s" for i in range(3)]


def test_falling_edge_bank() -> None:
    gold = """module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] q);
        always_ff @(negedge clk) if (en) q <= d; endmodule"""
    gate = f"""module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] q, input wire test_en);
        {icg("q", "en", cell="stillclock_icg_n")} always_ff @(negedge gclk_q) if (en) q <= d; endmodule"""
    assert answer(gold, gate).proved


def test_nested_cells() -> None:
    gold = """module lamp (input logic clk, go, en, input logic [3:0] d, output logic [3:0] q, p);
        always_ff @(posedge clk) if (go) begin p <= d; if (en) q <= d; end endmodule"""
    gate = f"""module lamp (input logic clk, go, en, input logic [3:0] d, output logic [3:0] q, p, input wire test_en);
        {icg("p", "go")} {icg("q", "en", clock="gclk_p")}
        always_ff @(posedge gclk_p) if (go) p <= d;
        always_ff @(posedge gclk_q) if (go) if (en) q <= d; endmodule"""
    result = answer(gold, gate)
    assert result.proved
    assert cell(result, "u_icg_p").registers == ("p", "q")


def test_bank_behind_a_gate_that_was_there_before() -> None:
    gold = """
    module old_gate (input logic c, e, output logic o); logic l;
        always_latch if (!c) l = e; assign o = c & l; endmodule
    module lamp (input logic clk, day, en, input logic [3:0] d, output logic [3:0] q, p);
        logic dclk; old_gate g (.c(clk), .e(day), .o(dclk));
        logic armed; always_ff @(posedge clk) armed <= en;
        always_ff @(posedge dclk) begin p <= d; if (armed) q <= d; end endmodule"""
    gate = gold.replace("q, p);", "q, p, input wire test_en);").replace(
        "always_ff @(posedge dclk) begin p <= d; if (armed) q <= d; end",
        "always_ff @(posedge dclk) p <= d; "
        + icg("q", "armed", clock="dclk")
        + "always_ff @(posedge gclk_q) if (armed) q <= d;",
    )
    result = answer(gold, gate)
    assert result.proved  # the wake condition's register runs on the clock above the old gate: one domain


def test_local_copies_of_temporaries_are_ignored() -> None:
    gold = """module lamp (input logic clk, go, en, input logic [3:0] d, output logic [3:0] q, p);
        logic [3:0] t;
        always @(posedge clk) begin t = d ^ 4'd5; if (go) p <= t; if (en) q <= t + 1; end endmodule"""
    gate = f"""module lamp (input logic clk, go, en, input logic [3:0] d, output logic [3:0] q, p, input wire test_en);
        {icg("p", "go")} {icg("q", "en")}
        always @(posedge gclk_p) begin : bank_p reg [3:0] t; t = d ^ 4'd5; if (go) p <= t; end
        always @(posedge gclk_q) begin : bank_q reg [3:0] t; t = d ^ 4'd5; if (en) q <= t + 1; end endmodule"""
    result = answer(gold, gate)
    assert result.proved


def test_a_temporary_that_sleeps_with_its_block_is_named_but_disproves_nothing() -> None:
    gold = """module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] q);
        logic [3:0] t; always @(posedge clk) begin t = d + 1; if (en) q <= t; end endmodule"""
    gate = f"""module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] q, input wire test_en);
        logic [3:0] t; {icg("q", "en")}
        always @(posedge gclk_q) begin t = d + 1; if (en) q <= t; end endmodule"""
    result = answer(gold, gate, temporaries=frozenset({("lamp", "t")}))
    assert result.proved
    assert cell(result, "u_icg_q").dead == ("t",)
    assert cell(answer(gold, gate), "u_icg_q").failing == ("t",), "any other register must be equal, read or not"


def test_equal_wakes_are_found_and_others_are_not() -> None:
    gold = """module lamp (input logic clk, a, b, input logic d, output logic p, q, r);
        always_ff @(posedge clk) begin if (a && b) p <= d; if (!(!a || !b)) q <= d; if (a) r <= d; end endmodule"""
    gate = f"""module lamp (input logic clk, a, b, input logic d, output logic p, q, r, input wire test_en);
        {icg("p", "a && b")} {icg("q", "!(!a || !b)")} {icg("r", "a")}
        always_ff @(posedge gclk_p) if (a && b) p <= d;
        always_ff @(posedge gclk_q) if (!(!a || !b)) q <= d;
        always_ff @(posedge gclk_r) if (a) r <= d; endmodule"""
    result = answer(gold, gate)
    assert result.proved
    assert result.equal_wakes == (("lamp", "u_icg_p", "u_icg_q"),)


def test_a_wider_wake_is_a_finding_and_no_disproof() -> None:
    gold = """module lamp (input logic clk, a, b, input logic d, output logic p);
        always_ff @(posedge clk) if (a && b) p <= d; endmodule"""
    gate = f"""module lamp (input logic clk, a, b, input logic d, output logic p, input wire test_en);
        {icg("p", "a || b")} always_ff @(posedge gclk_p) if (a && b) p <= d; endmodule"""
    result = answer(gold, gate)
    assert result.proved
    wider = cell(result, "u_icg_p").wider
    assert wider is not None
    assert dict(wider.signals)["a"] != dict(wider.signals)["b"]


def test_word_of_an_array() -> None:
    gold = """module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] y);
        logic [3:0] step [4];
        always_ff @(posedge clk) begin step[0] <= d; if (en) step[1] <= step[0]; end
        assign y = step[1]; endmodule"""
    gate = f"""module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] y, input wire test_en);
        logic [3:0] step [4]; {icg("step_1", "en")}
        always_ff @(posedge clk) begin step[0] <= d; end
        always_ff @(posedge gclk_step_1) if (en) step[1] <= step[0];
        assign y = step[1]; endmodule"""
    result = answer(gold, gate)
    assert result.proved
    assert cell(result, "u_icg_step_1").registers == ("step",)


def test_reset_branch_that_leaves_a_register_alone() -> None:
    gold = """module lamp (input logic clk, rst_n, en, input logic [3:0] d, output logic [3:0] q, r);
        always_ff @(posedge clk or negedge rst_n)
            if (!rst_n) r <= '0; else begin if (en) q <= d; r <= d; end endmodule"""
    gate = f"""module lamp (input logic clk, rst_n, en, input logic [3:0] d, output logic [3:0] q, r,
                           input wire test_en);
        {icg("q", "rst_n && en")}
        always_ff @(posedge clk or negedge rst_n) if (!rst_n) r <= '0; else r <= d;
        always_ff @(posedge gclk_q) if (rst_n) if (en) q <= d; endmodule"""
    assert answer(gold, gate).proved
