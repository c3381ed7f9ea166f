"""Where a wake condition is launched: clocks, asynchronous resets and blocking writers of its sources.

Within one module body only; the prover traces the same across the hierarchy.
"""

from collections.abc import Iterable
from dataclasses import dataclass, field

from rewriter.analysis.branches import control_reads, value_reads
from rewriter.analysis.existing import GatedClock, root_clock
from rewriter.model.design import ClockedBlock, Design, Driver, Module
from rewriter.model.expr import Expr
from rewriter.model.statement import Assign, Opaque, Statement


@dataclass(frozen=True)
class Launch:
    """How a register is clocked: root clock, and names of its asynchronous resets."""

    clock: str
    resets: frozenset[str]
    blocking: bool


@dataclass
class Sources:
    """Trace sources within one module body; caches cones, so keep one object per body."""

    design: Design
    module: Module
    gated: dict[str, GatedClock]
    launches: dict[str, list[Launch]] = field(default_factory=dict[str, list[Launch]])
    cones: dict[str, frozenset[str]] = field(default_factory=dict[str, frozenset[str]])

    def __post_init__(self) -> None:
        """Note how every register of the body is clocked."""
        for block in self.module.blocks:
            clock = self.clock_of(block)
            for statement in block.body.walk():
                if isinstance(statement, Assign):
                    launch = Launch(clock, resets_of(block), statement.blocking)
                    for target in statement.targets:
                        if not target.is_local:
                            self.launches.setdefault(target.variable, []).append(launch)

    def clock_of(self, block: ClockedBlock) -> str:
        """Give the root clock of a block, through cells of ours."""
        return root_clock(block.clock.signal.key, self.gated) if block.clock else ""

    def matter(self) -> bool:
        """Say whether any check can fail here: several clocks or resets, blocking writers, a clock read as data."""
        launches = [launch for found in self.launches.values() for launch in found]
        clocks = {launch.clock for launch in launches}
        resets = {launch.resets for launch in launches if launch.resets}
        return len(clocks) > 1 or len(resets) > 1 or any(x.blocking for x in launches) or bool(self.module.clock_uses)

    def leaves(self, names: Iterable[str]) -> frozenset[str]:
        """Give the registers, inputs and undriven names that the names depend on combinationally."""
        found: set[str] = set()
        for name in names:
            found |= self._cone(name)
        return frozenset(found)

    def _cone(self, name: str) -> frozenset[str]:
        if name in self.cones:
            return self.cones[name]
        self.cones[name] = frozenset()  # a loop adds nothing new
        if name in self.launches:
            result = frozenset((name,))
        else:
            drivers = self.design.drivers.drivers_of(self.module.key, name)
            reads = frozenset[str]().union(*(_reads(d) for d in drivers)) - {name}
            result = self.leaves(reads) if reads else frozenset((name,))
        self.cones[name] = result
        return result

    def trap(
        self, block: ClockedBlock, wake_reads: frozenset[str], value_names: frozenset[str], own: frozenset[str]
    ) -> tuple[str, str] | None:
        """Give reason word and detail when a bank must not sleep on these sources.

        Args:
            block: the bank's block.
            wake_reads: variables that its wake condition reads.
            value_names: variables that its assignments read.
            own: temporaries that a copy of the block computes itself.
        """
        clock, resets = self.clock_of(block), resets_of(block)
        leaves = self.leaves(wake_reads - own)
        if block.clock and (block.clock.signal.reads() | {clock}) & leaves:
            return "clock-as-data", clock
        for name in sorted(leaves):
            for launch in self.launches.get(name, ()):
                if launch.blocking:
                    return "blocking-source", f"{name} is written with ="
                if launch.clock != clock:
                    return "foreign-domain", f"{name} runs on {launch.clock}, the bank on {clock}"
                if resets and launch.resets - resets:
                    theirs, ours = (", ".join(sorted(names)) for names in (launch.resets, resets))
                    return "foreign-reset", f"{name} is reset by {theirs}, the bank by {ours}"
        for name in sorted(self.leaves(value_names - own)):
            if any(launch.blocking for launch in self.launches.get(name, ())):
                return "blocking-source", f"{name} is written with ="
        return None


def resets_of(block: ClockedBlock) -> frozenset[str]:
    """Give the names of a block's asynchronous resets."""
    return frozenset(reset.event.signal.key for reset in block.resets)


def _reads(driver: Driver) -> frozenset[str]:
    match driver.value:
        case Expr():
            return driver.value.reads()
        case Statement():
            statements = tuple(driver.value.walk())
            reads = control_reads(statements)
            for statement in statements:
                if isinstance(statement, Assign):
                    reads |= value_reads(statement)
                elif isinstance(statement, Opaque):
                    reads |= statement.reads
            return reads
        case _:
            return frozenset()
