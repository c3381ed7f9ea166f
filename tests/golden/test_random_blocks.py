"""Random register blocks: rewritten, proved, simulated beside the original, and rewritten again.

One example is several modules below one top, since the engine starts once per proof.
"""

import re
import tempfile
from pathlib import Path
from random import Random

import pytest
from hypothesis import HealthCheck, Phase, given, settings
from hypothesis import strategies as st

from rewriter import flow
from rewriter.edit.cells import load_cell_map
from rewriter.model.reasons import EvidenceKind
from rewriter.model.run import Run
from tests.golden import compilers, lockstep
from tests.golden.compilers import Sources
from tests.golden.lockstep import Device
from tests.golden.ports import top_of
from tests.golden.random_blocks import Module, module, top

TOP = "random_top"
SIZE = 12  # modules per example
# Everything else that could be said of these blocks would be a register that the analysis loses.
FINE = {"never-holds", "never-written", "too-few-bits"}
SETTINGS = settings(
    max_examples=16,
    derandomize=True,
    database=None,
    deadline=None,
    phases=(Phase.explicit, Phase.generate),  # a failing example is small enough, and shrinking starts the engine often
    suppress_health_check=[HealthCheck.too_slow],
)


def examples() -> st.SearchStrategy[int]:
    """Give seeds: the blocks themselves are drawn evenly, not from the simplest on."""
    return st.integers(0, 2**32 - 1)


def drawn(seed: int) -> list[Module]:
    dice = Random(seed)  # noqa: S311 (no secret)
    return [module(f"u{number}", dice) for number in range(SIZE)]


def write(folder: Path, found: list[Module]) -> list[Path]:
    paths = [folder / "top.v"]
    paths[0].write_text(top(found), encoding="utf-8")
    for one in found:
        paths.append(folder / f"{one.name}.{'sv' if 'always_ff' in one.text else 'v'}")
        paths[-1].write_text(one.text, encoding="utf-8")
    return paths


def run(paths: list[Path], *, prove: bool) -> Run:
    arguments = (*map(str, paths), "--top", TOP)
    return flow.rewrite(flow.Job(arguments, load_cell_map("behavioural"), prove=prove), lambda _: None)


def rewritten(done: Run, paths: list[Path], folder: Path) -> list[Path]:
    """Write the rewritten files and the cells into a folder."""
    folder.mkdir()
    assert done.rewrite
    changes = {change.path: change.new for change in done.rewrite.files}
    for path in paths:
        (folder / path.name).write_bytes(changes.get(str(path), path.read_bytes()))
    for name, text in done.rewrite.cell_files.items():
        (folder / name).write_text(text, encoding="utf-8")
    return [folder / path.name for path in paths] + [folder / name for name in sorted(done.rewrite.cell_files)]


def simulated(gold: list[Path], gate: list[Path], folder: Path) -> dict[str, str]:
    """Compare both sides in Icarus, and give the first difference."""
    device = Device(TOP, top_of([*map(str, gold), "--top", TOP]), "test_en")
    traces: list[str] = []
    for side, files in (("gold", gold), ("gate", gate)):
        bench = folder / f"{side}_bench.v"
        bench.write_text(lockstep.bench([device], gate=side == "gate"), encoding="utf-8")
        sources = Sources(tuple(files), (), ())
        assert compilers.icarus_can([sources], folder, verilog=False, top=bench, output=f"{side}.vvp") == ""
        traces.append(compilers.simulate(f"{side}.vvp", folder))
    assert len(traces[0].splitlines()) > lockstep.CYCLES
    return lockstep.differences(*traces)


@pytest.mark.engine
@pytest.mark.simulator
@pytest.mark.slow
@SETTINGS
@given(examples())
def test_random_blocks(seed: int) -> None:
    with tempfile.TemporaryDirectory() as temporary:
        folder = Path(temporary)
        paths = write(folder, drawn(seed))
        done = run(paths, prove=True)
        assert done.plan.banks, "twelve modules without a bank"
        assert done.excluded == {}
        assert {done.kind(cell.id) for cell in done.plan.cells} == {EvidenceKind.PROVED}
        assert {refusal.reason.word for refusal in done.plan.refusals} <= FINE
        gate = rewritten(done, paths, folder / "gate")
        assert simulated(paths, gate, folder) == {}
        assert_bytes_outside_edits(done)
        assert run(gate, prove=False).plan.banks == ()


def assert_bytes_outside_edits(done: Run) -> None:
    assert done.rewrite
    for change in done.rewrite.files:
        at, text = 0, b""
        for edit in sorted(e for e in done.rewrite.edits if e.span.file == change.path):
            text += change.old[at : edit.span.start] + edit.text
            at = edit.span.end
        assert text + change.old[at:] == change.new


@pytest.mark.simulator
@settings(SETTINGS, max_examples=1)
@given(examples())
def test_the_bench_sees_a_bank_that_sleeps_too_long(seed: int) -> None:
    """A check that cannot fail is none: with a wake condition cut off, the traces must differ."""
    with tempfile.TemporaryDirectory() as temporary:
        folder = Path(temporary)
        paths = write(folder, drawn(seed))
        gate = rewritten(run(paths, prove=False), paths, folder / "gate")
        caught = 0
        broken = [path for path in gate if ".wake(wake_" in path.read_text(encoding="utf-8")][:6]
        for path in broken:
            sound = path.read_text(encoding="utf-8")
            path.write_text(re.sub(r"\.wake\(\w+\)", ".wake(1'b0)", sound, count=1), encoding="utf-8")
            caught += simulated(paths, gate, folder) != {}
            path.write_text(sound, encoding="utf-8")
        # A bank whose condition never comes true in the run is not missed; most are.
        assert len(broken) == 6
        assert caught >= 4
