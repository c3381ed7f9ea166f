"""Golden cases: what each must become, read by three other tools, simulated beside the original, and proved."""

import re
from dataclasses import replace
from pathlib import Path

import pytest

from rewriter import flow
from rewriter.model.reasons import EvidenceKind
from tests.golden import compilers, lockstep
from tests.golden.cases import Case, Outcome, all_cases, unmet
from tests.golden.compilers import Sources
from tests.golden.conftest import Bench, GoldenBytes
from tests.golden.lockstep import Device
from tests.golden.ports import diagnostics, top_of
from tests.golden.proofs import Pair, prove_all

ALL = all_cases()
CASES = [pytest.param(case, id=case.name) for case in ALL]

# What a tool cannot read in the original; the lists are checked, so that a case does not drop out unseen.
NOT_FOR_ICARUS = {
    "enable/byte-order-mark": "a byte order mark",
    "enable/case-inside": "case inside",
    "enable/iff-and-if": "iff",
    "enable/iff-event": "iff",
    "enable/inside-operator": "inside",
    "enable/temporary-automatic": "automatic variables of a block",
    "enable/unique-and-priority": "unique if",
    "refusals/bind": "bind",
    "refusals/black-box": "a module without source",
    "refusals/disabled-function-local": "break",
}
NOT_FOR_VERILATOR = {
    "enable/iff-and-if": "iff",
    "enable/iff-event": "iff",
    "enable/inside-operator": "inside in a condition",
    "refusals/black-box": "a module without source",
    "refusals/blocking-and-nonblocking": "both kinds of assignment are an error",
    "refusals/comb-and-clocked-writer": "both kinds of assignment are an error",
    "refusals/increment-in-condition": "++ in an expression",
}
NOT_FOR_THE_ENGINE = {
    "enable/async-two-resets": "several asynchronous loads",
    "enable/escaped-identifiers": "escaped instance names",
}

# Its ports are named in bytes that are no UTF-8, which the top above all cases does not read.
ALONE = {"enable/latin-1"}

# Parts of one variable on different clocks are legal, and Verilator tells of them.
SPLIT_VARIABLES = {
    "enable/array-constant-elements",
    "enable/array-packed-elements",
    "enable/ascending-ranges",
    "enable/bit-selects",
    "enable/parameter-moves-the-cut",
    "enable/part-selects",
    "enable/self-assignment-slice",
    "enable/struct-fields",
    "enable/typed-elements",
    "refusals/two-writers-parts",
}

# Whether a register may change is more than whether it does: a later assignment may undo an earlier one, and while an
# asynchronous reset lasts a register without reset value holds. The prover tells of both.
WIDER = {"enable/async-empty-branch", "enable/last-write-wins"}


def gold_arguments(case: Case, bench: Bench) -> tuple[str, ...]:
    return (str(case.input), f"-I{case.folder}", *case.rtl_arguments(bench.cells))


def gate_arguments(outcome: Outcome, bench: Bench) -> tuple[str, ...]:
    return (
        str(outcome.input),
        f"-I{outcome.folder}",
        *map(str, outcome.cells),
        *outcome.case.rtl_arguments(bench.cells),
    )


def sources(case: Case, bench: Bench, outcome: Outcome | None = None) -> Sources:
    """Give what Icarus and Verilator read: library files and wrappers are plain files to them."""
    words = case.rtl_arguments(bench.cells)
    extra = tuple(Path(word) for word in words if not word.startswith(("-", "+")) and word.endswith(".v"))
    defines = tuple(re.sub(r"^(?:-D|\+define\+)", "", word) for word in words if word.startswith(("-D", "+define+")))
    own = (outcome.input, *outcome.cells) if outcome else (case.input,)
    return Sources((*own, *extra), (outcome.folder if outcome else case.folder,), defines)


def device(outcome: Outcome, bench: Bench) -> Device:
    top = top_of(gold_arguments(outcome.case, bench))
    pin = outcome.run.rewrite.test_ports.get(top.name) if outcome.run.rewrite else None
    return Device(outcome.case.name, top, None if pin in {port.name for port in top.ports} else pin)


