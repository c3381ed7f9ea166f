"""Registers that hold inside their own clocked block: an `if` without else, a case arm without a write, `q <= q`."""

from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.analysis import traps
from rewriter.analysis.branches import around, control_reads, value_reads
from rewriter.analysis.copyable import CannotCopyError
from rewriter.analysis.domains import Sources
from rewriter.analysis.existing import gated_by, gated_clocks
from rewriter.analysis.registers import Group, groups, plain_scope
from rewriter.analysis.temporaries import Temporaries, find
from rewriter.analysis.wake import Wake, wake_of
from rewriter.model.cells import WRAPPERS
from rewriter.model.design import ClockedBlock, Design, Module
from rewriter.model.plan import Anchor, BlockId, Liveness, Occurrence, Outcome, Part, Proposal, Refusal, RegisterId
from rewriter.model.reasons import PAGES, Reason, Verdict
from rewriter.model.source import SourceText, Span
from rewriter.model.statement import Assign, Opaque


@dataclass(frozen=True)
class Enable:
    """The method `enable`."""

    name: str = "enable"

    def propose(self, module: Module, design: Design) -> tuple[Outcome, ...]:
        """Give an outcome for every register that the clocked blocks of a module body write."""
        definition = design.definitions[module.definition]
        if definition.name in WRAPPERS.values():
            return ()  # a cell of ours, not a register of the user's
        gated = gated_clocks(design, definition)
        sources = Sources(design, module, gated)
        found: list[Outcome] = []
        for block in module.blocks:
            temporaries = find(block, module)
            context = traps.Context(design, definition, module, block, temporaries, frozenset(sources.launches))
            found.extend(_Finder(context, sources).outcomes())
        return tuple(found)


ENABLE = Enable()


@dataclass(frozen=True)
class _Finder:
    """Judge the registers of one block."""

    context: traps.Context
    sources: Sources

    @property
    def block(self) -> ClockedBlock:
        return self.context.block

    @property
    def temporaries(self) -> Temporaries:
        return self.context.temporaries

    def outcomes(self) -> Iterator[Outcome]:
        """Yield an outcome per register, and an anchor when a part of the block must stay."""
        block_reason = traps.of_block(self.context)
        for group in groups(self.block, self.source):
            yield self.judge(group, block_reason)
        yield from self.blocking_registers()
        if self.anchored():
            yield Anchor(self.block_id)

    @property
    def source(self) -> SourceText:
        return self.context.design.source.by_path[self.block.span.file]

    @property
    def block_id(self) -> BlockId:
        return BlockId(self.context.definition.name, self.block.span)

    def anchored(self) -> bool:
        """Say whether the block does more than write registers that may move."""
        outside = self.temporaries.names - self.temporaries.local
        return bool(outside) or any(isinstance(s, Opaque) for s in self.block.body.walk())

    def judge(self, group: Group, block_reason: Reason | None) -> Outcome:
        """Give the outcome of one register."""
        if self.block.clock and gated_by(self.block.clock.signal.key, self.sources.gated):
            return self.refuse(group, Reason("already-gated", f"on {self.block.clock.signal.key}"), holds=True)
        if group.array:
            return self.refuse(group, self.context.reason("array", group.assigns[0].span), holds=True)
        reason = block_reason or traps.of_group(self.context, group)
        if reason is not None:
            return self.refuse(group, reason, holds=self.holds(group))
        try:
            wake = wake_of(self.block, group, self.temporaries, self.source)
        except CannotCopyError as error:
            span = error.expr.span if error.expr else self.block.span
            detail = self.spelling(span) if error.expr else ""
            return self.refuse(group, self.context.reason(error.word, span, detail), holds=self.holds(group))
        return self.foreign(group, wake) or self.proposal(group, wake)

    def spelling(self, span: Span) -> str:
        """Give a condition as the source spells it, on one line and not too long."""
        return " ".join(self.source.slice(span).decode("utf-8", "replace").split())[:80]

    def foreign(self, group: Group, wake: Wake) -> Outcome | None:
        """Refuse a register whose wake condition or value comes from where a sleeping bank cannot follow."""
        if not self.sources.matter() or wake.condition.always or wake.condition.never:
            return None
        trap = self.sources.trap(self.block, wake.condition.reads, self.value_names(group), wake.temporaries)
        if trap is None:
            return None
        word, detail = trap
        return self.refuse(group, self.context.reason(word, group.assigns[0].span, detail), holds=True)

    def value_names(self, group: Group) -> frozenset[str]:
        kept = around(self.block.body, group.writes)
        names = control_reads(kept)
        for statement in kept:
            if isinstance(statement, Assign):
                names |= value_reads(statement)
        return names

    def holds(self, group: Group) -> bool:
        """Say whether a refused register was seen to hold."""
        try:
            return wake_of(self.block, group, self.temporaries, self.source).liveness is Liveness.SOMETIMES
        except CannotCopyError:
            return True

    def blocking_registers(self) -> Iterator[Outcome]:
        """Refuse variables that hold state although they are written with blocking assignment."""
        for name in sorted(self.temporaries.holding - self.temporaries.local):
            variable = self.context.module.variables.get(name)
            bits = variable.width if variable else 1
            register = RegisterId(self.block_id, (Part(self.source_form(name)),))
            reason = self.context.reason("blocking-source", self.block.span, f"{name} is written with =")
            yield Refusal(register, Verdict.REFUSED, reason, (self.occurrence(bits),), holds=True)

    def source_form(self, name: str) -> str:
        scope = self.block.scope
        return plain_scope(scope) + name.removeprefix(scope) if scope and name.startswith(scope) else name

    def occurrence(self, bits: int) -> Occurrence:
        module = self.context.module
        return Occurrence(module.key, self.block.scope, len(module.instances), bits)

    def refuse(self, group: Group, reason: Reason, *, holds: bool) -> Refusal:
        verdict = PAGES[reason.word].verdict or Verdict.REFUSED
        register = RegisterId(self.block_id, group.parts)
        return Refusal(register, verdict, reason, (self.occurrence(group.bits),), holds)

    def proposal(self, group: Group, wake: Wake) -> Proposal:
        clock = self.block.clock
        if clock is None:
            raise ValueError("a block without clock has been refused before")
        return Proposal(
            register=RegisterId(self.block_id, group.parts),
            method="enable",
            clock=clock.signal.key,
            edge=clock.edge,
            scope=plain_scope(self.block.scope),
            conditions=(wake.condition,),
            occurrences=(self.occurrence(group.bits),),
            liveness=wake.liveness,
            writes=group.spans,
            needs=tuple(sorted(wake.temporaries - self.temporaries.local)),
        )
