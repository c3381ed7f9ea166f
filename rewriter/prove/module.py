"""Prove one module against its original, its ports free."""

from dataclasses import dataclass, field

from rewriter.logic.aig import Lit
from rewriter.logic.netlist import Module
from rewriter.model.evidence import Counterexample
from rewriter.model.reasons import EvidenceKind
from rewriter.prove.compare import Bank, Comparison
from rewriter.prove.obligation import Failure, discharge
from rewriter.prove.pair import Gating, Shared, Side


@dataclass
class CellFinding:
    """What is known about one cell of a module; filled in as checks are made."""

    gating: Gating
    registers: list[str] = field(default_factory=list[str])
    failing: list[str] = field(default_factory=list[str])
    dead: list[str] = field(default_factory=list[str])
    kind: EvidenceKind = EvidenceKind.PROVED
    reason: str = ""
    detail: str = ""
    counterexample: Counterexample | None = None
    wider: Counterexample | None = None

    def refuse(self, kind: EvidenceKind, reason: str, detail: str, example: Counterexample | None = None) -> None:
        """Record why the cell is not proved; what was found first stays, but a disproof outweighs a limit."""
        if self.kind is EvidenceKind.PROVED or (self.kind is EvidenceKind.UNDECIDED and kind is EvidenceKind.DISPROVED):
            self.kind, self.reason, self.detail, self.counterexample = kind, reason, detail, example


@dataclass(frozen=True)
class Finding:
    """Something that differs outside the banks."""

    what: str
    detail: str
    counterexample: Counterexample | None = None


@dataclass
class ModuleProof:
    """The answer for one module, the same for every instance whose netlist is the same."""

    comparison: Comparison
    cells: dict[str, CellFinding]
    findings: list[Finding]
    undecided: list[str]
    notes: list[str]
    registers: int
    bits: int

    @property
    def shared(self) -> Shared:
        """Give the graph and solver."""
        return self.comparison.shared


def prove_module(  # noqa: PLR0913 (both texts, limits, and what may differ)
    gold: Module,
    gate: Module,
    *,
    itself: bool,
    query_seconds: float,
    deadline: float,
    temporaries: frozenset[str] = frozenset(),
) -> ModuleProof:
    """Compare both texts of a module.

    Args:
        gold: the original.
        gate: the rewrite.
        itself: `gold` is `gate`, taken with its cells transparent.
        query_seconds: limit of one question.
        deadline: `time.monotonic()` value of the whole run.
        temporaries: plain names of variables that may differ where nothing reads them.

    Raises:
        UnsupportedCellError: the netlist holds what cannot be modelled.
        LoopError: it holds a combinational loop.
    """
    shared = Shared(query_seconds, deadline)
    before = Side(shared, gold, None, transparent=itself)
    comparison = Comparison(shared, before, Side(shared, gate, before))
    comparison.collect()
    return judge(comparison, Liveness(comparison, temporaries))


def judge(comparison: Comparison, live: "Liveness") -> ModuleProof:
    """Discharge the obligations of a comparison, and say of each cell and of all else what came out."""
    cells = {name: CellFinding(gating) for name, gating in comparison.gate.gating_cells().items()}
    variables = {name for bank in comparison.banks.by_chain.values() for name in bank.variables}
    proof = ModuleProof(comparison, cells, [], [], [], len(variables), comparison.bits)
    proof.findings += [Finding(fault.what, fault.detail) for fault in comparison.faults]
    proof.findings += live.unmatched()
    for bank in comparison.banks.by_chain.values():
        _judge(proof, bank, live)
    return proof


def _judge(proof: ModuleProof, bank: Bank, live: "Liveness") -> None:
    failures = discharge(proof.shared, bank.obligations)
    chain = [proof.cells[gating.name] for gating in bank.cells]
    for cell in chain:
        cell.registers += [name for name in bank.variables if name not in cell.registers]
    for variable, fault in bank.faults.items():
        if not chain:
            proof.findings.append(Finding(variable, fault.detail))
        for cell in chain:
            _fail(cell, variable)
            cell.refuse(EvidenceKind.DISPROVED, fault.reason, f"{variable}: {fault.detail}")
    for variable, failure in _by_variable(failures).items():
        register = failure.obligation.kind in ("next", "reset", "memory", "latch", "clock")
        if register and failure.decided and live.may_differ(variable):
            for cell in chain:
                cell.dead.append(variable)
            proof.notes.append(f"{variable} differs, but nothing reads it")
        elif not chain:
            _outside(proof, variable, failure)
        else:
            kind = EvidenceKind.DISPROVED if failure.decided else EvidenceKind.UNDECIDED
            for cell in chain:
                _fail(cell, variable)
                cell.refuse(kind, failure.reason, _detail(variable, failure), failure.counterexample)


