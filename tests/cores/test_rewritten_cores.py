"""What a rewrite of a real core must show before any simulation: enough gated, all proved, nothing else touched."""

from collections import Counter, defaultdict
from collections.abc import Callable
from pathlib import Path

import pytest

from tests.cores import diagnostics
from tests.cores.corpus import SITE
from tests.cores.rewriting import Rewritten, rewrite, stillclock

pytestmark = [pytest.mark.core, pytest.mark.engine, pytest.mark.slow]

Rewriter = Callable[[str], Rewritten]
CORES = ("picorv32", "vexriscv_full", "ibex")


# Least bits that must be gated, and the register bits outside arrays: the goal set for this tool, on these versions.
@pytest.mark.parametrize(
    "core, gated, bits", [("picorv32", 830, 1234), ("vexriscv_full", 1800, 2212), ("ibex", 1790, 2016)]
)
def test_enough_is_gated(core: str, gated: int, bits: int, rewritten: Rewriter) -> None:
    totals = rewritten(core).report["totals"]
    assert totals["gated_bits"] >= gated, totals
    assert totals["flop_bits"] >= bits, totals


@pytest.mark.parametrize("core", CORES)
def test_every_gated_bank_is_proved(core: str, rewritten: Rewriter) -> None:
    """An enable condition must prove on the module alone."""
    kinds = {bank.name: bank.evidence for bank in rewritten(core).banks}
    assert kinds
    assert set(kinds.values()) == {"proved"}, {name: kind for name, kind in kinds.items() if kind != "proved"}


@pytest.mark.parametrize("core", CORES)
def test_the_edits_are_all_that_changed(core: str, rewritten: Rewriter) -> None:
    done = rewritten(core)
    edits: dict[Path, list[tuple[int, int, bytes]]] = defaultdict(list)
    for edit in done.report["edits"]:
        text = edit["text"].encode("utf-8", "surrogateescape")
        edits[Path(edit["file"]).resolve()].append((edit["start"], edit["end"], text))
    for original, changed in done.changed:
        data = original.read_bytes()
        for start, end, text in sorted(edits.pop(original.resolve(), []), reverse=True):
            data = data[:start] + text + data[end:]
        assert data == changed.read_bytes(), changed.name
    assert not edits, f"edited, but not written: {list(edits)}"


@pytest.mark.parametrize("core", CORES)
def test_rewriting_again_changes_nothing(core: str, rewritten: Rewriter) -> None:
    ran = stillclock("rewrite", "--check", "--diff", "-F", str(rewritten(core).folder / "rtl.f"))
    assert ran.status == 0, ran.output[-3000:]


@pytest.mark.parametrize("core", CORES)
def test_slang_has_nothing_new_to_say(core: str, rewritten: Rewriter) -> None:
    done = rewritten(core)
    new = diagnostics.slang(done.folder / "rtl.f") - diagnostics.slang(done.folder / "original.f")
    assert not new, new


@pytest.mark.simulator
@pytest.mark.parametrize("core", CORES)
def test_verilator_has_nothing_new_to_say(core: str, rewritten: Rewriter) -> None:
    done = rewritten(core)
    assert "lint_off" not in "".join(edit["text"] for edit in done.report["edits"]), "a warning was silenced"
    new = diagnostics.verilator(done.folder / "rtl.f") - diagnostics.verilator(done.folder / "original.f")
    # Words of one variable on clocks of their own are what gating is for; the warning counts clocks, not drivers.
    apart = {register.partition("[")[0] for bank in done.banks for register in bank.registers if "[" in register}
    unexpected = [m for m in new if "MULTIDRIVEN" not in m or not any(m.rstrip("'").endswith(name) for name in apart)]
    assert not unexpected, unexpected


@pytest.mark.simulator
def test_one_clock_per_variable_leaves_verilator_nothing_new_to_say(tmp_path: Path) -> None:
    once = rewrite("ibex", tmp_path / "out", "--one-clock-per-variable")
    assert once.banks
    new = diagnostics.verilator(once.folder / "rtl.f") - diagnostics.verilator(once.folder / "original.f")
    assert not new, new


@pytest.mark.simulator
@pytest.mark.parametrize("tool", [diagnostics.slang, diagnostics.verilator])
def test_a_planted_warning_would_be_seen(tool: Callable[[Path], Counter[str]], tmp_path: Path) -> None:
    """The two checks above compare messages; here is a difference they must find."""
    text = (SITE / "pythondata_cpu_vexriscv" / "verilog" / "VexRiscv_Min.v").read_text(encoding="utf-8")
    found: list[Counter[str]] = []
    for folder, body in (("old", text), ("new", text.replace("endmodule", "wire [3:0] spare = 4'd100;\nendmodule", 1))):
        (tmp_path / folder).mkdir()
        (tmp_path / folder / "core.v").write_text(body, encoding="utf-8")
        (tmp_path / folder / "core.f").write_text("--top VexRiscv\ncore.v\n", encoding="utf-8")
        found.append(tool(tmp_path / folder / "core.f"))
    old, new = found
    assert new - old
    assert not old - new
