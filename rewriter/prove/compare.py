"""List what both texts of a module must agree on."""

from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.logic.aig import FALSE, TRUE, Lit
from rewriter.logic.blast import Bit, Word, bit_and, bit_mux
from rewriter.logic.netlist import Cell
from rewriter.logic.state import Register, WritePort, loads_constant, memory_shape, step, write_ports
from rewriter.prove.obligation import Obligation, unequal
from rewriter.prove.pair import GATING, Clock, Gating, Shared, Side, UnknownClockError, awake, follow


@dataclass(frozen=True)
class Fault:
    """A difference of structure, that needs no question: what, why, and the reason word."""

    what: str
    detail: str
    reason: str = "disproved"


@dataclass(frozen=True)
class Bank:
    """Registers behind one chain of cells (empty: not gated), with their obligations and faults by variable."""

    cells: tuple[Gating, ...]
    obligations: list[Obligation]
    faults: dict[str, Fault]
    variables: list[str]

    def add(self, variable: str) -> None:
        """Note a variable."""
        if variable not in self.variables:
            self.variables.append(variable)


class Banks:
    """The banks of a module, by chain of cells."""

    def __init__(self) -> None:
        self.by_chain: dict[tuple[str, ...], Bank] = {}

    def of(self, cells: tuple[Gating, ...]) -> Bank:
        """Give the bank behind a chain."""
        chain = tuple(cell.name for cell in cells)
        return self.by_chain.setdefault(chain, Bank(cells, [], {}, []))


