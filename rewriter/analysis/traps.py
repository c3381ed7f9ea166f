"""Rule 10: what makes a register unfit for a gated clock, as far as source and model tell."""

from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.analysis import regions
from rewriter.analysis.branches import around, control_reads
from rewriter.analysis.copyable import ASSIGNING
from rewriter.analysis.registers import Group
from rewriter.analysis.temporaries import Temporaries, loop_names
from rewriter.model.design import AsyncReset, ClockedBlock, Definition, Design, Module, WriterKind
from rewriter.model.errors import Place
from rewriter.model.expr import Call, Operation, Reference, Select
from rewriter.model.expr import Opaque as OpaqueExpr
from rewriter.model.reasons import Reason
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Opaque

# Names of attributes that tools read as "do not move this register"; common practice, no source.
_KEEP = frozenset(
    (
        "keep",
        "async_reg",
        "dont_touch",
        "preserve",
        "syn_keep",
        "syn_preserve",
        "noprune",
        "no_clock_gating",
        "shreg_extract",
    )
)


@dataclass(frozen=True)
class Context:
    """What the checks look at, for one block."""

    design: Design
    definition: Definition
    module: Module
    block: ClockedBlock
    temporaries: Temporaries
    clocked: frozenset[str] = frozenset()  # every variable that a clocked block of the body writes

    def place(self, span: Span) -> str:
        """Format a span as `file:line:col`."""
        source = self.design.source.by_path.get(span.file)
        if source is None:
            return span.file
        place = Place.of(source, span)
        return f"{place.file}:{place.line}:{place.column}"

    def reason(self, word: str, span: Span, detail: str = "") -> Reason:
        """Make a reason with its place."""
        return Reason(word, detail, self.place(span))


def of_block(context: Context) -> Reason | None:
    """Give the reason that refuses every register of the block, if there is one."""
    block, definition = context.block, context.definition
    for trap in (*((definition.trap,) if definition.trap else ()), *block.traps):
        return context.reason(trap.reason, trap.span, trap.detail)
    if definition.is_interface:
        return context.reason("no-test-path", definition.span, "interfaces are not edited")
    clock = _clock_trap(context)
    if clock is not None:
        return clock
    for statement in block.body.walk():
        if isinstance(statement, Opaque) and not statement.harmless:
            return context.reason("side-effect", statement.span, statement.what)
    source = context.design.source.by_path[block.span.file]
    if regions.writes_conditionally(block, source):
        return context.reason("inactive-code", block.span)
    label = block.label
    if label and any(n == label or n.startswith(f"{label}.") for n in context.module.external_references):
        return context.reason("labelled-block", block.span, label)
    return None


def _clock_trap(context: Context) -> Reason | None:
    """Refuse clocks whose text cannot stand on a cell, or that a register makes (they race in simulation)."""
    event = context.block.clock
    if event is None:
        return context.reason("clock-unclear", context.block.span)
    signal = event.signal
    plain = isinstance(signal, Reference) or (isinstance(signal, Select) and signal.bits is not None)
    if not plain or signal.width != 1 or not signal.copyable:
        return context.reason("clock-unclear", signal.span, "the clock is not a single signal")
    if any(isinstance(node, Reference) and node.is_hierarchical for node in signal.walk()):
        return context.reason("hierarchical-name", signal.span, signal.key)
    made = signal.reads() & context.clocked
    if made:
        return context.reason("foreign-domain", signal.span, f"the clock {_names(made)} is made by a register")
    return None


def of_group(context: Context, group: Group) -> Reason | None:
    """Give the reason that refuses one register, if there is one."""
    return next(_group_traps(context, group), None)


def _group_traps(context: Context, group: Group) -> Iterator[Reason]:
    where = group.assigns[0].span if group.assigns else context.block.span
    yield from _ill_placed(context, group, where)
    yield from _other_writers(context, group, where)
    yield from _wanted_elsewhere(context, group)
    yield from _reset_traps(context, group)
    for statement in group.assigns:
        for node in statement.rhs.walk():
            impure = isinstance(node, Call) and not node.pure
            if impure or (isinstance(node, Operation) and node.operator in ASSIGNING):
                yield context.reason("impure-call", statement.span)


