"""What a mutant does to the edges that reach a register, asked of the solver without the prover's comparison.

A register changes at the edges of its root clock that every cell of its chain lets pass, when `wake` or `test` of each
is 1. A mutant under which all edges still pass that passed before is harmless: gated blocks keep their own conditions.
"""

from collections.abc import Sequence
from dataclasses import dataclass
from enum import Enum

from rewriter.logic.aig import FALSE, TRUE, Lit
from rewriter.logic.netlist import Bit
from rewriter.logic.state import step
from rewriter.model.cells import PORTS, RISING
from rewriter.prove.pair import GATING, Key, Shared, Side


class Relation(Enum):
    """The mutant's edges beside the rewrite's; for a module, that of its worst register."""

    SAME = "the same edges pass"
    WIDER = "more edges pass"
    IDLE = "no edge is missing but those that load an x, or what is there already"
    LESS = "an edge is missing"
    OTHER = "another clock, or another edge of it"

    @property
    def harmless(self) -> bool:
        """Say whether no edge is missing that the original needs."""
        return self in (Relation.SAME, Relation.WIDER, Relation.IDLE)


@dataclass(frozen=True)
class _Edges:
    """Which edges reach a register: of which clock, and when."""

    root: Lit
    rising: bool
    fits: bool  # every cell of the chain passes the edge at which the register changes
    surely: Lit  # 1 when they pass
    perhaps: Lit  # 1 when they pass, or when an x decides
    tested: Lit  # 1 when a test pin of the chain is


class Beside:
    """The edges of all registers and memories of a module, in the rewrite and in the mutant.

    Args:
        shared: the graph and solver of both.
        good: the rewrite.
        bad: the mutant.
    """

    def __init__(self, shared: Shared, good: Side, bad: Side) -> None:
        self.shared = shared
        self.good = good
        self._pairs: dict[tuple[_Edges, _Edges], list[Key]] = {}
        before, after = _clocks(good), _clocks(bad)
        for key, clock in before.items():
            self._pairs.setdefault((_edges(good, *clock), _edges(bad, *after[key])), []).append(key)

    def relation(self, assumed: Sequence[Lit] = ()) -> Relation:
        """Say what the mutant does to the worst register; `assumed` literals are 1 throughout."""
        found = [self._compare(good, bad, keys, assumed) for (good, bad), keys in self._pairs.items()]
        return max(found, key=list(Relation).index, default=Relation.SAME)

    def _compare(self, good: _Edges, bad: _Edges, keys: Sequence[Key], assumed: Sequence[Lit]) -> Relation:
        if (good.root, good.rising, good.fits) != (bad.root, bad.rising, bad.fits):
            return Relation.OTHER
        missing = (good.perhaps, bad.surely ^ 1)
        if self._possible(*missing, *assumed):
            # Under the override every edge is needed, whatever it loads.
            needed = self.shared.aig.any_of([good.tested, *(self._loads(key) for key in keys)])
            return Relation.LESS if self._possible(*missing, needed, *assumed) else Relation.IDLE
        return Relation.WIDER if self._possible(bad.perhaps, good.surely ^ 1, *assumed) else Relation.SAME

    def _loads(self, key: Key) -> Lit:
        """Give when an edge would give a register bit another value, one that is no x; memories may always."""
        register = self.good.by_key.get(key)
        if register is None:
            return TRUE
        value, unknown = step(register, self.good.cone).data
        own = self.good.cone.bit(register.net)[0]
        return self.shared.aig.both(unknown ^ 1, self.shared.aig.differ(value, own))

    def _possible(self, *lits: Lit) -> bool:
        answer = self.shared.solver.ask(lits)
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
    surely, perhaps, tested, fits = TRUE, TRUE, FALSE, True
    while net in cells:
        cell = cells[net]
        pins = [side.cone.bit(cell.inputs[pin][0]) for pin in (PORTS.wake, PORTS.test)]
        surely = aig.both(surely, aig.any_of(aig.both(value, unknown ^ 1) for value, unknown in pins))
        perhaps = aig.both(perhaps, aig.any_of(lit for pin in pins for lit in pin))
        tested = aig.either(tested, pins[1][0])
        fits = fits and (cell.type == RISING) == rising
        net = cell.inputs[PORTS.clock][0]
    return _Edges(side.cone.bit(net)[0], rising, fits, surely, perhaps, tested)
