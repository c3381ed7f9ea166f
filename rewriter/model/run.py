"""What one run found out: everything that reports are made of."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from rewriter.model.design import Design, Note
from rewriter.model.evidence import CellEvidence, ProofResult
from rewriter.model.plan import Bank, Plan, RegisterId, Settled
from rewriter.model.reasons import EvidenceKind, Reason
from rewriter.model.rewrite import Rewrite, TestPin

WORST_FIRST = (
    EvidenceKind.DISPROVED,
    EvidenceKind.NOT_CHECKED,
    EvidenceKind.UNDECIDED,
    EvidenceKind.UNPROVED,
    EvidenceKind.SIMULATED,
    EvidenceKind.FROM_RESET,
    EvidenceKind.UNDER_TOP,
    EvidenceKind.PROVED,
)


@dataclass(frozen=True)
class Run:
    """Hold the outcome of all stages.

    Args:
        design: as read.
        settled: every register once.
        plan: the last one chosen, which the proof did not object to.
        rewrite: None when nothing was edited (a survey).
        proof: None when no engine was asked, or there was nothing to prove.
        evidence: by cell of the plan (`Cell.id`), over all its instances.
        excluded: registers that came back, with the reason.
        warnings: everything that was noticed on the way, in order.
        seconds: where the time went, by stage.
        test_pins: existing pins that the user named.
    """

    design: Design
    settled: Settled
    plan: Plan
    rewrite: Rewrite | None = None
    proof: ProofResult | None = None
    evidence: Mapping[str, tuple[CellEvidence, ...]] = field(default_factory=dict[str, tuple[CellEvidence, ...]])
    excluded: Mapping[RegisterId, Reason] = field(default_factory=dict[RegisterId, Reason])
    warnings: tuple[Note, ...] = ()
    seconds: Mapping[str, float] = field(default_factory=dict[str, float])
    test_pins: tuple[TestPin, ...] = ()

    def kind(self, cell: str) -> EvidenceKind:
        """Give the weakest evidence of a cell's instances."""
        kinds = {evidence.kind for evidence in self.evidence.get(cell, ())}
        return next((kind for kind in WORST_FIRST if kind in kinds), EvidenceKind.UNPROVED)

    @property
    def unproved_banks(self) -> tuple[Bank, ...]:
        """Give the gated banks that nothing stands behind."""
        weak = {EvidenceKind.NOT_CHECKED, EvidenceKind.UNDECIDED, EvidenceKind.UNPROVED, EvidenceKind.SIMULATED}
        return tuple(bank for bank in self.plan.banks if self.kind(bank.cell) in weak)
