"""One module in both texts: a common graph, registers and ports paired by name."""

from collections.abc import Mapping
from dataclasses import dataclass
from typing import cast

from rewriter.logic.aig import FALSE, TRUE, Aig, Lit
from rewriter.logic.blast import Bit, UnsupportedCellError, Word, bit_and, bit_or
from rewriter.logic.cone import Cone, LoopError, contested
from rewriter.logic.netlist import Cell, Module, Name
from rewriter.logic.solver import Solver
from rewriter.logic.state import Register, registers
from rewriter.model.cells import FALLING, PORTS, RISING

GATING = (RISING, FALLING)

Key = tuple[object, ...]


@dataclass(frozen=True)
class Source:
    """Where a leaf of the logic comes from.

    Args:
        kind: `port`, `register`, `instance`, `memory`, `cell` (a gated clock), `buffer` or `open` (undriven).
        name: port, variable, or instance path.
        port: of the instance, else empty.
        place: bit.
    """

    kind: str
    name: str
    port: str
    place: int

    @property
    def label(self) -> str:
        """Name the word it belongs to, for a person."""
        return f"{self.name}.{self.port}" if self.port else self.name


class Shared:
    """What both sides of a module have in common: the graph, its variables by what they stand for, the solver."""

    def __init__(self, query_seconds: float, deadline: float) -> None:
        self.aig = Aig()
        self.solver = Solver(self.aig, query_seconds, deadline)
        self.sources: dict[int, Source] = {}
        self.addresses: dict[int, Word] = {}
        self.words: dict[tuple[object, ...], Word] = {}
        self._variables: dict[Key, Lit] = {}
        self._reads: dict[str, list[tuple[Word, tuple[Lit, ...]]]] = {}

    def variable(self, key: Key, source: Source) -> Lit:
        """Give the variable that stands for something, the same on both sides for one key."""
        lit = self._variables.get(key)
        if lit is None:
            lit = self._variables[key] = self.aig.variable()
            self.sources[lit >> 1] = source
        return lit

    def read(self, memory: str, address: Word, width: int) -> tuple[Lit, ...]:
        """Give what a memory holds at an address: free, but equal for equal addresses."""
        reads = self._reads.setdefault(memory, [])
        for known, data in reads:
            if known == address:
                return data
        key = (memory, len(reads))
        data = tuple(
            self.variable((*key, i), Source("memory", memory.lstrip("\\"), f"read{len(reads)}", i))
            for i in range(width)
        )
        self.addresses.update((lit >> 1, address) for lit in data)
        for known, other in reads:
            if len(known) == len(address):
                self._tie(known, other, address, data)
        reads.append((address, data))
        return data

    def _tie(self, a: Word, at_a: tuple[Lit, ...], b: Word, at_b: tuple[Lit, ...]) -> None:
        aig = self.aig
        apart = aig.any_of(aig.differ(x, y) for x, y in zip(a.value, b.value, strict=True))
        for x, y in zip(at_a, at_b, strict=True):
            self.solver.require((apart, x, y ^ 1))
            self.solver.require((apart, x ^ 1, y))


@dataclass(frozen=True)
class Gating:
    """One of our cells on one side: its instance, kind, and the literals at its pins."""

    name: str
    rising: bool
    clock: Bit
    wake: Bit
    test: Bit


