"""How many planted faults a design's own testbench kills, and how many the proof kills.

`python -m tests.cores.killrate CORE --out FOLDER` rewrites a core, plants the faults, and writes the table.
"""

import argparse
import json
import sys
from collections.abc import Callable, Sequence
from dataclasses import asdict, dataclass, replace
from pathlib import Path

from tests.cores.faults import KINDS, Effect, Fault, plant
from tests.cores.proving import Proof, Prover
from tests.cores.rewriting import Rewritten, rewrite
from tests.cores.running import BenchRun, Rtl
from tests.cores.testbenches import Bench, set_up

HANG = 15.0  # seconds; without a fault every simulation ends within two
Asker = Callable[[Fault, str], Proof]


@dataclass(frozen=True)
class Outcome:
    """What became of one fault.

    Attributes:
        bench: the testbench that killed it; None when all passed.
        how: `wrong` or `hung`; empty when it survived.
        proof: what the proof said; None when it was not asked.
        seconds: time of the testbenches.
    """

    id: str
    kind: str
    effect: Effect
    before: str
    after: str
    bench: str | None
    how: str
    proof: Proof | None
    seconds: float


@dataclass(frozen=True)
class Workplace:
    """Where faults are tried: the rewritten file they go into, and the benches that must pass without one."""

    rtl: Rtl
    original: Path
    text: str
    folder: Path
    benches: tuple[Bench, ...]

    def with_text(self, text: str) -> Rtl:
        """Write the text, and give the RTL with it in the place of the rewritten file."""
        self.folder.mkdir(parents=True, exist_ok=True)
        path = self.folder / self.original.name
        path.write_text(text, encoding="utf-8")
        others = tuple(pair for pair in self.rtl.replaced if pair[0] != self.original)
        return replace(self.rtl, replaced=((self.original, path), *others))


def workplace(rewritten: Rewritten, benches: tuple[Bench, ...], folder: Path) -> Workplace:
    """Set up for a rewrite that changed one file, with the override held off, as a fault may cut the test pin off."""
    ((original, changed),) = rewritten.changed
    return Workplace(rewritten.rtl.with_override(0), original, changed.read_text(encoding="utf-8"), folder, benches)


def check_baseline(place: Workplace) -> None:
    """Fail unless every bench passes without a fault: a bench that fails anyway kills nothing."""
    for bench in place.benches:
        run = bench(place.with_text(place.text))
        assert run.passed, f"without a fault: {run.tail}"


def try_fault(place: Workplace, fault: Fault, prover: Asker | None = None) -> Outcome:
    """Run the benches on one fault, quickest first, until one kills it; ask the prover in any case."""
    text = fault.plant(place.text)
    rtl = place.with_text(text)
    seconds = 0.0
    killer: BenchRun | None = None
    for bench in place.benches:
        run = bench(rtl)
        assert run.built, f"{fault.id} does not build, so it says nothing about a bench:\n{run.tail}"
        seconds += run.seconds
        if not run.passed:
            killer = run
            break
    return Outcome(
        id=fault.id,
        kind=fault.kind,
        effect=fault.effect,
        before=fault.before,
        after=fault.changes[0].text,
        bench=killer.bench if killer else None,
        how="" if killer is None else "hung" if killer.hung else "wrong",
        proof=None if prover is None else prover(fault, text),
        seconds=round(seconds, 1),
    )


def kill_rate(place: Workplace, faults: Sequence[Fault], prover: Asker | None = None) -> tuple[Outcome, ...]:
    """Try every fault, after the benches passed without one."""
    check_baseline(place)
    return tuple(try_fault(place, fault, prover) for fault in faults)


def table(outcomes: Sequence[Outcome]) -> str:
    """Give the outcomes by kind, as Markdown."""
    rows = [
        "| fault | what it can break | planted | killed by the testbench | by the proof | right place named |",
        "| --- | --- | ---: | ---: | ---: | ---: |",
    ]
    for kind, (effect, _) in KINDS.items():
        chosen = [outcome for outcome in outcomes if outcome.kind == kind]
        if chosen:
            rows.append(_row(kind, effect, chosen))
    rows.append(_row("all", "", outcomes))
    return "\n".join(rows) + "\n"


def _row(name: str, effect: str, outcomes: Sequence[Outcome]) -> str:
    answers = [outcome.proof for outcome in outcomes if outcome.proof is not None]
    killed = sum(1 for outcome in outcomes if outcome.bench)
    proof = str(sum(1 for answer in answers if answer.verdict)) if answers else "not asked"
    named = str(sum(1 for answer in answers if answer.named)) if answers else "not asked"
    return f"| {name} | {effect} | {len(outcomes)} | {killed} | {proof} | {named} |"


def as_json(core: str, seed: int, outcomes: Sequence[Outcome]) -> str:
    """Give every outcome, as JSON."""
    return json.dumps({"core": core, "seed": seed, "outcomes": [asdict(outcome) for outcome in outcomes]}, indent=2)


def main(arguments: Sequence[str] | None = None) -> int:
    """Rewrite, plant, try and write the table."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("core")
    parser.add_argument("--out", type=Path, required=True)
    parser.add_argument("--count", type=int, default=50)
    parser.add_argument("--seed", type=int, default=1)
    asked = parser.parse_args(arguments)
    rewritten = rewrite(asked.core, asked.out / "rewritten")
    place = workplace(rewritten, set_up(asked.out).of(asked.core, HANG), asked.out / "faulty")
    faults = plant(place.text, rewritten.registers, count=asked.count, seed=asked.seed)
    outcomes = kill_rate(place, faults, Prover(rewritten, asked.out))
    (asked.out / "outcomes.json").write_text(as_json(asked.core, asked.seed, outcomes), encoding="utf-8")
    (asked.out / "table.md").write_text(table(outcomes), encoding="utf-8")
    sys.stdout.write(table(outcomes))
    return 0


if __name__ == "__main__":
    raise SystemExit(main())
