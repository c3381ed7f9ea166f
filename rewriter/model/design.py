"""The elaborated design, as far as gating needs it."""

import re
from collections.abc import Mapping
from dataclasses import dataclass
from enum import Enum
from typing import Protocol

from rewriter.model.expr import Expr
from rewriter.model.source import RtlSource, Span
from rewriter.model.statement import Statement


class Edge(Enum):
    """Name a clock edge."""

    RISING = "rising"
    FALLING = "falling"


class Language(Enum):
    """Say which language inserted text is written in: by file suffix (.v and .vh are Verilog-2001)."""

    VERILOG = "verilog"
    SYSTEMVERILOG = "systemverilog"


@dataclass(frozen=True)
class Trap:
    """Record why a block, register or definition must not be touched: a reason word, where, and details."""

    reason: str
    span: Span
    detail: str = ""


@dataclass(frozen=True)
class Event:
    """One event of a sensitivity list; `signal` has the span that is replaced by the gated clock."""

    edge: Edge
    signal: Expr
    condition: Expr | None  # the `iff` part


@dataclass(frozen=True)
class AsyncReset:
    """An asynchronous set or reset of a block: its event and the `if` branch it takes."""

    event: Event
    branch: Statement
    active_high: bool


@dataclass(frozen=True)
class ClockedBlock:
    """One elaborated clocked always block.

    Args:
        scope: generate scope within the module body (`gen[2].`), empty at module level; names of
            variables carry it.
        span: from the first attribute or label to the last token.
        keyword: `always` or `always_ff`; `keyword_span` is that token.
        clock: the clock's event, None when unclear (then `traps` says so).
        resets: asynchronous ones, in order of priority.
        body: everything below the event control.
        synchronous: the part of `body` that runs on the clock edge alone: `body` itself without
            asynchronous resets, else what follows the last reset's `else` (None when absent).
        traps: what the front end found: `inside-macro`, `side-effect`, `clock-unclear`,
            `shared-include`, `timing-control`, …
        disabled: inactive `ifdef text inside the block.
        unbraced: the block is the lone item of a generate branch without begin/end.
    """

    scope: str
    span: Span
    keyword: str
    keyword_span: Span
    clock: Event | None
    resets: tuple[AsyncReset, ...]
    body: Statement
    synchronous: Statement | None
    traps: tuple[Trap, ...]
    disabled: tuple[Span, ...]
    unbraced: bool
    label: str = ""


@dataclass(frozen=True)
class Variable:
    """A variable or net of a module body.

    Args:
        name: path within the body.
        declaration: text of its type, that declares a local copy when followed by a name and
            `unpacked` (`logic [31:0]`, `reg signed [7:0]`, `state_t`); None when unknown.
        width: bits of the flattened variable.
        unpacked: text of unpacked dimensions, empty without.
        element_width: bits of one word of an array (= width for others).
        attributes: names in `(* *)` on the declaration.
        is_port, is_net: as said.
        span: the declarator.
    """

    name: str
    declaration: str | None
    width: int
    unpacked: str
    element_width: int
    attributes: tuple[str, ...]
    is_port: bool
    is_net: bool
    span: Span


class WriterKind(Enum):
    """Say what writes a variable besides clocked blocks."""

    CONTINUOUS = "continuous assignment"
    COMBINATIONAL = "combinational block"
    LATCH = "latch block"
    INSTANCE = "instance output"
    INITIAL = "initial block"
    CLOCKED = "clocked block"


@dataclass(frozen=True)
class Writer:
    """One writer of a variable's bits (msb, lsb); `block` when it is a clocked block."""

    kind: WriterKind
    bits: tuple[int, int]
    span: Span


@dataclass(frozen=True)
class Driver:
    """One piece of combinational logic, lowered on request: an expression, or a block's statement."""

    kind: WriterKind
    bits: tuple[int, int]
    span: Span
    value: Expr | Statement | None


class Drivers(Protocol):
    """Lower combinational logic only when somebody asks."""

    def drivers_of(self, body: str, variable: str) -> tuple[Driver, ...]:
        """Give what drives a variable of a module body (`Module.key`); empty for inputs and undriven ones."""
        ...


@dataclass(frozen=True)
class Module:
    """One canonical body: a definition with one set of parameters.

    Args:
        key: hierarchical path of the canonical instance.
        definition: name of the definition.
        instances: paths of every instance that shares the body.
        parameters: `NAME=VALUE` of this body, for reports.
        blocks: clocked blocks, in source order.
        variables: by path: those written by clocked blocks, and those read by them.
        writers: by path: every writer of the variables that some clocked block writes.
        clock_uses: paths of clocks of `blocks` that are read as data or combined in this body, with
            the place (for `clock-as-data`).
        drives_clocks: variables written by `blocks` that are used as a clock or asynchronous reset
            in this body, or are connected to such a port of an instance.
        external_references: names of this body that are referred to from outside by hierarchical path.
    """

    key: str
    definition: str
    instances: tuple[str, ...]
    parameters: tuple[str, ...]
    blocks: tuple[ClockedBlock, ...]
    variables: Mapping[str, Variable]
    writers: Mapping[str, tuple[Writer, ...]]
    clock_uses: Mapping[str, Span]
    drives_clocks: Mapping[str, Span]
    external_references: frozenset[str] = frozenset()


