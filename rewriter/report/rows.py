"""The rows that text and JSON reports share: cells, banks and registers, and their totals."""

from collections import Counter
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from rewriter.model.design import Design
from rewriter.model.plan import Bank, Cell, Occurrence, Proposal, Refusal, RegisterId
from rewriter.model.reasons import EvidenceKind, Verdict
from rewriter.model.run import Run
from rewriter.model.source import Span

ARRAY = "array"


@dataclass(frozen=True)
class Where:
    """Say where something stands: file and 1-based line."""

    file: str
    line: int


@dataclass(frozen=True)
class OccurrenceRow:
    """One module body and generate scope: how many instances share it, and the bits in each of them."""

    module: str
    scope: str
    instances: int
    bits: int


@dataclass(frozen=True)
class BankRow:
    """One bank, or one register that is in none.

    Args:
        bits: of the widest occurrence; `total_bits` is over all of them.
        cell: the cell's id, empty for registers that keep their clock.
        wake: the wake condition as text, empty when none was found.
        reason, detail: why it is not gated, empty for a gated bank.
        kind: what stands behind a gated bank, None for others.
        held: it was seen to hold.
    """

    name: str
    module: str
    where: Where
    registers: tuple[str, ...]
    bits: int
    total_bits: int
    clock: str
    edge: str
    wake: str
    method: str
    verdict: Verdict
    reason: str
    detail: str
    cell: str
    kind: EvidenceKind | None
    held: bool
    occurrences: tuple[OccurrenceRow, ...]


@dataclass(frozen=True)
class CellRow:
    """One cell in source text, with what hangs on it; `bits` is over all occurrences."""

    id: str
    name: str
    module: str
    where: Where
    wake: str
    clock: str
    edge: str
    kind: EvidenceKind
    banks: tuple[BankRow, ...]

    @property
    def bits(self) -> int:
        """Give the register bits over all occurrences."""
        return sum(bank.total_bits for bank in self.banks)


@dataclass(frozen=True)
class Totals:
    """Register bits over all instances; arrays written by a variable index are counted apart."""

    flop_bits: int
    held_bits: int
    gated_bits: int
    left_bits: int
    refused_bits: int
    array_bits: int
    banks: int
    cells: int


@dataclass(frozen=True)
class Rows:
    """Everything a report shows: cells with the most bits first, then what is not gated."""

    cells: tuple[CellRow, ...]
    ungated: tuple[BankRow, ...]
    totals: Totals

    @property
    def banks(self) -> tuple[BankRow, ...]:
        """Give gated banks and ungated registers in source order."""
        rows = (*(bank for cell in self.cells for bank in cell.banks), *self.ungated)
        return tuple(sorted(rows, key=lambda row: (row.where.file, row.where.line, row.name)))

    def by_method(self) -> dict[str, int]:
        """Sum the gated bits by method."""
        return _sums((bank.method, bank.total_bits) for cell in self.cells for bank in cell.banks)

    def by_reason(self) -> dict[str, int]:
        """Sum the ungated bits by reason."""
        return _sums((row.reason, row.total_bits) for row in self.ungated)

    def by_module(self) -> dict[str, tuple[int, int]]:
        """Sum gated and all bits by module, arrays aside."""
        gated, every = Counter[str](), Counter[str]()
        for row in self.banks:
            if row.reason != ARRAY:
                every[row.module] += row.total_bits
                gated[row.module] += row.total_bits if row.verdict is Verdict.GATED else 0
        return {module: (gated[module], bits) for module, bits in every.most_common()}


def rows(run: Run) -> Rows:
    """Make the rows of a run."""
    maker = _Maker(run)
    cells = sorted((maker.cell(cell) for cell in run.plan.cells), key=lambda row: (-row.bits, row.id))
    ungated = sorted(
        (maker.ungated(refusal) for refusal in run.plan.refusals), key=lambda row: (-row.total_bits, row.name)
    )
    return Rows(tuple(cells), tuple(ungated), _totals(run.design, cells, ungated))


