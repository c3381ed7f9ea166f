"""Where a wake condition comes from: its registers must share the bank's clock and asynchronous reset."""

from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property

from rewriter.logic.aig import FALSE, Lit
from rewriter.logic.cone import Cone
from rewriter.logic.state import Register, step
from rewriter.prove.hierarchy import Hierarchy
from rewriter.prove.module import CellFinding
from rewriter.prove.pair import Side, Source

Root = tuple[object, ...]
"""What a clock or reset is at its origin, the same for all instances that it reaches."""

_FAR = 10_000


@dataclass(frozen=True)
class Objection:
    """Why a wake condition must not gate a bank: a reason word and one line."""

    reason: str
    detail: str


@dataclass(frozen=True)
class _Leaf:
    """A place where a wake condition begins: a register, memory, port of the top or of a black box."""

    path: str
    source: Source
    register: Register | None


class Domains:
    """Clock and reset domains over the whole rewritten design."""

    def __init__(self, hierarchy: Hierarchy) -> None:
        self.hierarchy = hierarchy
        self._roots: dict[tuple[str, Lit], tuple[Root, bool]] = {}
        self._supports: dict[tuple[int, Lit], list[int]] = {}
        self._registers: dict[tuple[str, int], tuple[Root, Root | None]] = {}

    def objection(self, path: str, cell: CellFinding) -> Objection | None:
        """Look for a reason why a cell's wake condition must not gate its bank."""
        domain = self.origin(path, cell.gating.clock[0])[0]
        resets = set(self._resets(path, cell))
        for leaf in self._leaves(path, cell.gating.wake[0]):
            objection = self._object(leaf, domain, resets)
            if objection:
                return objection
        return None

    def origin(self, path: str, lit: Lit) -> tuple[Root, bool]:
        """Follow a clock or reset to where it is made, through cells, other gating and hierarchy.

        Returns:
            What it is there, and whether it arrives complemented.
        """
        key = (path, lit)
        known = self._roots.get(key)
        if known is None:
            known = self._roots[key] = self._trace(path, lit)
        return known

    def _trace(self, path: str, lit: Lit) -> tuple[Root, bool]:
        flipped = False
        for _ in range(_FAR):
            flipped ^= bool(lit & 1)
            lit &= ~1
            side = self.hierarchy.side(path)
            gating = side.gatings.get(lit >> 1)
            if gating is not None:
                lit = gating.clock[0]
                continue
            source = side.shared.sources.get(lit >> 1)
            if source is None:
                inner = _ungated(side, lit)
                if inner is None:
                    return (path, "logic", lit), flipped
                lit = inner
                continue
            step_to = self._across(path, source)
            if step_to is None:
                return (path, source.kind, source.name, source.port, source.place), flipped
            path, lit = step_to
        return (path, "far", lit), flipped

    def _across(self, path: str, source: Source) -> tuple[str, Lit] | None:
        if source.kind == "port":
            return self.hierarchy.driver_above(path, source.name, source.place)
        if source.kind == "instance":
            return self.hierarchy.driver_below(path, source.name, source.port, source.place)
        return None

    def _leaves(self, path: str, lit: Lit) -> Iterator[_Leaf]:
        seen: set[tuple[str, int]] = set()
        stack = [(path, lit)]
        while stack:
            where, root = stack.pop()
            side = self.hierarchy.side(where)
            for node in self._support(side, root):
                if (where, node) in seen:
                    continue
                seen.add((where, node))
                source = side.shared.sources[node]
                address = side.shared.addresses.get(node)
                if address is not None:
                    stack += [(where, bit) for bit in address.value]
                across = self._across(where, source)
                if across is not None:
                    stack.append(across)
                else:
                    yield _Leaf(where, source, _register(side, source))

    def _support(self, side: Side, lit: Lit) -> list[int]:
        key = (id(side), lit & ~1)
        known = self._supports.get(key)
        if known is None:
            known = self._supports[key] = side.shared.aig.support([lit])
        return known

    def _object(self, leaf: _Leaf, domain: Root, resets: set[Root]) -> Objection | None:
        name = f"{leaf.path}.{leaf.source.label}"
        if leaf.source.kind == "cell":
            return Objection("clock-as-data", f"it reads the gated clock of {name}")
        if leaf.register is not None:
            return self._object_register(leaf, name, domain, resets)
        if leaf.source.kind == "memory":
            return self._object_memory(leaf, name, domain)
        if leaf.source.kind == "port":
            place = (leaf.path, "port", leaf.source.name, "", leaf.source.place)
            return Objection("clock-as-data", f"it reads the clock {name}") if place in self.clocks else None
        if leaf.source.kind == "instance":
            return self._object_black_box(leaf, name, domain)
        return None

    def _object_register(self, leaf: _Leaf, name: str, domain: Root, resets: set[Root]) -> Objection | None:
        register = leaf.register
        if register is None:
            return None
        if register.is_latch:
            return Objection("foreign-domain", f"it reads the latch {name}, which changes within a cycle")
        clock, reset = self.of(leaf.path, register)
        if clock != domain:
            return Objection("foreign-domain", f"it reads {name}, which runs on another clock")
        if reset is not None and resets and resets != {reset}:
            return Objection("foreign-reset", f"it reads {name}, which has another asynchronous reset")
        return None

    def _object_memory(self, leaf: _Leaf, name: str, domain: Root) -> Objection | None:
        side = self.hierarchy.side(leaf.path)
        memory = side.memories[leaf.source.name]
        clocks = {self.origin(leaf.path, side.cone.bit(net)[0])[0] for net in memory.inputs["WR_CLK"]}
        if clocks - {domain}:
            return Objection("foreign-domain", f"it reads the memory {name}, which is written on another clock")
        return None

    def _object_black_box(self, leaf: _Leaf, name: str, domain: Root) -> Objection | None:
        side = self.hierarchy.side(leaf.path)
        nets = [net for nets in side.module.instances[leaf.source.name].inputs.values() for net in nets]
        roots = {self.origin(leaf.path, side.cone.bit(net)[0])[0] for net in nets}
        if roots & (self.clocks - {domain}):
            return Objection("foreign-domain", f"it reads {name} of a black box that has another clock")
        return None

    def of(self, path: str, register: Register) -> tuple[Root, Root | None]:
        """Give the clock and asynchronous reset of a register."""
        key = (path, register.net)
        known = self._registers.get(key)
        if known is None:
            cone = self.hierarchy.side(path).cone
            clock = self.origin(path, cone.bit(register.clock)[0])[0]
            known = self._registers[key] = (clock, self._reset(path, register, cone))
        return known

    def _reset(self, path: str, register: Register, cone: Cone) -> Root | None:
        reset = step(register, cone).reset
        return self.origin(path, reset[0]) if reset != (FALSE, FALSE) else None

    def _resets(self, path: str, cell: CellFinding) -> Iterator[Root]:
        comparison = self.hierarchy.proofs[path].comparison
        for register in comparison.gate.registers:
            clock = comparison.clocks.get(register.net)
            if clock and any(gating.name == cell.gating.name for gating in clock.cells):
                reset = self.of(path, register)[1]
                if reset is not None:
                    yield reset

    @cached_property
    def clocks(self) -> frozenset[Root]:
        """Give the clocks of all registers of the design."""
        return frozenset(
            self.of(path, register)[0]
            for path, proof in self.hierarchy.proofs.items()
            for register in proof.comparison.gate.registers
            if not register.is_latch
        )


def _register(side: Side, source: Source) -> Register | None:
    if source.kind != "register":
        return None
    for kind in ("register", "gate-register"):
        found = side.by_key.get((kind, source.name, source.place))
        if found is not None:
            return found
    return next((r for k, r in side.by_key.items() if k[1:] == (source.name, source.place)), None)


def _ungated(side: Side, lit: Lit) -> Lit | None:
    """See through a gate that was there before: a clock ANDed (or ORed) with a latch that the clock itself opens."""
    aig = side.shared.aig
    operands = (aig.left[lit >> 1], aig.right[lit >> 1])
    for clock, other in (operands, operands[::-1]):
        latches = [r for n in aig.support([other]) if (r := _register(side, side.shared.sources[n])) and r.is_latch]
        if any(side.cone.bit(latch.clock)[0] >> 1 == clock >> 1 for latch in latches):
            return clock
    return None