class PortStyle(Enum):
    """Say how a definition lists its ports."""

    ANSI = "ansi"
    NON_ANSI = "non-ansi"
    EMPTY = "empty"  # `()`
    NONE = "none"  # no parentheses at all


@dataclass(frozen=True)
class PortList:
    """Where a definition's ports stand.

    Args:
        style: see PortStyle.
        span: from `(` to `)` inclusive; empty span right before the `;` when there is none.
        first: start of the first port (attributes included), or of `)` when empty.
        last_end: end of the last port's last token, or end of `(` when empty.
        header_end: offset just after the header's `;`.
        has_directives: a compiler directive or inactive text stands between the parentheses.
        first_has_direction: the first port carries its own direction.
        names: port names, in order.
        in_macro: any of it comes from a macro.
    """

    style: PortStyle
    span: Span
    first: int
    last_end: int
    header_end: int
    has_directives: bool
    first_has_direction: bool
    names: tuple[str, ...]
    in_macro: bool


class ConnectionStyle(Enum):
    """Say how an instance connects its ports."""

    NAMED = "named"
    ORDERED = "ordered"
    WILDCARD = "wildcard"  # has `.*`
    EMPTY = "empty"


@dataclass(frozen=True)
class InstanceSyntax:
    """One hierarchical instance in source text, also in branches that are not taken.

    Args:
        target: definition name as written.
        name: instance name.
        span: the instance (name, dimensions, connections).
        parentheses: from `(` to `)` inclusive.
        first: start of the first connection, or of `)`.
        last_end: end of the last connection, or end of `(`.
        has_directives: a directive or inactive text stands between the parentheses.
        in_macro: any of it comes from a macro.
        is_bind: it stands in a `bind` directive.
        connected: port names connected by name.
    """

    target: str
    name: str
    span: Span
    parentheses: Span
    style: ConnectionStyle
    first: int
    last_end: int
    has_directives: bool
    in_macro: bool
    is_bind: bool
    connected: tuple[str, ...] = ()


@dataclass(frozen=True)
class Definition:
    """One module definition in source text, elaborated or not.

    Args:
        span: from `module` (attributes included) to `endmodule` (and its label).
        language: of inserted text.
        ports: see PortList.
        instances: all instances, at syntax level.
        identifiers: every identifier token in the text, active or not, for collision checks.
        trap: why it must not be edited (`library-file`, `celldefine`, `encrypted`, `inside-macro`,
            `shared-include`, `read-only`), or None.
        cell_like: it holds a latch ANDed or ORed with a clock (an existing gating cell).
        generated: a comment near the top of the file says that the file is generated.
        timescale: the module's own timescale text (`1ns/1ps`), or None when none is in force.
        in_hierarchy: some instance is elaborated.
        is_interface: an interface or program, never edited.
    """

    name: str
    span: Span
    language: Language
    ports: PortList
    instances: tuple[InstanceSyntax, ...]
    identifiers: frozenset[str]
    trap: Trap | None
    cell_like: bool
    generated: bool
    timescale: str | None
    in_hierarchy: bool
    is_interface: bool = False


@dataclass(frozen=True)
class BoxPort:
    """One port of a module without source, as its connections tell; ordered ones are named `port0` and so on."""

    name: str
    width: int
    is_output: bool


@dataclass(frozen=True)
class BlackBox:
    """A module without source: the ports and parameters that its instances use."""

    name: str
    ports: tuple[BoxPort, ...]
    parameters: tuple[str, ...]

    def stub(self) -> str:
        """Write a module with these ports and no body, for engines that want one."""
        parameters = ", ".join(f"parameter {_written(name)} = 0" for name in self.parameters)
        ports = ", ".join(
            f"{'output' if port.is_output else 'input'} wire [{port.width - 1}:0] {_written(port.name)}"
            for port in self.ports
        )
        return f"module {_written(self.name)}{f' #({parameters})' if parameters else ''} ({ports}); endmodule"


def _written(name: str) -> str:
    """Escape a name that is no simple identifier."""
    return name if re.fullmatch(r"[A-Za-z_][\w$]*", name) else f"\\{name} "


@dataclass(frozen=True)
class Note:
    """A message that does not stop the run; `place` is `file:line:col` or empty."""

    message: str
    place: str = ""
    help: str = ""


@dataclass(frozen=True)
class Design:
    """Everything the stages need to know; no front-end object is inside, but `drivers` reaches one lazily."""

    source: RtlSource
    top: str
    modules: tuple[Module, ...]
    definitions: Mapping[str, Definition]
    black_boxes: tuple[BlackBox, ...]
    drivers: Drivers
    warnings: tuple[Note, ...] = ()
    flop_bits: int = 0  # bits written by clocked blocks, over all instances, arrays by variable index excluded
    array_bits: int = 0  # bits of arrays written by a variable index, over all instances

    @property
    def stubs(self) -> str:
        """Give modules without bodies for everything whose source is missing."""
        return "\n".join(box.stub() for box in self.black_boxes)