class Side:
    """One text's module.

    Args:
        shared: what it has in common with the other side.
        module: the netlist.
        partner: the other side, read first; its registers give the names.
        transparent: our cells pass every clock edge.
    """

    def __init__(self, shared: Shared, module: Module, partner: "Side | None", *, transparent: bool = False) -> None:
        self.shared = shared
        self.module = module
        self.transparent = transparent
        self.label = "gate" if partner else "gold"
        self.contested = contested(module)
        self.registers = [r for r in registers(module) if r.net not in self.contested]
        self.keys = _keys(self.registers, partner, self.label)
        self.by_key: Mapping[Key, Register] = {self.keys[r.net]: r for r in self.registers}
        self.memories = {str(c.parameters["MEMID"]).lstrip("\\"): c for c in module.cells if c.type == "$mem_v2"}
        self.gatings: dict[int, Gating] = {}
        self._busy: set[int] = set()
        self._origins = self._collect()
        self.cone = Cone(shared.aig, module, self._leaf, shared.words)

    def gating_cells(self) -> dict[str, Gating]:
        """Give our cells by instance name."""
        return {name: self.gating(cell) for name, cell in self.module.instances.items() if cell.type in GATING}

    def gating(self, cell: Cell) -> Gating:
        """Read the pins of one of our cells."""
        pins = [self.cone.bit(cell.inputs.get(pin, ("x",))[0]) for pin in (PORTS.clock, PORTS.wake, PORTS.test)]
        return Gating(cell.name, cell.type == RISING, *pins)

    def _collect(self) -> dict[int, Register | Source | tuple[Cell, str, int]]:
        found: list[tuple[object, Register | Source | tuple[Cell, str, int]]] = [(r.net, r) for r in self.registers]
        for name, port in self.module.ports.items():
            if port.direction != "output":
                found += [(net, Source("port", name, "", place)) for place, net in enumerate(port.bits)]
        for cell in self.module.cells:
            if cell.is_instance or cell.type in ("$mem_v2", "$tribuf"):
                for port, nets in cell.outputs.items():
                    found += [(net, (cell, port, place)) for place, net in enumerate(nets)]
        return {net: origin for net, origin in found if isinstance(net, int) and net not in self.contested}

    def _leaf(self, net: int, cone: Cone) -> Bit:
        origin = self._origins.get(net)
        if isinstance(origin, Register):
            key = self.keys[net]
            name = cast("str", key[1])
            return self._free(key, Source("register", name, "", cast("int", key[2])))
        if isinstance(origin, Source):
            return self._free((origin.kind, origin.name, origin.place), origin)
        if origin is None:
            return self._open(net)
        if net in self._busy:
            raise LoopError(cone.describe(net))
        self._busy.add(net)
        value = self._output(*origin)
        self._busy.discard(net)
        return value

    def _open(self, net: int) -> Bit:
        """Give a net without a driver of its own, or a bus: free, but the same on both sides."""
        names = self.module.names.get(net)
        if net in self.contested:
            drivers = [cell for cell in self.module.cells if any(net in nets for nets in cell.outputs.values())]
            if not names or not all(cell.is_instance or cell.type == "$tribuf" for cell in drivers):
                raise UnsupportedCellError(f"several drivers of {names[0] if names else 'an unnamed net'}")
        if not names:
            return FALSE, TRUE
        return self._free(("open", names[0].variable, names[0].place), Source("open", *_plain(names[0])))

    def _free(self, key: Key, source: Source) -> Bit:
        return self.shared.variable(key, source), FALSE

    def _output(self, cell: Cell, port: str, place: int) -> Bit:
        if cell.type in GATING:
            return self._gated_clock(cell)
        if cell.type == "$mem_v2":
            return self._read(cell, place)
        if cell.type == "$tribuf":
            return self._free(("buffer", cell.name, place), Source("buffer", cell.name, "", place))
        return self._free(("instance", cell.name, port, place), Source("instance", cell.name, port, place))

    def _gated_clock(self, cell: Cell) -> Bit:
        gating = self.gating(cell)
        if self.transparent:
            return gating.clock
        # Shared by both sides only where the pins are the same: what hangs on it elsewhere cannot be compared.
        key = ("cell", cell.name, cell.type, gating.clock, gating.wake, gating.test)
        lit = self.shared.variable(key, Source("cell", cell.name, PORTS.output, 0))
        self.gatings[lit >> 1] = gating
        return lit, FALSE

    def _read(self, cell: Cell, place: int) -> Bit:
        p = cell.numbers
        if p["RD_CLK_ENABLE"]:
            raise UnsupportedCellError("a memory with a clocked read port")
        port, bit = divmod(place, p["WIDTH"])
        address = self.cone.word(cell.inputs["RD_ADDR"][port * p["ABITS"] : (port + 1) * p["ABITS"]])
        data = self.shared.read(str(cell.parameters["MEMID"]), address, p["WIDTH"])
        return data[bit], self.shared.aig.any_of(address.unknown)


def _plain(name: Name) -> tuple[str, str, int]:
    return name.variable, "", name.place


def _keys(found: list[Register], partner: Side | None, side: str) -> dict[int, Key]:
    """Pair registers by name, bit by bit: a register has the key of the other side's register of any of its names."""
    known: dict[tuple[str, int], Key] = {}
    if partner:
        for register in partner.registers:
            for name in register.aliases:
                known.setdefault((name.variable, name.place), partner.keys[register.net])
    keys: dict[int, Key] = {}
    taken: set[Key] = set()
    for register in found:
        best = (register.name, *register.aliases) if register.name else ()
        wanted = [known[name.variable, name.place] for name in best if name and (name.variable, name.place) in known]
        key = next((key for key in wanted if key not in taken), None)
        if key is None and register.name:
            kind = "register" if not partner else "gate-register"
            key = (kind, register.name.variable, register.name.place)
        if key is None or key in taken:
            key = (f"{side}-unnamed", register.cell.name.lstrip("$"), register.lane)
        taken.add(key)
        keys[register.net] = key
    return keys


class UnknownClockError(UnsupportedCellError):
    """A register's clock can be x, so that its edges are not known."""


@dataclass(frozen=True)
class Clock:
    """A register's clock, followed through our cells.

    Args:
        root: literal of the clock net above all cells, not complemented.
        rising: the edge of `root` at which the register changes.
        cells: from the register upwards.
        fits: every cell passes the edge that the register uses.
    """

    root: Lit
    rising: bool
    cells: tuple[Gating, ...]
    fits: bool


def follow(side: Side, clock: Bit, *, rising: bool) -> Clock:
    """Follow a clock net up through our cells to its root."""
    if clock[1] != FALSE:
        raise UnknownClockError("a clock that can be x")
    lit, fits = clock[0], True
    found: list[Gating] = []
    while True:
        if lit & 1:
            lit, rising = lit ^ 1, not rising
        gating = side.gatings.get(lit >> 1)
        if gating is None:
            return Clock(lit, rising, tuple(found), fits)
        found.append(gating)
        fits = fits and gating.rising == rising
        if gating.clock[1] != FALSE:
            raise UnknownClockError("a clock that can be x")
        lit = gating.clock[0]


def awake(aig: Aig, cells: tuple[Gating, ...]) -> Bit:
    """Give the condition under which a clock edge passes all cells of a chain."""
    passes: Bit = (TRUE, FALSE)
    for gating in cells:
        passes = bit_and(aig, passes, bit_or(aig, gating.wake, gating.test))
    return passes
