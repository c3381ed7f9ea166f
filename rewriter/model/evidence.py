"""What the prover says; picklable, so that a job can run elsewhere."""

from collections.abc import Mapping
from dataclasses import dataclass

from rewriter.model.reasons import EvidenceKind
from rewriter.model.source import RtlSource


@dataclass(frozen=True)
class Limits:
    """Bound the proof: seconds per bank query, and per run."""

    query_seconds: float = 10.0
    run_seconds: float = 600.0


@dataclass(frozen=True)
class ProofJob:
    """Prove `gate` against `gold`.

    Args:
        gold: the original; None proves `gate` against itself with the cells transparent.
        gate: the rewritten RTL, cells included.
        top: top module.
        cell_texts: name -> text of the wrapper files whose lemma is to be proved.
        test_port: name of the top-level override input (None: found from the cells' test pins).
        test_active_low: the override is active when 0.
        temporaries: definition and plain name of variables that blocks write with `=` for their own use. They may
            differ where nothing reads them; every other register must be equal, read or not.
        stubs: SystemVerilog modules, ports and parameters only, for every module without source.
    """

    gold: RtlSource | None
    gate: RtlSource
    top: str
    cell_texts: Mapping[str, str]
    test_port: str | None
    test_active_low: bool = False
    limits: Limits = Limits()
    stubs: str = ""
    temporaries: frozenset[tuple[str, str]] = frozenset()


@dataclass(frozen=True)
class Counterexample:
    """One state in which gold and gate differ; the state is arbitrary, perhaps unreachable.

    Args:
        signals: name -> value as text (`0x7f`), inputs and registers that matter.
        register: register and bit that differ.
        gold, gate: values after the clock edge.
        obligation: `hold`, `load`, `reset`, `output`, `override`, …
    """

    register: str
    obligation: str
    signals: tuple[tuple[str, str], ...]
    gold: str
    gate: str

    def table(self) -> str:
        """Format for a terminal."""
        rows = " ".join(f"{name}={value}" for name, value in self.signals)
        return f"UNEQUAL {self.register} ({self.obligation})\n  {rows}\nafter: gold {self.gold}  gate {self.gate}"


@dataclass(frozen=True)
class CellEvidence:
    """Evidence of one cell instance in the elaborated design.

    Args:
        module: hierarchical path of the module instance.
        definition: its definition.
        cell: instance path within the module, generate indices kept (`gen[2].u_icg_q`).
        kind: see EvidenceKind.
        registers: register names (within the module) that hang on the cell.
        failing: those of them that were disproved or undecided.
        reason: a word of reasons.PAGES when not proved (`disproved`, `undecided`, `foreign-domain`, …).
        detail: one line.
        wider: a state in which the cell wakes though no assignment writes (None: shown impossible).
        dead: those registers that differ but that nothing reads, such as temporaries of a block that sleeps; they
            disprove nothing by themselves.
    """

    module: str
    definition: str
    cell: str
    kind: EvidenceKind
    registers: tuple[str, ...]
    failing: tuple[str, ...] = ()
    reason: str = ""
    detail: str = ""
    counterexample: Counterexample | None = None
    wider: Counterexample | None = None
    dead: tuple[str, ...] = ()


@dataclass(frozen=True)
class Mismatch:
    """Something outside the banks that differs: an output, an ungated register, a black-box input, the override."""

    module: str
    what: str
    detail: str
    counterexample: Counterexample | None = None


@dataclass(frozen=True)
class ProofResult:
    """The whole answer.

    Args:
        cells: evidence per cell instance.
        mismatches: everything else that differs (empty when the rewrite is sound).
        undecided: what a limit or the engine prevented, as text.
        lemma: cell module name -> proved or not, with detail.
        equal_wakes: groups of cells (module definition, instance) in one module whose wake nets are proved equal.
        unread: module instances the engine could not elaborate, with its message.
        seconds: where the time went, by stage.
        registers, bits: how many were compared.
        notes: what a reader must know about the conditions under which this holds.
    """

    cells: tuple[CellEvidence, ...]
    mismatches: tuple[Mismatch, ...]
    undecided: tuple[str, ...]
    lemma: Mapping[str, str]
    equal_wakes: tuple[tuple[str, ...], ...]
    unread: tuple[tuple[str, str], ...]
    seconds: Mapping[str, float]
    registers: int
    bits: int
    notes: tuple[str, ...] = ()

    @property
    def proved(self) -> bool:
        """Say whether everything was proved."""
        good = {EvidenceKind.PROVED, EvidenceKind.UNDER_TOP, EvidenceKind.FROM_RESET}
        return (
            not self.mismatches and not self.undecided and all(c.kind in good for c in self.cells) and not self.unread
        )