@pytest.mark.parametrize("case", CASES)
def test_becomes_what_was_reviewed(case: Case, rewritten: Bench, golden_bytes: GoldenBytes) -> None:
    outcome = rewritten.outcome(case)
    assert case.expectations, "a case says what it is for: `// expect: REGISTER gated|left|refused`"
    assert list(unmet(outcome)) == []
    golden_bytes(case.folder / "expected.json", outcome.json().encode())
    if outcome.changed:
        golden_bytes(case.expected, outcome.text)
    assert outcome.changed == case.expected.is_file(), "an expected text without a change"


@pytest.mark.parametrize("case", CASES)
def test_bytes_outside_the_edits_are_the_same(case: Case, rewritten: Bench) -> None:
    outcome = rewritten.outcome(case)
    old, done, at = case.input.read_bytes(), b"", 0
    edits = outcome.run.rewrite.edits if outcome.run.rewrite else ()
    for edit in sorted(edits):
        assert at <= edit.span.start <= edit.span.end, "edits overlap"
        done += old[at : edit.span.start] + edit.text
        at = edit.span.end
    assert done + old[at:] == outcome.text


@pytest.mark.parametrize("case", CASES)
def test_a_second_run_changes_nothing(case: Case, rewritten: Bench) -> None:
    outcome = rewritten.outcome(case)
    if not outcome.changed:
        return
    job = case.job(gate_arguments(outcome, rewritten))
    assert flow.rewrite(job, lambda _: None).plan.banks == ()


@pytest.mark.parametrize("case", CASES)
def test_slang_finds_nothing_new(case: Case, rewritten: Bench) -> None:
    outcome = rewritten.outcome(case)
    before = diagnostics(("-Wextra", *gold_arguments(case, rewritten)))
    after = diagnostics(("-Wextra", *gate_arguments(outcome, rewritten)))
    assert set(after) - set(before) == set()


@pytest.mark.simulator
@pytest.mark.parametrize("case", CASES)
def test_icarus_reads_it(case: Case, rewritten: Bench, tmp_path: Path) -> None:
    outcome = rewritten.outcome(case)
    gold, gate = sources(case, rewritten), sources(case, rewritten, outcome)
    before = compilers.icarus_can([gold], tmp_path, verilog=gold.verilog, top=None, output="gold")
    assert bool(before) == (case.name in NOT_FOR_ICARUS), before
    if not before:
        assert compilers.icarus_can([gate], tmp_path, verilog=gate.verilog, top=None, output="gate") == ""


@pytest.mark.simulator
@pytest.mark.parametrize("case", CASES)
def test_verilator_warns_of_nothing_new(case: Case, rewritten: Bench, tmp_path: Path) -> None:
    outcome = rewritten.outcome(case)
    top = top_of(gold_arguments(case, rewritten)).name
    before = compilers.verilator(sources(case, rewritten), top, tmp_path)
    assert (before is None) == (case.name in NOT_FOR_VERILATOR)
    if before is not None:
        after = compilers.verilator(sources(case, rewritten, outcome), top, tmp_path)
        assert after is not None
        assert set(after) - set(before) == ({"MULTIDRIVEN"} if case.name in SPLIT_VARIABLES else set())


@pytest.mark.simulator
@pytest.mark.parametrize("case", [pytest.param(case, id=case.name) for case in ALL if case.name in SPLIT_VARIABLES])
def test_one_clock_per_variable_keeps_verilator_quiet(case: Case, rewritten: Bench, tmp_path: Path) -> None:
    """Without that option the parts run on clocks of their own (SPLIT_VARIABLES); with it no warning is new."""
    job = replace(case.job(gold_arguments(case, rewritten)), one_clock_per_variable=True)
    done = flow.rewrite(job, lambda _: None)
    assert {r.reason.word for r in done.plan.refusals} & {"several-clocks"}
    text = next((change.new for change in done.rewrite.files), case.input.read_bytes()) if done.rewrite else b""
    (tmp_path / case.input.name).write_bytes(text)
    top = top_of(gold_arguments(case, rewritten)).name
    gate = Sources((tmp_path / case.input.name, *sorted(rewritten.cells.iterdir())), (), ())
    before = compilers.verilator(sources(case, rewritten), top, tmp_path)
    after = compilers.verilator(gate, top, tmp_path)
    assert before is not None
    assert after is not None
    assert set(after) <= set(before)


