"""What became of a mutant, and the table of all."""

import json
from collections.abc import Iterable, Sequence
from dataclasses import asdict, dataclass
from enum import Enum

from rewriter.model.evidence import ProofResult
from rewriter.model.reasons import EvidenceKind
from rewriter.prove.module import ModuleProof
from tests.mutants.planting import Mutant
from tests.mutants.relation import Relation


class Fate(Enum):
    """What the prover said."""

    DISPROVED = "disproved"
    UNREAD = "differs, unread"  # the register is named, but nothing reads it, so nothing is disproved
    PROVED = "proved"
    OPEN = "undecided"


@dataclass(frozen=True)
class Answer:
    """What the prover said, whichever way it was asked.

    Args:
        fate: in a word.
        registers: those it names.
        overrides: cells it names because the override does not reach them, `definition.instance`.
        elsewhere: other things it names, each with what it says of them.
        wider: cells it says wake for nothing.
    """

    fate: Fate
    registers: frozenset[str]
    overrides: frozenset[str] = frozenset()
    elsewhere: tuple[tuple[str, str], ...] = ()
    wider: frozenset[tuple[str, str]] = frozenset()


@dataclass(frozen=True)
class Outcome:
    """One mutant and its fate.

    Args:
        mutant: which.
        answer: of the prover.
        named: the difference it names is at the faulty bank, and nowhere else.
        relation: what the solver says of the edges; None where the module alone cannot tell.
        wider: the prover reports the condition as wider than the assignments.
    """

    mutant: Mutant
    answer: Answer
    named: bool
    relation: Relation | None
    wider: bool

    @property
    def harmless(self) -> bool:
        """Say whether the mutant is shown to lose no edge."""
        return self.answer.fate is Fate.PROVED and self.relation is not None and self.relation.harmless

    @property
    def found(self) -> bool:
        """Say whether the prover catches it and points at the right place."""
        return self.answer.fate in (Fate.DISPROVED, Fate.UNREAD) and self.named

    @property
    def wrong(self) -> str:
        """Say what is wrong with the prover's answer; empty when it is right."""
        if self.answer.fate is Fate.DISPROVED and self.relation is not None and self.relation.harmless:
            return "a harmless mutant is disproved"
        return "" if self.harmless or self.found else f"{self.answer.fate.value}, named: {self.named}"


def of_module(definition: str, proof: ModuleProof) -> Answer:
    """Read the proof of one module."""
    cells = proof.cells.values()
    failing = [name for cell in cells if cell.kind is EvidenceKind.DISPROVED for name in cell.failing]
    dead = frozenset(name for cell in cells for name in cell.dead)
    elsewhere = tuple((finding.what, finding.detail) for finding in proof.findings)
    undecided = proof.undecided or any(cell.kind is EvidenceKind.UNDECIDED for cell in cells)
    fate = _fate([*failing, *elsewhere], undecided, dead)
    wider = frozenset((definition, cell.gating.name) for cell in cells if cell.wider)
    return Answer(fate, dead.union(failing), elsewhere=elsewhere, wider=wider)


def of_result(result: ProofResult, definitions: dict[str, str]) -> Answer:
    """Read a whole proof; `definitions` gives the module of each instance path."""
    disproved = [cell for cell in result.cells if cell.kind is EvidenceKind.DISPROVED]
    failing = [name for cell in disproved for name in cell.failing]
    dead = frozenset(name for cell in result.cells for name in cell.dead)
    others = [(m.what, m.detail) for m in result.mismatches if m.what != "override"]
    others += [(cell.cell, cell.reason) for cell in disproved if not cell.failing]
    undecided = result.undecided or result.unread or any(c.kind is EvidenceKind.UNDECIDED for c in result.cells)
    return Answer(
        _fate([*failing, *result.mismatches, *others], undecided, dead),
        dead.union(failing),
        # `u_icg_q: with the override active …` below the path of its module
        frozenset(
            f"{definitions.get(m.module, m.module)}.{m.detail.partition(':')[0]}"
            for m in result.mismatches
            if m.what == "override"
        ),
        tuple(others),
        frozenset((cell.definition, cell.cell) for cell in result.cells if cell.wider),
    )


def _fate(differs: Sequence[object], undecided: object, dead: frozenset[str]) -> Fate:
    if differs:
        return Fate.DISPROVED
    if undecided:
        return Fate.OPEN
    return Fate.UNREAD if dead else Fate.PROVED


_COLUMNS = (
    "planted", "disproved", "differs, unread", "right place named", "harmless by SAT: same", "wider", "loses x only",
    "reported wider", "unexplained",
)  # fmt: skip


def table(outcomes: Sequence[Outcome]) -> str:
    """Give the outcomes by kind, as Markdown."""
    kinds = list(dict.fromkeys(outcome.mutant.kind for outcome in outcomes))
    heads = ("mutant", *_COLUMNS)
    rows = [f"| {' | '.join(heads)} |", "| --- |" + " ---: |" * len(_COLUMNS)]
    rows += [_row(kind, [outcome for outcome in outcomes if outcome.mutant.kind == kind]) for kind in kinds]
    return "\n".join([*rows, _row("all", outcomes)]) + "\n"


def _row(name: str, outcomes: Sequence[Outcome]) -> str:
    fates = [_count(outcome.answer.fate is fate for outcome in outcomes) for fate in (Fate.DISPROVED, Fate.UNREAD)]
    named = _count(outcome.found for outcome in outcomes)
    harmless = [
        _count(outcome.harmless and outcome.relation is relation for outcome in outcomes)
        for relation in (Relation.SAME, Relation.WIDER, Relation.IDLE)
    ]
    reported = _count(outcome.harmless and outcome.relation is Relation.WIDER and outcome.wider for outcome in outcomes)
    numbers = [len(outcomes), *fates, named, *harmless, reported, _count(bool(outcome.wrong) for outcome in outcomes)]
    return f"| {name.replace('|', chr(92) + '|')} | " + " | ".join(map(str, numbers)) + " |"


def _count(facts: Iterable[bool]) -> int:
    return sum(1 for fact in facts if fact)


def as_json(outcomes: Sequence[Outcome]) -> str:
    """Give every outcome, as JSON."""
    return json.dumps(
        [
            asdict(outcome.mutant)
            | {
                "fate": outcome.answer.fate.value,
                "registers": sorted(outcome.answer.registers),
                "overrides": sorted(outcome.answer.overrides),
                "elsewhere": outcome.answer.elsewhere,
                "named": outcome.named,
                "relation": outcome.relation.value if outcome.relation else None,
                "wider": outcome.wider,
                "wrong": outcome.wrong,
            }
            for outcome in outcomes
        ],
        indent=1,
    )
