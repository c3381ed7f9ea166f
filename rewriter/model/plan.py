"""Registers, proposals, banks, cells and the plan."""

from collections.abc import Mapping
from dataclasses import dataclass
from enum import Enum
from typing import Protocol

from rewriter.model.design import Design, Edge, Module
from rewriter.model.reasons import Reason, Verdict
from rewriter.model.source import Span
from rewriter.model.wake import WakeCondition


@dataclass(frozen=True, order=True)
class Part:
    """A variable, or a part of it that is written apart from the rest, in source form.

    Source form is what all copies of a block share: generate indices are dropped from `variable`
    (`gen.q`), and `select` is the text of the select (`[i]`, `[W-1:8]`, `.valid`), empty for the
    whole variable. Widths differ between copies; they stand in Occurrence.
    """

    variable: str
    select: str = ""

    @property
    def text(self) -> str:
        """Format for reports: `gen.q` or `gen.q[7:0]`."""
        return self.variable + self.select


@dataclass(frozen=True, order=True)
class BlockId:
    """Name a clocked block in source text."""

    definition: str
    span: Span


@dataclass(frozen=True, order=True)
class RegisterId:
    """Name a register in source text: its block, and the parts that are always written together."""

    block: BlockId
    parts: tuple[Part, ...]

    @property
    def name(self) -> str:
        """Give the first variable's name, without its scope."""
        return self.parts[0].variable.rsplit(".", 1)[-1]


@dataclass(frozen=True)
class Occurrence:
    """Where a register stands in the elaborated design: module body, generate scope, instances, width there."""

    module: str
    scope: str
    instances: int
    bits: int


class Liveness(Enum):
    """Say how often a condition is true under the parameters of one body, as far as constants tell."""

    ALWAYS = "always"
    SOMETIMES = "sometimes"
    NEVER = "never"


@dataclass(frozen=True)
class Proposal:
    """One register and its possible wake conditions, most readable first.

    Args:
        register: the register.
        method: name of the method.
        clock: text of the clock as written, and its edge.
        conditions: possible wake conditions.
        occurrences: all of them, merged over parameterisations and generate indices.
        liveness: of the first condition, over all occurrences.
        writes: places of its assignments, reset branches included.
        needs: module-level temporaries (variables written with `=` in the block) that a split copy must declare.
    """

    register: RegisterId
    method: str
    clock: str
    edge: Edge
    scope: str
    conditions: tuple[WakeCondition, ...]
    occurrences: tuple[Occurrence, ...]
    liveness: Liveness = Liveness.SOMETIMES
    writes: frozenset[Span] = frozenset()
    needs: tuple[str, ...] = ()

    @property
    def bits(self) -> int:
        """Give the bits of one occurrence (the widest)."""
        return max(o.bits for o in self.occurrences)

    @property
    def total_bits(self) -> int:
        """Give the bits over all occurrences."""
        return sum(o.bits * o.instances for o in self.occurrences)


@dataclass(frozen=True)
class Refusal:
    """A register that is left or refused; `holds` says whether it was seen to hold."""

    register: RegisterId
    verdict: Verdict
    reason: Reason
    occurrences: tuple[Occurrence, ...]
    holds: bool

    @property
    def total_bits(self) -> int:
        """Give the bits over all occurrences."""
        return sum(o.bits * o.instances for o in self.occurrences)


@dataclass(frozen=True)
class Anchor:
    """Say that a block must keep a part on its original clock (see Settled)."""

    block: BlockId


Outcome = Proposal | Refusal | Anchor


class Method(Protocol):
    """Find registers of one kind."""

    @property
    def name(self) -> str:
        """Give the method's word."""
        ...

    def propose(self, module: Module, design: Design) -> tuple[Outcome, ...]:
        """Give an outcome for every register of the module body that this method understands."""
        ...


@dataclass(frozen=True)
class Settled:
    """Every register once, with its first wake condition that stands.

    A block in `anchored` does more than write registers (temporaries that others may read, harmless
    statements): that part must stay on the original clock, so the block cannot keep its text.

    Args:
        proposals: one per register; `conditions[0]` is the one chosen.
        refusals: the others.
        equal: classes of wake keys that are proved equal though written differently (for the report).
        depth: logic levels by wake key, when an engine ran.
    """

    proposals: tuple[Proposal, ...]
    refusals: tuple[Refusal, ...]
    anchored: frozenset[BlockId] = frozenset()
    equal: tuple[tuple[str, ...], ...] = ()
    depth: Mapping[str, int] | None = None


@dataclass(frozen=True)
class Policy:
    """What is worth a cell.

    Args:
        min_bits: fewest bits per cell in one occurrence of its scope.
        has_falling_cell: the cell map has a cell for falling-edge banks.
        one_clock_per_variable: leave parts of a variable that would run on several clocks.
    """

    min_bits: int = 4
    has_falling_cell: bool = True
    one_clock_per_variable: bool = False


class Shape(Enum):
    """How a block is rewritten; rendered by `edit` alone."""

    KEEP = "keep"
    SPLIT = "split"
    WORDS = "words"
    SLICE = "slice"
    EXPAND = "expand"
    CONNECTION = "connection"


@dataclass(frozen=True)
class ClockRef:
    """A clock as written in the source."""

    text: str


@dataclass(frozen=True)
class CellRef:
    """The output of another cell of the plan (cells can nest)."""

    cell: str


@dataclass(frozen=True)
class Cell:
    """One gating cell in source text.

    Args:
        id: unique and stable: `definition:name`.
        name: from the bank's first register; edit derives `wake_…`, `gclk_…`, `u_icg_…` and avoids collisions.
        definition, scope: where it stands (`scope` in source form, generate indices dropped).
        clock: a source clock or another cell.
        wake: its condition.
        blocks: blocks it serves, in source order; it stands before the first.
    """

    id: str
    name: str
    definition: str
    scope: str
    clock: ClockRef | CellRef
    edge: Edge
    wake: WakeCondition
    blocks: tuple[BlockId, ...]


@dataclass(frozen=True)
class Bank:
    """Registers of one block on one cell (several banks may share the cell)."""

    name: str
    cell: str
    block: BlockId
    registers: tuple[RegisterId, ...]
    proposals: tuple[Proposal, ...]
    method: str


@dataclass(frozen=True)
class BlockPlan:
    """How one block is rewritten: its banks, and the registers that stay on the original clock (None: none)."""

    block: BlockId
    shape: Shape
    banks: tuple[str, ...]
    rest: tuple[RegisterId, ...]


@dataclass(frozen=True)
class Plan:
    """What is done. Every register is in exactly one bank, or in `refusals`."""

    cells: tuple[Cell, ...]
    banks: tuple[Bank, ...]
    blocks: tuple[BlockPlan, ...]
    refusals: tuple[Refusal, ...]