@pytest.mark.simulator
def test_lockstep_in_icarus(rewritten: Bench, tmp_path: Path) -> None:
    """Every change is simulated beside its original, in six styles of reset, test pin and unknown inputs."""
    found: dict[str, str] = {}
    for verilog in (False, True):
        outcomes = [
            o for o in rewritten.changed() if o.case.name not in NOT_FOR_ICARUS and own_language(o, verilog=verilog)
        ]
        devices = [device(outcome, rewritten) for outcome in outcomes]
        traces: list[str] = []
        for gate in (False, True):
            bench = tmp_path / f"bench_{gate}.v"
            bench.write_text(lockstep.bench(devices, gate=gate), encoding="utf-8")
            side = [sources(o.case, rewritten, o if gate else None) for o in outcomes]
            said = compilers.icarus_can(distinct(side), tmp_path, verilog=verilog, top=bench, output=f"run_{gate}")
            assert said == ""
            traces.append(compilers.simulate(f"run_{gate}", tmp_path))
        assert len(traces[0].splitlines()) > 100 * len(devices)
        found |= lockstep.differences(*traces)
    assert found == {}


def own_language(outcome: Outcome, *, verilog: bool) -> bool:
    return (outcome.input.suffix == ".v") == verilog


def distinct(sides: list[Sources]) -> list[Sources]:
    """Name every wrapper once: each case brings its own, equal, copy."""
    seen: set[str] = set()
    kept: list[Sources] = []
    for side in sides:
        files = tuple(f for f in side.files if not f.name.startswith("stillclock_icg") or f.name not in seen)
        seen |= {f.name for f in files}
        kept.append(Sources(files, side.includes, side.defines))
    return kept


@pytest.mark.engine
def test_proved(rewritten: Bench, tmp_path: Path) -> None:
    """All cases below one top module, in one run of the engine."""
    outcomes = [
        o
        for o in rewritten.changed()
        if o.case.name not in (NOT_FOR_THE_ENGINE.keys() | ALONE) and not o.case.arguments
    ]
    pairs = [
        Pair(device(o, rewritten), gold_arguments(o.case, rewritten), (str(o.input), f"-I{o.folder}")) for o in outcomes
    ]
    pairs = [pair for pair in pairs if pair.device.top.ports]
    cells = {name: text for o in outcomes if o.run.rewrite for name, text in o.run.rewrite.cell_files.items()}
    result = prove_all(pairs, cells, tmp_path)
    names = {f"case_{number}": pair.device.name for number, pair in enumerate(pairs)}
    open_cells = [
        (case_of(c.cell, c.module, names), c.detail) for c in result.cells if c.kind is not EvidenceKind.PROVED
    ]
    wider = {case_of(c.cell, c.module, names) for c in result.cells if c.wider}
    assert (open_cells, result.mismatches, result.undecided, result.unread) == ([], (), (), ())
    assert wider == WIDER
    assert len(result.cells) >= len(pairs)


@pytest.mark.engine
@pytest.mark.parametrize(
    "case", [pytest.param(c, id=c.name) for c in ALL if c.arguments or c.name in (NOT_FOR_THE_ENGINE.keys() | ALONE)]
)
def test_proved_alone(case: Case, rewritten: Bench) -> None:
    """Cases with arguments of their own, and those in which the engine must be seen to fail."""
    if not rewritten.outcome(case).changed:
        return
    job = replace(case.job(gold_arguments(case, rewritten)), prove=True, allow_unproved=False)
    done = flow.rewrite(job, lambda _: None)
    if case.name in NOT_FOR_THE_ENGINE:
        assert {reason.word for reason in done.excluded.values()} == {"not-checked"}
    else:
        assert done.plan.banks
        assert {done.kind(cell.id) for cell in done.plan.cells} == {EvidenceKind.PROVED}


def case_of(cell: str, module: str, names: dict[str, str]) -> str:
    """Find the case of a cell in the top that instantiates them all."""
    found = re.search(r"case_\d+", f"{module}.{cell}")
    return names[found.group()] if found else f"{module}.{cell}"
