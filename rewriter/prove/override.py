"""Check that the test override, active at the top, makes every cell of every chain run."""

from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.logic.aig import FALSE, Lit
from rewriter.logic.solver import Model
from rewriter.model.evidence import Counterexample, Mismatch
from rewriter.prove.hierarchy import Hierarchy
from rewriter.prove.obligation import signals
from rewriter.prove.pair import Side

PortBit = tuple[str, int]


@dataclass(frozen=True)
class OverrideAnswer:
    """What breaks the override, and what could not be decided."""

    mismatches: tuple[Mismatch, ...]
    undecided: tuple[str, ...]


def check_override(hierarchy: Hierarchy, test_port: str | None, *, active_low: bool) -> OverrideAnswer:
    """Follow the override from the top to every cell's test pin.

    Args:
        hierarchy: the rewritten design.
        test_port: top-level input; None to find it from the test pins.
        active_low: its meaning.
    """
    if hierarchy.top not in hierarchy.holding:
        return OverrideAnswer((), ())
    if test_port is not None:
        return _Override(hierarchy).follow((test_port, 0), value=not active_low)
    candidates = sorted(_Override(hierarchy).needed(hierarchy.top)) or [("", 0)]
    answers: list[OverrideAnswer] = []
    for candidate in candidates:
        for value in (True, False):
            answer = _Override(hierarchy).follow(candidate, value=value)
            if not answer.mismatches:
                return answer
            answers.append(answer)
    return answers[0]


class _Override:
    def __init__(self, hierarchy: Hierarchy) -> None:
        self.hierarchy = hierarchy
        self._needed: dict[str, set[PortBit]] = {}

    def needed(self, path: str) -> set[PortBit]:
        """Give the input bits of an instance that its cells' test pins depend on, at any depth."""
        known = self._needed.get(path)
        if known is not None:
            return known
        proof, side = self.hierarchy.proofs[path], self.hierarchy.side(path)
        roots = [lit for cell in proof.cells.values() for lit in cell.gating.test]
        roots += [lit for _, bit, lit in self._passed_on(path, side) if bit]
        sources = (proof.shared.sources[node] for node in proof.shared.aig.support(roots))
        found = self._needed[path] = {(s.name, s.place) for s in sources if s.kind == "port"}
        return found

    def follow(self, port: PortBit, *, value: bool) -> OverrideAnswer:
        """Walk down from the top with the override active."""
        top = self.hierarchy.side(self.hierarchy.top)
        ports = top.module.ports
        name = self.hierarchy.top
        if port[0] not in ports or ports[port[0]].direction != "input":
            detail = f"the top has no input `{port[0]}`" if port[0] else "no input of the top reaches the test pins"
            cells = sorted(c for p in self.hierarchy.holding for c in self.hierarchy.proofs[p].cells)
            return OverrideAnswer((Mismatch(name, "override", f"{detail}; cells: {', '.join(cells)}"),), ())
        mismatches: list[Mismatch] = []
        undecided: list[str] = []
        stack: list[tuple[str, dict[PortBit, bool]]] = [(name, {port: value})]
        while stack:
            path, active = stack.pop()
            side = self.hierarchy.side(path)
            given = [side.cone.bit(side.module.ports[p].bits[i])[0] ^ (not on) for (p, i), on in active.items()]
            self._cells(path, given, mismatches, undecided)
            below: dict[str, dict[PortBit, bool]] = {}
            for child, bit, lit in self._passed_on(path, side):
                settings = below.setdefault(child, {})
                for on in (True, False):
                    if bit and side.shared.solver.ask([*given, lit ^ on]) is False:
                        settings[bit] = on
                        break
            stack += below.items()
        return OverrideAnswer(tuple(mismatches), tuple(undecided))

    def _passed_on(self, path: str, side: Side) -> Iterator[tuple[str, PortBit | None, Lit]]:
        """Give each child that holds cells, and what is connected to the bits its cells' test pins depend on."""
        for name, cell in side.module.instances.items():
            child = self.hierarchy.child(path, name)
            if child is None or child not in self.hierarchy.holding:
                continue
            yield child, None, FALSE
            for port, place in sorted(self.needed(child)):
                yield child, (port, place), side.cone.bit(cell.inputs[port][place])[0]

    def _cells(self, path: str, given: list[Lit], mismatches: list[Mismatch], undecided: list[str]) -> None:
        proof = self.hierarchy.proofs[path]
        shared = proof.shared
        for name, cell in proof.cells.items():
            value, unknown = cell.gating.test
            off = shared.aig.either(value ^ 1, unknown)
            answer = shared.solver.ask([*given, off])
            if answer is None:
                undecided.append(f"{path}.{name}: the override (the limit was reached)")
            elif answer is not False:
                detail = f"{name}: with the override active its test pin can be 0"
                state = tuple(signals(shared, [*given, off], answer.values())) if isinstance(answer, Model) else ()
                example = Counterexample(name, "override", state, "runs", "sleeps")
                mismatches.append(Mismatch(path, "override", detail, example))
