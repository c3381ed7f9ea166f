"""The fault planter itself, on a small rewritten design of our own: what it plants must be what it says."""

import re
from pathlib import Path

import pytest

from tests.cores.conditions import alternatives, conjunctions
from tests.cores.edges import CellCount, EdgeCount, count_edges, instance_modules
from tests.cores.faults import KINDS, Effect, Fault, all_faults, plant
from tests.cores.fragments import find_cells, sees
from tests.cores.rewriting import GatedBank
from tests.cores.running import run

TEXT = """\
module quay (input clk, rst, go, input [1:0] mode, input [7:0] tide, output reg [7:0] high, low, input wire test_en);
    // stillclock_icg u_icg_comment (.clk(clk), .wake(w), .test(t), .gclk(g)); is no cell
    wire wake_high = rst || (go && (mode == 2'd1 || mode == 2'd2));
    wire gclk_high;
    stillclock_icg u_icg_high (.clk(clk), .wake(wake_high), .test(test_en), .gclk(gclk_high));
    always @(posedge gclk_high)
        if (rst) high <= 0;
        else if (go && (mode == 2'd1 || mode == 2'd2)) high <= tide;
    generate if (1) begin : inner
        reg [7:0] last;
        wire wake_last = go;
        wire gclk_last;
        stillclock_icg_n u_icg_last (.clk(clk), .wake(wake_last), .test(test_en), .gclk(gclk_last));
        always @(negedge gclk_last) if (go) last <= tide;
    end endgenerate
    function wake_low_f (input rst, input [1:0] mode);
        begin
            wake_low_f = 1'b0;
            if (rst) wake_low_f = 1'b1;
            else case (mode)
                2'd3: wake_low_f = 1'b1;
            endcase
        end
    endfunction
    wire wake_low = wake_low_f(rst, mode);
    wire gclk_low;
    stillclock_icg u_icg_low (.clk(clk), .wake(wake_low), .test(test_en), .gclk(gclk_low));
    always @(posedge gclk_low)
        if (rst) low <= 0;
        else case (mode)
            2'd3: low <= tide;
        endcase
endmodule
"""
CELLS = """\
module stillclock_icg (input clk, wake, test, output gclk);
    reg q;
    always @* if (!clk) q = wake | test;
    assign gclk = clk & q;
endmodule
module stillclock_icg_n (input clk, wake, test, output gclk);
    reg q;
    always @* if (clk) q = wake | test;
    assign gclk = clk | ~q;
endmodule
"""
FAULTS = all_faults(TEXT, {"quay.u_icg_high": ("high",)})


def test_cells_are_found_with_their_parts() -> None:
    high, last, low = find_cells(TEXT)
    assert (high.instance, last.instance, low.instance) == ("u_icg_high", "u_icg_last", "u_icg_low")
    assert (high.falling, last.falling) == (False, True)
    assert high.condition is not None
    assert high.condition.of(TEXT) == "rst || (go && (mode == 2'd1 || mode == 2'd2))"
    assert [len(cell.wakes) for cell in (high, last, low)] == [0, 0, 2]
    assert [edge.of(TEXT) for edge in last.edges] == ["negedge"]


def test_nets_of_a_closed_scope_are_not_used() -> None:
    high, last, low = find_cells(TEXT)
    assert sees(TEXT, last, high)
    assert sees(TEXT, low, high)
    assert not sees(TEXT, low, last)
    assert not sees(TEXT, high, low)


def test_every_kind_is_planted() -> None:
    assert {fault.kind for fault in FAULTS} == set(KINDS)


@pytest.mark.parametrize(
    "fault, expected",
    [
        ("term-dropped:quay.u_icg_high:0", "wire wake_high = rst;"),
        ("term-dropped:quay.u_icg_high:1", "wire wake_high = rst || (go && (mode == 2'd2));"),
        ("reset-dropped:quay.u_icg_high:0", "wire wake_high = (go && (mode == 2'd1 || mode == 2'd2));"),
        ("term-inverted:quay.u_icg_high:2", "wire wake_high = rst || (go && (!(mode == 2'd1) || mode == 2'd2));"),
        ("and-for-or:quay.u_icg_high:1", "wire wake_high = rst || (go && (mode == 2'd1 && mode == 2'd2));"),
        ("or-for-and:quay.u_icg_high:0", "wire wake_high = rst || (go || (mode == 2'd1 || mode == 2'd2));"),
        ("wrong-clock:quay.u_icg_low:0", "u_icg_low (.clk(gclk_high), .wake(wake_low)"),
        ("wrong-edge:quay.u_icg_last:0", "always @(posedge gclk_last)"),
        ("no-latch:quay.u_icg_last:0", "assign gclk_last = clk | ~(wake_last | test_en);"),
        ("override-open:quay.u_icg_low:0", ".test()"),
        ("wrong-gclk:quay.u_icg_low:0", "always @(posedge gclk_high)\n        if (rst) low"),
    ],
)  # fmt: skip
def test_planted_text(fault: str, expected: str) -> None:
    found = next(candidate for candidate in FAULTS if candidate.id == fault)
    planted = found.plant(TEXT)
    assert expected in planted
    assert expected not in TEXT


