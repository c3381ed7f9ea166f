"""Wake conditions of one module: those proved equal, and those wider than what they wake for."""

import random

from rewriter.logic.aig import FALSE, TRUE, Aig, Lit
from rewriter.logic.blast import Bit
from rewriter.logic.cone import Cone
from rewriter.logic.netlist import Bit as Net
from rewriter.logic.solver import Model
from rewriter.logic.state import Register
from rewriter.model.evidence import Counterexample
from rewriter.prove.compare import Comparison
from rewriter.prove.module import CellFinding, ModuleProof
from rewriter.prove.obligation import signals
from rewriter.prove.pair import Shared, Side

_PATTERNS = 2048
_SEED = 20


def equal_wakes(proof: ModuleProof) -> list[tuple[str, ...]]:
    """Group the cells of a module whose wake conditions are always equal.

    Returns:
        Groups of two or more instance names.
    """
    lits = {name: cell.gating.wake[0] for name, cell in proof.cells.items() if cell.gating.wake[1] == FALSE}
    shared = proof.shared
    by_signature: dict[int, list[list[str]]] = {}
    for name, signature in zip(lits, _signatures(shared.aig, list(lits.values())), strict=True):
        classes = by_signature.setdefault(signature, [])
        for members in classes:
            if lits[members[0]] == lits[name] or _always_equal(shared, lits[members[0]], lits[name]):
                members.append(name)
                break
        else:
            classes.append([name])
    return [tuple(members) for classes in by_signature.values() for members in classes if len(members) > 1]


def _always_equal(shared: Shared, a: Lit, b: Lit) -> bool:
    return shared.solver.ask([shared.aig.differ(a, b)]) is False


def _signatures(aig: Aig, lits: list[Lit]) -> list[int]:
    source = random.Random(_SEED)  # noqa: S311 (patterns, no secrets)
    values = {node: source.getrandbits(_PATTERNS) for node in aig.support(lits)}
    return aig.simulate(lits, values, (1 << _PATTERNS) - 1)


def find_wider(proof: ModuleProof) -> None:
    """Look for states in which a cell wakes though no assignment writes any of its registers.

    A finding, not a disproof. Conditions are taken from the multiplexers of the original's next state; what is
    masked by other logic, or left open by an x, counts as written.
    """
    comparison = proof.comparison
    by_cell, writes = _registers_by_cell(comparison), _memory_writes(comparison)
    for name, cell in proof.cells.items():
        registers, stores = by_cell.get(name, []), writes.get(name, [])
        if not registers and not stores:
            continue
        written = _Written(comparison.gold)
        idle = comparison.aig.any_of([*stores, *(written.by(register) for register in registers)]) ^ 1
        # An x that cannot happen stands in many copied branches; where one can, the cell does not surely wake.
        question = [cell.gating.wake[0], cell.gating.wake[1] ^ 1, idle]
        answer = proof.shared.solver.ask(question)
        if isinstance(answer, Model):
            cell.wider = _example(proof.shared, cell, question, answer.values())


def _example(shared: Shared, cell: CellFinding, question: list[Lit], values: dict[int, int]) -> Counterexample:
    state = tuple(signals(shared, question, values))
    return Counterexample(cell.gating.name, "wider", state, "writes nothing", "wakes")


def _registers_by_cell(comparison: Comparison) -> dict[str, list[Register]]:
    found: dict[str, list[Register]] = {}
    for net, clock in comparison.clocks.items():
        gold = comparison.gold.by_key.get(comparison.gate.keys[net])
        if gold is not None:
            for gating in clock.cells:
                found.setdefault(gating.name, []).append(gold)
    return found


def _memory_writes(comparison: Comparison) -> dict[str, list[Lit]]:
    """Give, by cell, when a port of the memories behind it writes in the original."""
    found: dict[str, list[Lit]] = {}
    for chain, bank in comparison.banks.by_chain.items():
        writes = [
            lit for o in bank.obligations if o.kind == "next" and comparison.is_memory(o.variable) for lit in o.gold
        ]
        for name in chain if writes else ():
            found.setdefault(name, []).extend(writes)
    return found


class _Written:
    """When an assignment writes a register: walk the multiplexers of its next state down to its own output."""

    def __init__(self, side: Side) -> None:
        self.cone: Cone = side.cone
        self.aig = side.shared.aig
        self._known: dict[tuple[int, int], Lit] = {}

    def by(self, register: Register) -> Lit:
        """Give the condition under which an assignment writes a register bit; resets that are asynchronous aside."""
        inputs, parameters = register.cell.inputs, register.cell.parameters
        written = self._net(inputs["D"][register.lane], register.net)
        for port, polarity in (("EN", "EN_POLARITY"), ("ALOAD", "ALOAD_POLARITY")):
            if port not in inputs:
                continue
            active = self._on(self.cone.bit(inputs[port][0]), high=bool(parameters[polarity]))
            if port == "EN":
                written = self.aig.both(written, active)
            elif inputs["AD"][register.lane] == register.net:
                # Not written by the reset branch, so asleep in reset.
                written = self.aig.both(written, self._surely(self.cone.bit(inputs[port][0]), parameters[polarity]))
        if "SRST" in inputs:
            active = self._on(self.cone.bit(inputs["SRST"][0]), high=bool(parameters["SRST_POLARITY"]))
            written = self.aig.either(written, active)
        return written

    def _on(self, bit: Bit, *, high: bool) -> Lit:
        return self.aig.either(bit[0] ^ (not high), bit[1])

    def _surely(self, bit: Bit, polarity: int | str) -> Lit:
        return self.aig.either(bit[0] ^ bool(polarity), bit[1])

    def _net(self, net: Net, own: int) -> Lit:
        if net == own:
            return FALSE
        if isinstance(net, str):
            return TRUE
        key = (net, own)
        found = self._known.get(key)
        if found is None:
            self._known[key] = TRUE  # a loop writes
            found = self._known[key] = self._driver(net, own)
        return found

    def _driver(self, net: int, own: int) -> Lit:
        driver = self.cone.drivers.get(net)
        if driver is None:
            return TRUE
        cell, lane = driver
        inputs = cell.inputs
        if cell.type in ("$buf", "$pos") and lane < len(inputs["A"]):
            return self._net(inputs["A"][lane], own)
        if cell.type in ("$mux", "$bwmux"):
            select = inputs["S"][lane if cell.type == "$bwmux" else 0]
            return self._choose(select, self._net(inputs["B"][lane], own), self._net(inputs["A"][lane], own))
        if cell.type == "$pmux":
            width = len(cell.outputs["Y"])
            result = self._net(inputs["A"][lane], own)
            for arm, select in enumerate(inputs["S"]):
                result = self._choose(select, self._net(inputs["B"][arm * width + lane], own), result)
            return result
        return TRUE

    def _choose(self, select: Net, one: Lit, zero: Lit) -> Lit:
        value, unknown = self.cone.bit(select)
        return self.aig.either(self.aig.choose(value, one, zero), self.aig.both(unknown, self.aig.either(one, zero)))