class Comparison:
    """Both sides of one module.

    Args:
        shared: the graph and solver.
        gold: the original.
        gate: the rewrite.
    """

    def __init__(self, shared: Shared, gold: Side, gate: Side) -> None:
        self.shared = shared
        self.aig = shared.aig
        self.gold = gold
        self.gate = gate
        self.banks = Banks()
        self.faults: list[Fault] = []
        self.bits = 0
        self.clocks: dict[int, Clock] = {}
        self.readers: dict[object, set[Lit]] = {}

    def collect(self) -> None:
        """Build all obligations."""
        for key, register in self.gold.by_key.items():
            other = self.gate.by_key.get(key)
            if other is not None:
                self._register(str(key[1]), int(str(key[2])), register, other)
        for name, memory in self.gold.memories.items():
            self._memory(name, memory)
        for name in self.gate.memories.keys() - self.gold.memories.keys():
            self.faults.append(Fault(name, "a memory that the original does not have"))
        self._outputs()
        self._instances()
        self._buffers()

    # -- registers

    def _register(self, variable: str, place: int, gold: Register, gate: Register) -> None:
        self.bits += 1
        if gold.is_latch or gate.is_latch:
            self._latch(variable, place, gold, gate)
            return
        above = self._clock(self.gold, gold)
        try:
            below = self._clock(self.gate, gate)
        except UnknownClockError:
            # Not one of our cells: logic makes this clock, where the original has a plain one.
            self.faults.append(Fault(variable, "its clock is made by logic that can be x"))
            return
        bank = self.banks.of(below.cells)
        bank.add(variable)
        fault = self._clock_fault(variable, above, below)
        if fault is None and gold.initial != gate.initial:
            fault = Fault(variable, f"bit {place} starts as {gold.initial} in the original and {gate.initial} here")
        if fault is None and below.cells and not loads_constant(gate):
            fault = Fault(variable, "an asynchronous input loads a value that is not constant", "async-load")
        if fault is not None:
            bank.faults.setdefault(variable, fault)
            return
        bank.obligations.extend(self._next(variable, place, gold, gate, (above, below)))

    def _next(
        self, variable: str, place: int, gold: Register, gate: Register, clocks: tuple[Clock, Clock]
    ) -> Iterator[Obligation]:
        aig = self.aig
        before, after = step(gold, self.gold.cone), step(gate, self.gate.cone)
        own = self.gold.cone.bit(gold.net)
        passes = awake(aig, clocks[0].cells), awake(aig, clocks[1].cells)
        wanted = bit_mux(aig, passes[0], before.data, own)
        given = bit_mux(aig, passes[1], after.data, own)
        # The two resets are compared below; where either is active, the clock has no say.
        free = aig.both(_quiet(before.reset), _quiet(after.reset))
        yield Obligation(
            variable, place, "next", aig.both(free, unequal(self.shared, wanted, given)), wanted, given, passes[1]
        )
        active = unequal(self.shared, before.reset, after.reset)
        yield Obligation(variable, place, "reset", active, before.reset, after.reset)
        forced = aig.both(before.reset[0], unequal(self.shared, before.forced, after.forced))
        yield Obligation(variable, place, "reset", forced, before.forced, after.forced)

    def _clock(self, side: Side, register: Register) -> Clock:
        clock = follow(side, side.cone.bit(register.clock), rising=register.rising)
        if side is self.gate:
            self.clocks[register.net] = clock
        return clock

    def _clock_fault(self, variable: str, above: Clock, below: Clock) -> Fault | None:
        if not below.fits:
            if len(below.cells) > 1:
                return Fault(variable, "the cells on its clock pass different edges", "edge-mix")
            edge = "falling" if below.rising else "rising"
            return Fault(variable, f"the cell passes {edge} edges, the register changes at the other", "edge-mix")
        if above.root != below.root and not self._same(above.root, below.root):
            return Fault(variable, f"clock {self._named(below.root)} where the original has {self._named(above.root)}")
        if above.rising != below.rising:
            edge = "rising" if above.rising else "falling"
            return Fault(variable, f"changes at the wrong edge: the original uses the {edge} edge")
        return None

    def _same(self, a: Lit, b: Lit) -> bool:
        return self.shared.solver.ask([self.aig.differ(a, b)]) is False

    def _named(self, root: Lit) -> str:
        source = self.shared.sources.get(root >> 1)
        return f"`{source.label}`" if source else "made by logic"

    def _latch(self, variable: str, place: int, gold: Register, gate: Register) -> None:
        bank = self.banks.of(())
        bank.add(variable)
        if not (gold.is_latch and gate.is_latch):
            bank.faults.setdefault(variable, Fault(variable, "a latch on one side and a flip-flop on the other"))
            return
        opens = self._open(self.gold, gold), self._open(self.gate, gate)
        before, after = step(gold, self.gold.cone).data, step(gate, self.gate.cone).data
        differs = unequal(self.shared, *opens)
        bank.obligations.append(Obligation(variable, place, "latch", differs, *opens))
        differs = self.aig.both(opens[0][0], unequal(self.shared, before, after))
        bank.obligations.append(Obligation(variable, place, "latch", differs, before, after))

    def _open(self, side: Side, latch: Register) -> Bit:
        value, unknown = side.cone.bit(latch.clock)
        return value ^ (not latch.rising), unknown

    # -- memories

    def is_memory(self, variable: str) -> bool:
        """Tell whether a variable of an obligation is a memory, or one word of it; scopes may hold indices as well."""
        memories = self.gold.memories
        return variable in memories or (variable.endswith("]") and variable.rpartition("[")[0] in memories)

    def _memory(self, name: str, memory: Cell) -> None:
        other = self.gate.memories.get(name)
        if other is None:
            self.faults.append(Fault(name, "the memory is missing here"))
            return
        if memory_shape(memory) != memory_shape(other):
            self.faults.append(Fault(name, "the memory has another shape or other write ports here"))
            return
        ports = write_ports(memory, self.gold.cone), write_ports(other, self.gate.cone)
        for gold, gate in zip(*ports, strict=True):
            self._write_port(name, gold, gate)

    def _write_port(self, name: str, gold: WritePort, gate: WritePort) -> None:
        above = follow(self.gold, self.gold.cone.bit(gold.clock), rising=gold.rising)
        below = follow(self.gate, self.gate.cone.bit(gate.clock), rising=gate.rising)
        variable = name + _constant_index(gold.address)
        bank = self.banks.of(below.cells)
        bank.add(variable)
        self.bits += len(gold.data)
        fault = self._clock_fault(variable, above, below)
        if fault is not None:
            bank.faults.setdefault(variable, fault)
            return
        aig = self.aig
        passes = awake(aig, above.cells), awake(aig, below.cells)
        writes: list[Lit] = []
        for place in range(len(gold.data)):
            wanted, given = (
                bit_and(aig, on, (port.enable.value[place], port.enable.unknown[place]))
                for on, port in zip(passes, (gold, gate), strict=True)
            )
            writes.append(aig.both(wanted[0], wanted[1] ^ 1))
            bank.obligations.append(
                Obligation(variable, place, "next", unequal(self.shared, wanted, given), wanted, given, passes[1])
            )
            before, after = _bit(gold.data, place), _bit(gate.data, place)
            differs = aig.both(writes[-1], unequal(self.shared, before, after))
            bank.obligations.append(Obligation(variable, place, "memory", differs, before, after))
        written = aig.any_of(writes)
        for place in range(len(gold.address)):
            before, after = _bit(gold.address, place), _bit(gate.address, place)
            differs = aig.both(written, unequal(self.shared, before, after))
            bank.obligations.append(Obligation(f"{variable}.address", place, "memory", differs, before, after))

    # -- everything else

    def _outputs(self) -> None:
        bank = self.banks.of(())
        for name, port in self.gold.module.ports.items():
            if port.direction == "input":
                continue
            other = self.gate.module.ports.get(name)
            if other is None or len(other.bits) != len(port.bits) or other.direction != port.direction:
                self.faults.append(Fault(name, "the output port is missing or has another form here"))
                continue
            for place, nets in enumerate(zip(port.bits, other.bits, strict=True)):
                gold, gate = self.gold.cone.bit(nets[0]), self.gate.cone.bit(nets[1])
                bank.obligations.append(Obligation(name, place, "output", unequal(self.shared, gold, gate), gold, gate))

    def _instances(self) -> None:
        before, after = self.gold.module.instances, self.gate.module.instances
        for name in sorted(before.keys() | after.keys()):
            gold, gate = before.get(name), after.get(name)
            if (gold is None or gold.type in GATING) and (gate is None or gate.type in GATING):
                continue
            if gold is None or gate is None:
                self.faults.append(Fault(name, f"the instance stands only in the {'rewrite' if gate else 'original'}"))
            elif gold.definition != gate.definition or gold.parameters != gate.parameters:
                self.faults.append(Fault(name, "the instance has another definition or other parameters here"))
            else:
                self._inputs(name, gold, gate)

    def _inputs(self, name: str, gold: Cell, gate: Cell) -> None:
        bank = self.banks.of(())
        for port, nets in gold.inputs.items():
            others = gate.inputs.get(port)
            if others is None or len(others) != len(nets):
                self.faults.append(Fault(f"{name}.{port}", "the input is missing or has another width here"))
                continue
            for place, (a, b) in enumerate(zip(nets, others, strict=True)):
                before, after = self.gold.cone.bit(a), self.gate.cone.bit(b)
                differs = unequal(self.shared, before, after)
                bank.obligations.append(Obligation(f"{name}.{port}", place, "input", differs, before, after))

    def _buffers(self) -> None:
        bank = self.banks.of(())
        before, after = ({c.name: c for c in s.module.cells if c.type == "$tribuf"} for s in (self.gold, self.gate))
        for name in before.keys() | after.keys():
            if name not in before or name not in after:
                self.faults.append(Fault(name, "a tristate buffer stands on one side only"))
                continue
            for port, nets in before[name].inputs.items():
                for place, (a, b) in enumerate(zip(nets, after[name].inputs[port], strict=True)):
                    gold, gate = self.gold.cone.bit(a), self.gate.cone.bit(b)
                    differs = unequal(self.shared, gold, gate)
                    bank.obligations.append(Obligation(name, place, "buffer", differs, gold, gate))


def _quiet(reset: Bit) -> Lit:
    # An unknown reset is taken as inactive here: what it forces is compared by itself.
    return reset[0] ^ 1 if reset[1] == FALSE else TRUE


def _bit(word: Word, place: int) -> Bit:
    return word.value[place], word.unknown[place]


def _constant_index(address: Word) -> str:
    if any(bit > TRUE for bit in address.value) or not address.surely_known:
        return ""
    return f"[{sum(bit << place for place, bit in enumerate(address.value))}]"
