"""Bring the prover's answers back to the banks of the plan."""

import re
from collections.abc import Iterator, Mapping

from rewriter.model.design import Design, Note
from rewriter.model.evidence import CellEvidence, Mismatch, ProofResult
from rewriter.model.plan import Bank, BlockId, RegisterId
from rewriter.model.reasons import PAGES, EvidenceKind, Reason, Verdict
from rewriter.model.rewrite import Rewrite
from rewriter.model.run import Run

_INDEX = re.compile(r"\[-?\d+\]")
_WORDS = {
    EvidenceKind.DISPROVED: "disproved",
    EvidenceKind.UNDECIDED: "undecided",
    EvidenceKind.NOT_CHECKED: "not-checked",
    EvidenceKind.UNPROVED: "not-checked",
}
_OPEN = {"undecided", "not-checked"}


def pair(design: Design, done: Rewrite, result: ProofResult) -> dict[str, tuple[CellEvidence, ...]]:
    """Pair the evidence of elaborated cells with the cells of the plan, all generate indices together.

    Where the engine keeps instances apart, a cell is known by its definition; where it had to flatten them, by its
    whole path.
    """
    by_place: dict[tuple[str, str], list[CellEvidence]] = {}
    by_path: dict[str, list[CellEvidence]] = {}
    for evidence in result.cells:
        by_place.setdefault((evidence.definition, _INDEX.sub("", evidence.cell)), []).append(evidence)
        by_path.setdefault(_INDEX.sub("", f"{evidence.module}.{evidence.cell}"), []).append(evidence)
    instances = {
        name: {_INDEX.sub("", path) for m in design.modules if m.definition == name for path in m.instances}
        for name in {cell.definition for cell in done.cells}
    }
    found: dict[str, tuple[CellEvidence, ...]] = {}
    for cell in done.cells:
        path = _INDEX.sub("", ".".join(part for part in (cell.scope.strip("."), cell.instance) if part))
        apart = by_place.get((cell.definition, path), [])
        flat = [e for above in sorted(instances[cell.definition]) for e in by_path.get(f"{above}.{path}", ())]
        found[cell.cell] = (*apart, *(e for e in flat if e not in apart))
    return found


def rejected(run: Run, *, allow_unproved: bool) -> dict[RegisterId, Reason]:
    """Give the registers that the proof sends back, with the reason; none when no engine was asked.

    A register on its original clock that differs was harmed by the rewrite of its block, so the banks of the
    block go back: the rest of the design need not suffer.
    """
    if run.proof is None:
        return {}
    harmed = {
        register: Reason("disproved", f"the rewrite of its block changes {mismatch.detail}")
        for mismatch in run.proof.mismatches
        for block in _blocks(run, mismatch)
        for bank in run.plan.banks
        if bank.block == block
        for register in bank.registers
    }
    objections = ((bank, _objection(run, bank, allow_unproved=allow_unproved)) for bank in run.plan.banks)
    return harmed | {register: reason for bank, reason in objections if reason for register in bank.registers}


def _blocks(run: Run, mismatch: Mismatch) -> Iterator[BlockId]:
    """Give the rewritten blocks that write the register of a mismatch."""
    definitions = {module.definition for module in run.design.modules if mismatch.module in module.instances}
    variable = _INDEX.sub("", mismatch.what)
    for plan in run.plan.blocks:
        parts = (part for register in plan.rest for part in register.parts)
        inside = plan.block.definition in definitions and bool(plan.banks)
        if inside and any(_INDEX.sub("", part.variable) == variable for part in parts):
            yield plan.block


def _objection(run: Run, bank: Bank, *, allow_unproved: bool) -> Reason | None:
    """Give why a bank must not be written, None when it may."""
    seen = run.evidence.get(bank.cell, ())
    if not seen:
        return None if allow_unproved else Reason("not-checked", _unread(run, bank))
    reasons = [reason for evidence in seen if (reason := _reason(evidence) or _own_dead(evidence, bank))]
    hard = [reason for reason in reasons if reason.word not in _OPEN]
    return next(iter(hard or ([] if allow_unproved else reasons)), None)


def _unread(run: Run, bank: Bank) -> str:
    """Say why the engine did not meet a bank's cell: it could not read the module, or one above it."""
    instances = {path for m in run.design.modules if m.definition == bank.block.definition for path in m.instances}
    for path, message in run.proof.unread if run.proof else ():
        if any(instance == path or instance.startswith(f"{path}.") for instance in instances):
            return f"the engine could not read {path}: {message}"
    return "the engine did not meet its cell"


def _reason(evidence: CellEvidence) -> Reason | None:
    page = PAGES.get(evidence.reason)
    word = evidence.reason if page and page.verdict is Verdict.REFUSED else _WORDS.get(evidence.kind)
    return Reason(word, evidence.detail) if word else None


def _own_dead(evidence: CellEvidence, bank: Bank) -> Reason | None:
    """Refuse a bank whose own register differs, although nothing reads it: only temporaries may sleep unseen."""
    dead = {_INDEX.sub("", name) for name in evidence.dead}
    own = {part.variable for register in bank.registers for part in register.parts}
    return Reason("disproved", f"{min(dead & own)} differs, though nothing reads it") if dead & own else None


def rejection_warnings(run: Run, back: Mapping[RegisterId, Reason]) -> Iterator[Note]:
    """Say which banks the proof sends back, each counterexample once."""
    shown: set[str] = set()
    for bank in run.plan.banks:
        reason = back.get(bank.registers[0])
        if reason is None:
            continue
        head = f"bank {bank.name} is left out, {reason.word}" + (f": {reason.detail}" if reason.detail else "")
        table = _example(run, bank, reason)
        yield Note(head if not table or table in shown else f"{head}\n{table}", help=_way_out(bank, reason))
        shown.add(table)


def _example(run: Run, bank: Bank, reason: Reason) -> str:
    """Give the counterexample of a bank, or of what its rewrite harmed; empty without."""
    own = run.evidence.get(bank.cell, ())
    outside = run.proof.mismatches if run.proof and reason.word == "disproved" else ()
    return next((found.counterexample.table() for found in (*own, *outside) if found.counterexample), "")


def _way_out(bank: Bank, reason: Reason) -> str:
    page = f"`stillclock explain {reason.word}` says more"
    if reason.word == "disproved" and bank.method == "enable":
        return f"an enable written in the block always proves, so this is a fault of stillclock: report it; {page}"
    return page


def waived(run: Run) -> Iterator[Note]:
    """Say loudly what is gated without proof."""
    by_kind: dict[EvidenceKind, list[str]] = {}
    for bank in run.unproved_banks:
        by_kind.setdefault(run.kind(bank.cell), []).append(bank.name)
    for kind, names in by_kind.items():
        count = "1 bank is" if len(names) == 1 else f"{len(names)} banks are"
        yield Note(
            f"{count} gated WITHOUT PROOF ({kind.value}): {', '.join(names)}",
            help="run `stillclock prove` before you rely on the rewrite",
        )