def _outside(proof: ModuleProof, variable: str, failure: Failure) -> None:
    if failure.decided:
        proof.findings.append(Finding(variable, _detail(variable, failure), failure.counterexample))
    else:
        proof.undecided.append(f"{variable} ({failure.obligation.kind}): the limit was reached")


def _fail(cell: CellFinding, variable: str) -> None:
    if variable not in cell.failing:
        cell.failing.append(variable)


def _detail(variable: str, failure: Failure) -> str:
    if not failure.decided:
        return f"{variable}: the limit was reached"
    example = failure.counterexample
    kind = example.obligation if example else failure.obligation.kind
    words = {
        "hold": "changes in the original while the cell sleeps",
        "load": "takes another value than in the original",
        "reset": "has another asynchronous reset",
        "output": "the output differs",
        "input": "the input of the instance differs",
        "latch": "the latch differs",
        "memory": "the memory is written otherwise",
    }
    return f"{variable}: {words.get(kind, 'differs')}"


def _by_variable(failures: list[Failure]) -> dict[str, Failure]:
    """Keep one failure for each variable: a disproof before a limit, hold before load."""
    kept: dict[str, Failure] = {}
    for failure in failures:
        variable = failure.obligation.word
        known = kept.get(variable)
        if known is None or (failure.decided and not known.decided):
            kept[variable] = failure
    return kept


class Liveness:
    """Which registers something reads, on either side: outputs, instances, memories, or a register that is read."""

    def __init__(self, comparison: Comparison, temporaries: frozenset[str]) -> None:
        self.comparison = comparison
        self.temporaries = temporaries
        self.live: set[tuple[str, str]] = set()
        for side in (comparison.gold, comparison.gate):
            self._walk(side)

    def may_differ(self, variable: str) -> bool:
        """Tell whether a register is a temporary of a block that nothing reads: it may sleep with the block."""
        return variable.rpartition(".")[2] in self.temporaries and not self.is_live(variable)

    def is_live(self, variable: str) -> bool:
        """Tell whether a register (or memory) of both sides is read on either."""
        return self.comparison.is_memory(variable) or ("register", variable) in self.live

    def unmatched(self) -> list[Finding]:
        """List the registers that are read and stand on one side only."""
        found: dict[str, Finding] = {}
        sides = (self.comparison.gold, self.comparison.gate)
        for side, other in (sides, sides[::-1]):
            for key in side.by_key.keys() - other.by_key.keys():
                name = str(key[1])
                if (str(key[0]), name) in self.live:
                    where = "original" if side is self.comparison.gold else "rewrite"
                    found.setdefault(name, Finding(name, f"the register stands only in the {where}"))
        return list(found.values())

    def _walk(self, side: Side) -> None:
        by_variable: dict[int, tuple[object, ...]] = {}
        for key, register in side.by_key.items():
            by_variable[side.cone.bit(register.net)[0] >> 1] = key
        roots: list[Lit] = _sinks(side)
        seen: set[int] = set()
        while roots:
            fresh = [n for n in side.shared.aig.support(roots) if n in by_variable and n not in seen]
            seen.update(fresh)
            roots = []
            for node in fresh:
                key = by_variable[node]
                self.live.add((str(key[0]), str(key[1])))
                roots += _reads(side, key)


def _sinks(side: Side) -> list[Lit]:
    cone = side.cone
    nets = [net for port in side.module.ports.values() if port.direction != "input" for net in port.bits]
    for cell in side.module.cells:
        if cell.is_instance or cell.type in ("$mem_v2", "$tribuf"):
            nets += [net for bits in cell.inputs.values() for net in bits]
    return [lit for net in nets for lit in cone.bit(net)]


def _reads(side: Side, key: tuple[object, ...]) -> list[Lit]:
    return [lit for nets in side.by_key[key].cell.inputs.values() for net in nets for lit in side.cone.bit(net)]