class _Maker:
    """Look up what rows need from several places of a run."""

    def __init__(self, run: Run) -> None:
        self._run = run
        self._blocks = {block.span: block for module in run.design.modules for block in module.blocks}
        self._banks: dict[str, list[Bank]] = {}
        for bank in run.plan.banks:
            self._banks.setdefault(bank.cell, []).append(bank)
        self._proposals = {proposal.register: proposal for proposal in run.settled.proposals}

    def cell(self, cell: Cell) -> CellRow:
        banks = tuple(self._bank(bank, cell) for bank in self._banks[cell.id])
        first = banks[0]
        return CellRow(
            cell.id, cell.name, cell.definition, first.where, cell.wake.text, first.clock, cell.edge.value,
            self._run.kind(cell.id), banks,
        )  # fmt: skip

    def _bank(self, bank: Bank, cell: Cell) -> BankRow:
        occurrences = _merged(bank.proposals)
        return BankRow(
            name=bank.name,
            module=bank.block.definition,
            where=self._where(bank.registers[0]),
            registers=_names(bank.registers),
            bits=max(row.bits for row in occurrences),
            total_bits=sum(row.bits * row.instances for row in occurrences),
            clock=bank.proposals[0].clock,
            edge=cell.edge.value,
            wake=cell.wake.text,
            method=bank.method,
            verdict=Verdict.GATED,
            reason="",
            detail="",
            cell=cell.id,
            kind=self._run.kind(cell.id),
            held=True,
            occurrences=occurrences,
        )

    def ungated(self, refusal: Refusal) -> BankRow:
        register = refusal.register
        proposal = self._proposals.get(register)
        event = block.clock if (block := self._blocks.get(register.block.span)) else None
        occurrences = tuple(OccurrenceRow(o.module, o.scope, o.instances, o.bits) for o in refusal.occurrences)
        return BankRow(
            name=f"{register.block.definition}.{register.name}",
            module=register.block.definition,
            where=self._where(register),
            registers=_names((register,)),
            bits=max((row.bits for row in occurrences), default=0),
            total_bits=refusal.total_bits,
            clock=self._text(event.signal.span) if event else "",
            edge=event.edge.value if event else "",
            wake=proposal.conditions[0].text if proposal else "",
            method=proposal.method if proposal else "",
            verdict=refusal.verdict,
            reason=refusal.reason.word,
            detail=refusal.reason.detail,
            cell="",
            kind=None,
            held=refusal.holds,
            occurrences=occurrences,
        )

    def _where(self, register: RegisterId) -> Where:
        span = register.block.span
        return Where(span.file, self._run.design.source.by_path[span.file].line_column(span.start)[0])

    def _text(self, span: Span) -> str:
        return self._run.design.source.by_path[span.file].slice(span).decode("utf-8", "replace")


def _names(registers: Iterable[RegisterId]) -> tuple[str, ...]:
    return tuple(part.text for register in registers for part in register.parts)


def _merged(proposals: Sequence[Proposal]) -> tuple[OccurrenceRow, ...]:
    """Add up the registers of a bank, occurrence by occurrence."""
    bits = Counter[tuple[str, str]]()
    instances: dict[tuple[str, str], Occurrence] = {}
    for proposal in proposals:
        for occurrence in proposal.occurrences:
            bits[occurrence.module, occurrence.scope] += occurrence.bits
            instances[occurrence.module, occurrence.scope] = occurrence
    return tuple(OccurrenceRow(o.module, o.scope, o.instances, bits[place]) for place, o in instances.items())


def _totals(design: Design, cells: Sequence[CellRow], ungated: Sequence[BankRow]) -> Totals:
    gated = sum(cell.bits for cell in cells)
    plain = [row for row in ungated if row.reason != ARRAY]
    return Totals(
        flop_bits=design.flop_bits,
        held_bits=gated + sum(row.total_bits for row in plain if row.held),
        gated_bits=gated,
        left_bits=sum(row.total_bits for row in plain if row.verdict is Verdict.LEFT),
        refused_bits=sum(row.total_bits for row in plain if row.verdict is Verdict.REFUSED),
        array_bits=design.array_bits,
        banks=sum(len(cell.banks) for cell in cells),
        cells=len(cells),
    )


def _sums(pairs: Iterable[tuple[str, int]]) -> dict[str, int]:
    sums = Counter[str]()
    for word, bits in pairs:
        sums[word] += bits
    return dict(sums.most_common())
