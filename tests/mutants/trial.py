"""Try the mutants of one rewrite.

`python -m tests.mutants.trial demo|picorv32 --out FOLDER` tries all of them and writes the table.
"""

import argparse
import os
import random
import sys
import time
from collections.abc import Sequence
from functools import cached_property
from pathlib import Path

from rewriter.logic.netlist import Netlist
from rewriter.model.evidence import ProofJob
from rewriter.prove import prove
from tests.cores.corpus import core, environment
from tests.mutants.asking import Chooser, Netlists
from tests.mutants.netlists import Rewired, choose, rewired, tied
from tests.mutants.outcomes import Answer, Fate, Outcome, as_json, of_module, of_result, table
from tests.mutants.planting import Mutant, Planted
from tests.mutants.relation import Relation
from tests.mutants.rewrites import Subject, subject, variable

_DEMO = Path(__file__).parents[2] / "templates" / "demo" / "demo.f"


class Trial:
    """One rewrite, elaborated once with all mutants in it."""

    def __init__(self, tried: Subject) -> None:
        self.subject = tried

    @cached_property
    def netlists(self) -> Netlists:
        """The whole prover, on the rewrite's netlist."""
        gold, gate = self.subject.sides
        return Netlists(self.subject.job, gold, choose(gate, 0), self._flat, self.subject.lemma)

    def _flat(self) -> tuple[Netlist, Netlist]:
        gold, gate = self.subject.flat
        return gold, choose(gate, 0)

    @cached_property
    def rewired(self) -> tuple[Rewired, ...]:
        """The mutants of edges, types and pins."""
        assert self.subject.run.rewrite is not None
        return tuple(rewired(self.netlists.good, self.subject.run.rewrite.test_ports))

    @cached_property
    def definitions(self) -> dict[str, str]:
        """The module of each instance."""
        return {path: module.definition for path, module in self.netlists.good.instances().items()}

    @cached_property
    def plain(self) -> Answer:
        """The answer without a mutant: it must be proved, and a cell that is too wide anyway says nothing."""
        answer = of_result(self.netlists.prove(lambda good: good), self.definitions)
        assert answer.fate is Fate.PROVED, answer
        return answer

    # -- three ways to ask about a mutant

    def as_text(self, job: ProofJob) -> Answer:
        """Elaborate and prove a text with one mutant."""
        return of_result(prove(job), self.definitions)

    def as_netlist(self, one: Planted | Rewired) -> Outcome:
        """Run the whole prover on the mutant's netlist."""
        change = one if isinstance(one, Rewired) else self._tied(one.mutant)
        answer = of_result(self.netlists.prove(change), self.definitions)
        # A test link must be found whatever it does to the edges: the rule is about the pin. Tied to a reset that the
        # condition asks for when inactive, it makes a cell that always runs, and is disproved all the same.
        asked = not one.mutant.kind.startswith("test link")
        return self.outcome(one.mutant, answer, self.netlists.relation(change(self.netlists.good)) if asked else None)

    def chosen(self, planted: Planted) -> Outcome:
        """Ask the solver with the mutant chosen; the comparison of the module is built once for all."""
        mutant = planted.mutant
        chooser = self._chooser(mutant.definition)
        if chooser.unchanged(mutant.number, mutant.cell):
            same = Answer(Fate.PROVED, frozenset(), wider=self.plain.wider)
            return self.outcome(mutant, same, Relation.SAME)
        proof = chooser.prove(mutant.number, mutant.cell)
        return self.outcome(mutant, of_module(mutant.definition, proof), chooser.relation(mutant.number))

    def outcome(self, mutant: Mutant, answer: Answer, relation: Relation | None) -> Outcome:
        """Judge an answer."""
        place = (mutant.definition, mutant.cell)
        wider = place in answer.wider and place not in self.plain.wider
        return Outcome(mutant, answer, self._named(mutant, answer), relation, wider)

    def _tied(self, mutant: Mutant) -> Rewired:
        """Choose a mutant in the netlist; modules that it does not stand in stay the same objects."""
        return Rewired(mutant, lambda module: tied(self.subject.sides[1].modules[module.name], mutant.number))

    def _chooser(self, definition: str) -> Chooser:
        if definition not in self._choosers:
            gold, gate = self.subject.sides
            name = next(name for name, module in gate.modules.items() if module.definition == definition)
            own = frozenset(variable for module, variable in self.subject.job.temporaries if module == definition)
            self._choosers[definition] = Chooser(gold.modules[name], gate.modules[name], own)
        return self._choosers[definition]

    @cached_property
    def _choosers(self) -> dict[str, Chooser]:
        return {}

    # -- is the right place named?

    def _named(self, mutant: Mutant, answer: Answer) -> bool:
        if mutant.kind.startswith("test link"):
            return set(answer.overrides) == self._below(mutant) and not answer.elsewhere and not answer.registers
        own = self.subject.registers[mutant.definition, mutant.cell]
        if mutant.kind.startswith("gclk driven"):
            # Both gated clocks are no longer what a cell drives, so what hangs on them has another clock altogether.
            named = {variable(what) for what, said in answer.elsewhere if said.startswith("clock")}
            return frozenset(named) == own | self._others(mutant)
        both = own | self._others(mutant) if mutant.kind.startswith("gclk exchanged") else own
        named = {variable(register) for register in answer.registers}
        return bool(named) and named <= both and not answer.elsewhere and not answer.overrides

    def _below(self, mutant: Mutant) -> set[str]:
        """Give the cells that a test link feeds: one cell, or all below an instance."""
        if "instance" not in mutant.kind:
            return {f"{mutant.definition}.{mutant.cell}"}
        paths = [path for path, definition in self.definitions.items() if definition == mutant.definition]
        below = [f"{path}.{mutant.cell}" for path in paths]
        reached = {d for path, d in self.definitions.items() if any(f"{path}.".startswith(f"{b}.") for b in below)}
        return {f"{d}.{cell}" for d, cell in self.subject.registers if d in reached}

    def _others(self, mutant: Mutant) -> frozenset[str]:
        return self.subject.registers[mutant.definition, mutant.what]