@pytest.mark.parametrize("fault", FAULTS, ids=lambda fault: fault.id)
def test_each_fault_changes_one_line_only(fault: Fault) -> None:
    changed = [(a, b) for a, b in zip(TEXT.splitlines(), fault.plant(TEXT).splitlines(), strict=True) if a != b]
    assert len(changed) == 1


@pytest.mark.simulator
def test_each_fault_compiles(tmp_path: Path) -> None:
    (tmp_path / "cells.v").write_text(CELLS, encoding="utf-8")
    for fault in FAULTS:
        (tmp_path / "quay.v").write_text(fault.plant(TEXT), encoding="utf-8")
        ran = run(("iverilog", "-Wall", "-o", "quay.vvp", "quay.v", "cells.v"), tmp_path)
        assert ran.status == 0, f"{fault.id}: {ran.output}"
        assert "implicit" not in ran.output, f"{fault.id}: {ran.output}"


def test_the_choice_is_by_seed_and_spreads_over_kinds() -> None:
    chosen = plant(TEXT, {}, count=15, seed=7)
    assert chosen == plant(TEXT, {}, count=15, seed=7)
    assert len({fault.kind for fault in chosen}) == len(KINDS)
    assert [fault.id for fault in chosen] != [fault.id for fault in plant(TEXT, {}, count=15, seed=8)]
    assert len(plant(TEXT, {}, count=10_000)) == len(FAULTS)


def test_faults_name_their_registers() -> None:
    assert {fault.registers for fault in FAULTS if fault.bank == "quay.u_icg_high"} == {("high",)}


def test_override_faults_are_set_apart() -> None:
    assert {fault.kind for fault in FAULTS if fault.effect is Effect.OVERRIDE} == {"override-tied", "override-open"}


@pytest.mark.parametrize(
    "text, expected",
    [
        ("a || b", [["a", "b"]]),
        ("(a || b) && c", [["a", "b"]]),
        ("f(a || b)", []),  # an argument is no group of its own
        ("x ? a || b : c", []),  # the alternatives of a branch are not those of the whole
        ("a || b || (c | d)", [["a", "b", "(c | d)"]]),
        ("v[a || b]", []),
        ("!(a || b) && (c || d)", [["c", "d"]]),  # under a negation, leaving one out lets the cell run more
        ("~(x && (a || b))", []),
    ],
)
def test_alternatives(text: str, expected: list[list[str]]) -> None:
    assert [[operand.of(text) for operand in group] for group in alternatives(text)] == expected


def test_conjunctions_stand_alone() -> None:
    text = "a && b || (c && d)"
    assert [[operand.of(text) for operand in group] for group in conjunctions(text)] == [["c", "d"]]


def test_edges_are_weighed_with_bits() -> None:
    log = "stillclock-cycles 100\nstillclock-count TOP.q.u_icg_high 25\nstillclock-count TOP.q.inner.u_icg_last 50\n"
    banks = [_bank("high", 8), _bank("last", 4), _bank("high", 2)]
    edges = count_edges(log, banks, "module top; quay #(.W(f(8))) q (.clk(clk)); endmodule", 20)
    assert edges == EdgeCount(
        100, 20, (CellCount("TOP.q.u_icg_high", 10, 25), CellCount("TOP.q.inner.u_icg_last", 4, 50))
    )
    assert (edges.before, edges.after) == (2000, 10 * 25 + 4 * 50 + 6 * 100)


def test_instances_are_found_behind_parameters() -> None:
    text = "module quay; endmodule module top; quay a (); // quay b ();\n quay #(.W(2)) c [3:0] (); endmodule"
    assert instance_modules(text, ["quay"]) == {"a": "quay", "c": "quay"}


def test_planting_touches_nothing_else() -> None:
    fault = next(candidate for candidate in FAULTS if candidate.kind == "wake-inverted")
    assert re.sub(r"\.wake\(!", ".wake(", fault.plant(TEXT)) == TEXT


def _bank(name: str, bits: int) -> GatedBank:
    return GatedBank(name, "quay", f"u_icg_{name}", (name,), frozenset({bits}), "proved")
