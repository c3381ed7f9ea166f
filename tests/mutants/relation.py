"""What a mutant does to the edges that reach a register, asked of the solver without the prover's comparison.

A register changes at the edges of its root clock that every cell of its chain lets pass, when `wake` or `test` of each
is 1. A mutant under which all edges still pass that passed before is harmless: gated blocks keep their own conditions.
"""

from collections.abc import Sequence
from dataclasses import dataclass
from enum import Enum

from rewriter.logic.aig import TRUE, Lit
from rewriter.logic.netlist import Bit
from rewriter.model.cells import PORTS, RISING
from rewriter.prove.pair import GATING, Key, Shared, Side


class Relation(Enum):
    """The mutant's edges beside the rewrite's; for a module, that of its worst register."""

    SAME = "the same edges pass"
    WIDER = "more edges pass"
    LESS = "an edge is missing"
    OTHER = "another clock, or another edge of it"

    @property
    def harmless(self) -> bool:
        """Say whether no edge is missing."""
        return self in (Relation.SAME, Relation.WIDER)


@dataclass(frozen=True)
class _Edges:
    """Which edges reach a register: of which clock, and when."""

    root: Lit
    rising: bool
    fits: bool  # every cell of the chain passes the edge at which the register changes
    surely: Lit  # 1 when they pass
    perhaps: Lit  # 1 when they pass, or when an x decides


class Beside:
    """The edges of all registers and memories of a module, in the rewrite and in the mutant.

    Args:
        shared: the graph and solver of both.
        good: the rewrite.
        bad: the mutant.
    """

    def __init__(self, shared: Shared, good: Side, bad: Side) -> None:
        self.shared = shared
        before, after = _clocks(good), _clocks(bad)
        self._pairs = {(_edges(good, *clock), _edges(bad, *after[key])) for key, clock in before.items()}

    def relation(self, assumed: Sequence[Lit] = ()) -> Relation:
        """Say what the mutant does to the worst register; `assumed` literals are 1 throughout."""
        found = [_compare(self.shared, good, bad, assumed) for good, bad in self._pairs]
        return max(found, key=list(Relation).index, default=Relation.SAME)


def _compare(shared: Shared, good: _Edges, bad: _Edges, assumed: Sequence[Lit]) -> Relation:
    if (good.root, good.rising, good.fits) != (bad.root, bad.rising, bad.fits):
        return Relation.OTHER
    if _possible(shared, good.perhaps, bad.surely ^ 1, assumed):
        return Relation.LESS
    return Relation.WIDER if _possible(shared, bad.perhaps, good.surely ^ 1, assumed) else Relation.SAME


def _possible(shared: Shared, a: Lit, b: Lit, assumed: Sequence[Lit]) -> bool:
    answer = shared.solver.ask([a, b, *assumed])
    assert answer is not None, "the solver reached its limit"
    return answer is not False


def _clocks(side: Side) -> dict[Key, tuple[Bit, bool]]:
    """Give the clock net of every register bit and memory port, and whether it is used at its rising edge."""
    found: dict[Key, tuple[Bit, bool]] = {key: (r.clock, r.rising) for key, r in side.by_key.items()}
    for name, memory in side.memories.items():
        polarity = memory.numbers["WR_CLK_POLARITY"]
        nets = enumerate(memory.inputs["WR_CLK"])
        found |= {("memory port", name, port): (net, bool(polarity >> port & 1)) for port, net in nets}
    return found


def _edges(side: Side, net: Bit, rising: bool) -> _Edges:  # noqa: FBT001 (a pair)
    cells = {cell.outputs[PORTS.output][0]: cell for cell in side.module.instances.values() if cell.type in GATING}
    aig = side.shared.aig
    surely, perhaps, fits = TRUE, TRUE, True
    while net in cells:
        cell = cells[net]
        pins = [side.cone.bit(cell.inputs[pin][0]) for pin in (PORTS.wake, PORTS.test)]
        surely = aig.both(surely, aig.any_of(aig.both(value, unknown ^ 1) for value, unknown in pins))
        perhaps = aig.both(perhaps, aig.any_of(lit for pin in pins for lit in pin))
        fits = fits and (cell.type == RISING) == rising
        net = cell.inputs[PORTS.clock][0]
    return _Edges(side.cone.bit(net)[0], rising, fits, surely, perhaps)