def trial(name: str) -> Trial:
    """Rewrite the demo or a core of the corpus."""
    os.environ.update(environment())
    return Trial(subject("-F", str(_DEMO)) if name == "demo" else subject(*core(name).arguments()))


def sample(found: Trial, count: int, seed: int) -> tuple[list[Planted], list[Rewired]]:
    """Choose mutants, as many of each sort as its share; a seed chooses."""
    chooser = random.Random(seed)  # noqa: S311 (no secret is made here)
    planted, links = list(found.subject.planted), list(found.rewired)
    share = round(count * len(links) / (len(planted) + len(links)))
    return chooser.sample(planted, count - share), chooser.sample(links, share)


def main(arguments: Sequence[str] | None = None) -> int:
    """Try all mutants and write the table."""
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("name")
    parser.add_argument("--out", type=Path, required=True)
    asked = parser.parse_args(arguments)
    found = trial(asked.name)
    asked.out.mkdir(parents=True, exist_ok=True)
    outcomes: list[Outcome] = []
    for name, some in (
        ("conditions", (found.chosen(one) for one in found.subject.planted)),
        ("links", (found.as_netlist(one) for one in found.rewired)),
    ):
        start = time.monotonic()
        outcomes += some
        sys.stderr.write(f"{asked.name}, {name}: {time.monotonic() - start:.0f} s\n")
        (asked.out / f"{asked.name}.json").write_text(as_json(outcomes), encoding="utf-8")
        (asked.out / f"{asked.name}.md").write_text(table(outcomes), encoding="utf-8")
    sys.stdout.write(table(outcomes))
    return 1 if any(outcome.wrong for outcome in outcomes) else 0


if __name__ == "__main__":
    raise SystemExit(main())
