"""Evaluate the nets of one module as literals, on demand."""

from collections.abc import Callable, Mapping

from rewriter.logic.aig import FALSE, TRUE, Aig
from rewriter.logic.blast import (
    LANES,
    WHOLE,
    Bit,
    UnsupportedCellError,
    Word,
    bit_and,
    bit_mux,
    bit_or,
    bit_xor,
)
from rewriter.logic.netlist import Bit as Net
from rewriter.logic.netlist import Cell, Module

CONSTANTS: dict[str, Bit] = {"0": (FALSE, FALSE), "1": (TRUE, FALSE), "x": (FALSE, TRUE), "z": (FALSE, TRUE)}

_ONE = frozenset(("$buf", "$pos", "$not"))
_TWO = {"$and": bit_and, "$or": bit_or, "$xor": bit_xor, "$xnor": bit_xor}

Leaf = Callable[[int, "Cone"], Bit]
"""Gives the value of a net that no combinational cell drives."""


class LoopError(Exception):
    """Report a combinational loop; carries the name of a net in it."""


class Cone:
    """The nets of one module over a graph.

    Args:
        aig: the graph; two modules compared share it.
        module: the netlist.
        leaf: what a net without a combinational driver is.
        shared: results by operator and operands, common to the modules compared.
    """

    def __init__(self, aig: Aig, module: Module, leaf: Leaf, shared: dict[tuple[object, ...], Word]) -> None:
        self.aig = aig
        self.module = module
        self._leaf = leaf
        self._shared = shared
        self._known: dict[int, Bit] = {}
        self.contested = contested(module)
        self.drivers = _drivers(module, self.contested)

    def bit(self, net: Net) -> Bit:
        """Give the literals (value, unknown) of a net."""
        if isinstance(net, str):
            return CONSTANTS[net]
        found = self._known.get(net)
        return found if found is not None else self._evaluate(net)

    def word(self, nets: tuple[Net, ...]) -> Word:
        """Give the literals of several nets."""
        bits = [self.bit(net) for net in nets]
        return Word(tuple(v for v, _ in bits), tuple(u for _, u in bits))

    def _evaluate(self, wanted: int) -> Bit:
        # Depth first with a stack of our own: netlists are deeper than Python's.
        known = self._known
        stack = [wanted]
        open_nets: set[int] = set()
        while stack:
            net = stack[-1]
            if net in known:
                stack.pop()
                continue
            driver = self.drivers.get(net)
            if driver is None:
                known[net] = self._leaf(net, self)
                continue
            cell, lane = driver
            missing = [n for n in _needs(cell, lane) if isinstance(n, int) and n not in known]
            if not missing:
                open_nets.discard(net)
                self._finish(net, cell, lane)
                continue
            if net in open_nets and any(n in open_nets for n in missing):
                raise LoopError(self.describe(net))
            open_nets.add(net)
            stack += missing
        return known[wanted]

    def _finish(self, net: int, cell: Cell, lane: int) -> None:
        if cell.type in LANES:
            self._known[net] = self._lane(cell, lane)
            return
        operands = {port: self.word(nets) for port, nets in cell.inputs.items()}
        key = (cell.type, *sorted(cell.numbers.items()), *sorted((p, w.value, w.unknown) for p, w in operands.items()))
        word = self._shared.get(key)
        if word is None:
            word = self._shared[key] = WHOLE[cell.type](self.aig, cell.numbers, operands)
        for place, out in enumerate(cell.outputs["Y"]):
            if isinstance(out, int) and out not in self.contested:
                self._known[out] = (word.value[place], word.unknown[place])

    def _lane(self, cell: Cell, lane: int) -> Bit:
        aig = self.aig
        kind, inputs = cell.type, cell.inputs
        if kind in ("$mux", "$bwmux"):
            select = inputs["S"][lane if kind == "$bwmux" else 0]
            return bit_mux(aig, self.bit(select), self.bit(inputs["B"][lane]), self.bit(inputs["A"][lane]))
        if kind == "$pmux":
            return self._priority(cell, lane)
        a = self.bit(operand(cell, "A", lane))
        if kind in _ONE:
            return a[0] ^ (kind == "$not"), a[1]
        value, unknown = _TWO[kind](aig, a, self.bit(operand(cell, "B", lane)))
        return value ^ (kind == "$xnor"), unknown

    def _priority(self, cell: Cell, lane: int) -> Bit:
        # The engine puts the first arm at the top; `unique` only promises that arms do not overlap, and IEEE 1800
        # takes the first arm all the same.
        width = len(cell.outputs["Y"])
        result = self.bit(cell.inputs["A"][lane])
        for arm, select in enumerate(cell.inputs["S"]):
            result = bit_mux(self.aig, self.bit(select), self.bit(cell.inputs["B"][arm * width + lane]), result)
        return result

    def describe(self, net: int) -> str:
        """Name a net for a message."""
        names = self.module.names.get(net)
        return str(names[0]) if names else f"an unnamed net of {self.module.definition}"


def operand(cell: Cell, port: str, lane: int) -> Net:
    """Give bit `lane` of an operand, extended as the operator does."""
    nets = cell.inputs[port]
    if lane < len(nets):
        return nets[lane]
    signed = cell.numbers.get("A_SIGNED", 0) and cell.numbers.get("B_SIGNED", 1)
    return nets[-1] if signed and nets else "0"


def _needs(cell: Cell, lane: int) -> list[Net]:
    inputs = cell.inputs
    if cell.type not in LANES:
        return [net for nets in inputs.values() for net in nets]
    if cell.type == "$mux":
        return [inputs["S"][0], inputs["A"][lane], inputs["B"][lane]]
    if cell.type == "$bwmux":
        return [inputs["S"][lane], inputs["A"][lane], inputs["B"][lane]]
    if cell.type == "$pmux":
        return [*inputs["S"], inputs["A"][lane], *inputs["B"][lane :: len(cell.outputs["Y"])]]
    return [operand(cell, port, lane) for port in inputs]


def is_combinational(cell: Cell) -> bool:
    """Tell whether a cell is an operator known here."""
    return cell.type in LANES or cell.type in WHOLE


STATE = frozenset(
    ("$dff", "$dffe", "$adff", "$adffe", "$aldff", "$aldffe", "$sdff", "$sdffe", "$sdffce", "$dffsr", "$dffsre",
     "$dlatch", "$adlatch", "$mem_v2", "$tribuf")
)  # fmt: skip
"""Cells whose outputs are leaves; their obligations are the prover's."""


def contested(module: Module) -> frozenset[int]:
    """Give the nets that more than one cell or port drives (a loop variable of two blocks, a bus of buffers)."""
    seen: set[int] = set()
    twice: set[int] = set()
    ports = (port.bits for port in module.ports.values() if port.direction != "output")
    for nets in (*ports, *(nets for cell in module.cells for nets in cell.outputs.values())):
        for net in nets:
            if isinstance(net, int):
                (twice if net in seen else seen).add(net)
    return frozenset(twice)


def _drivers(module: Module, barred: frozenset[int]) -> Mapping[int, tuple[Cell, int]]:
    drivers: dict[int, tuple[Cell, int]] = {}
    for cell in module.cells:
        if cell.is_instance or cell.type in STATE:
            continue
        if not is_combinational(cell):
            raise UnsupportedCellError(f"a cell of type {cell.type}")
        drivers |= {
            n: (cell, lane) for lane, n in enumerate(cell.outputs["Y"]) if isinstance(n, int) and n not in barred
        }
    return drivers
