"""The designs' own testbenches, written by others, on the rewritten RTL.

Source of the expected figures: the same benches on the unchanged RTL (bus log, cycles to the trap, number of tests).
"""

from collections.abc import Callable
from dataclasses import replace

import pytest

from tests.cores.edges import COUNT, EdgeCount, count_edges
from tests.cores.rewriting import Rewritten
from tests.cores.running import BenchRun, Rtl
from tests.cores.testbenches import CORES_WITH_BENCH, Benches

pytestmark = [pytest.mark.core, pytest.mark.bench, pytest.mark.simulator, pytest.mark.engine, pytest.mark.slow]

ALL_ARRAYS = ("logik_apbregs", "logik_cache")  # what holds in them are arrays written by a variable index
Rewriter = Callable[[str], Rewritten]


@pytest.mark.parametrize("core", CORES_WITH_BENCH)
def test_own_testbench_passes(core: str, rewritten: Rewriter, benches: Benches) -> None:
    """Passing means something only where cells were put in, so a rewrite without any fails too."""
    rewrite = rewritten(core)
    for bench in benches.of(core):
        run = bench(rewrite.rtl)
        assert run.passed, run.tail
    assert bool(rewrite.banks) == (core not in ALL_ARRAYS), rewrite.report["totals"]


@pytest.mark.parametrize("core", ["picorv32", "vexriscv_min"])
def test_own_testbench_passes_with_the_override_on(core: str, rewritten: Rewriter, benches: Benches) -> None:
    """Gated blocks keep their conditions, so a design whose cells all run behaves the same."""
    run = benches.of(core)[0](rewritten(core).rtl.with_override(1))
    assert run.passed, run.tail


# Measured with the first method: 49 % and 60 % left. The firmware's configuration keeps its multiplier always awake.
@pytest.mark.parametrize("core, most", [("picorv32", 0.55), ("picorv32_firmware", 0.65)])
def test_firmware_leaves_clock_edges_out(
    core: str, most: float, rewritten: Rewriter, benches: Benches, record_property: Callable[[str, object], None]
) -> None:
    """A bank that is always awake would count for nothing: the edges must really go."""
    edges = _edges(rewritten(core), benches, None)
    record_property("clock edges", _figures(edges))
    assert edges.left < most, _figures(edges)


def test_override_reaches_every_cell(rewritten: Rewriter, benches: Benches) -> None:
    """With the top-level pin high each cell pulses in each cycle (one may be lost or won at either end)."""
    edges = _edges(rewritten("picorv32_firmware"), benches, 1)
    asleep = [cell for cell in edges.cells if abs(cell.pulses - edges.cycles) > 1]
    assert not asleep, f"{edges.cycles} cycles: {asleep}"


def _edges(rewrite: Rewritten, benches: Benches, level: int | None) -> EdgeCount:
    ((_, changed),) = rewrite.changed
    run = _counted(benches, replace(rewrite.rtl, test_level=level))
    bits = int(rewrite.report["totals"]["flop_bits"])
    edges = count_edges(run.log, rewrite.banks, changed.read_text(encoding="utf-8"), bits)
    assert len(edges.cells) >= rewrite.report["totals"]["cells"], "a cell printed nothing"
    return edges


def _counted(benches: Benches, rtl: Rtl) -> BenchRun:
    run = benches.picorv32.firmware_verilator(replace(rtl, defines=(COUNT,)))
    assert run.passed, run.tail
    return run


def _figures(edges: EdgeCount) -> str:
    return (
        f"{edges.cycles} cycles, {edges.bits} bits, {len(edges.cells)} cells: "
        f"{edges.left:.1%} of all clock edges left, {edges.left_behind_cells:.1%} behind cells"
    )