def _ill_placed(context: Context, group: Group, where: Span) -> Iterator[Reason]:
    """Refuse registers that are declared inside the block or outside the module, or written in both ways."""
    if any(target.is_local for statement in group.assigns for target in statement.targets):
        yield context.reason("not-copyable", where, "the register is declared inside its block")
    mixed = group.variables & context.temporaries.names
    if mixed:
        yield context.reason("blocking-source", where, f"{_names(mixed)} is written with both = and <=")
    variables = context.module.variables
    outside = frozenset(n for n in group.variables if n not in variables and variables)
    if outside:
        yield context.reason("hierarchical-name", where, _names(outside))


def _wanted_elsewhere(context: Context, group: Group) -> Iterator[Reason]:
    """Refuse registers that clock or reset others, and those marked to stay as they are."""
    module = context.module
    for name in sorted(group.variables & module.drives_clocks.keys()):
        yield context.reason("drives-clock", module.drives_clocks[name], _last(name))
    for name in sorted(group.variables & module.variables.keys()):
        kept = _KEEP & {attribute.lower() for attribute in module.variables[name].attributes}
        if kept:
            span = module.variables[name].span
            yield context.reason("keep-attribute", span, f"{_last(name)}: {', '.join(sorted(kept))}")


def _reset_traps(context: Context, group: Group) -> Iterator[Reason]:
    """Refuse asynchronous resets whose value can change while they last."""
    resets = context.block.resets
    for reset in resets:
        load = _changing_load(reset, group)
        if load:
            yield context.reason("async-load", load, ", ".join(part.text for part in group.parts))
    if len({_loads(reset, group) for reset in resets}) > 1:
        yield context.reason("async-load", context.block.span, "its asynchronous resets load different values")


def _other_writers(context: Context, group: Group, where: Span) -> Iterator[Reason]:
    for name, (msb, lsb) in group.ranges:
        for writer in context.module.writers.get(name, ()):
            overlaps = writer.bits[0] >= lsb and writer.bits[1] <= msb
            mine = context.block.span.covers(writer.span)
            if overlaps and not mine and writer.kind is not WriterKind.INITIAL:
                detail = f"{_last(name)} is also written at {context.place(writer.span)} ({writer.kind.value})"
                yield context.reason("two-writers", where, detail)


def _changing_load(reset: AsyncReset, group: Group) -> Span | None:
    """Find a write in a reset branch whose value, place or condition is not constant."""
    loops = loop_names(reset.branch)
    kept = around(reset.branch, group.writes)
    if control_reads(kept) - loops:
        return reset.branch.span
    for statement in kept:
        if not isinstance(statement, Assign):
            continue
        indices = [index for target in statement.targets for index in target.indices]
        for expr in (statement.rhs, *indices):
            changing = expr.reads() - loops or any(
                isinstance(n, OpaqueExpr | Call) and expr.constant is None for n in expr.walk()
            )
            if changing:
                return statement.span
    return None


def _loads(reset: AsyncReset, group: Group) -> tuple[tuple[str, tuple[int, int], int | str], ...]:
    """Give what a reset branch writes where, in order.

    When one of two resets that are active ends, there is no event: the original takes the value of the other one at
    the next clock edge, which a sleeping bank would miss.
    """
    return tuple(
        (target.variable, target.bits, s.rhs.key if s.rhs.constant is None else s.rhs.constant)
        for s in around(reset.branch, group.writes)
        if isinstance(s, Assign)
        for target in s.targets
    )


def _names(names: frozenset[str]) -> str:
    return ", ".join(sorted(_last(name) for name in names))


def _last(name: str) -> str:
    return name.rsplit(".", 1)[-1]
