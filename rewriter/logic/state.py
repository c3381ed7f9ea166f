"""The state of one module, bit by bit, in one common form."""

from collections.abc import Mapping
from dataclasses import dataclass

from rewriter.logic.aig import FALSE, TRUE
from rewriter.logic.blast import Bit, Word, bit_mux
from rewriter.logic.cone import Cone
from rewriter.logic.netlist import Bit as Net
from rewriter.logic.netlist import Cell, Module, Name, driven_variable

FLOPS = frozenset(("$dff", "$dffe", "$adff", "$adffe", "$aldff", "$aldffe", "$sdff", "$sdffe", "$sdffce"))
LATCHES = frozenset(("$dlatch",))


@dataclass(frozen=True)
class Register:
    """One bit of a flip-flop or latch.

    Args:
        name: public name of the bit, None when it has none.
        net: its output.
        cell: the word-level cell; `lane` is the bit's place in it.
        initial: `0`, `1`, or `x` for none.
    """

    name: Name | None
    aliases: tuple[Name, ...]
    net: int
    cell: Cell
    lane: int
    initial: str

    @property
    def is_latch(self) -> bool:
        """Tell latches from flip-flops."""
        return self.cell.type in LATCHES

    @property
    def clock(self) -> Net:
        """Give the clock net (a latch's enable)."""
        return self.cell.inputs["EN" if self.is_latch else "CLK"][0]

    @property
    def rising(self) -> bool:
        """Tell rising-edge flip-flops (a latch open at 1)."""
        return bool(self.cell.parameters["EN_POLARITY" if self.is_latch else "CLK_POLARITY"])


@dataclass(frozen=True)
class Next:
    """What a register does at its clock edge: its next value, and what an asynchronous input forces.

    `reset` is the condition that forces `forced`; FALSE without.
    """

    data: Bit
    reset: Bit
    forced: Bit


def registers(module: Module) -> list[Register]:
    """List the flip-flop and latch bits of a module."""
    found: list[Register] = []
    for cell in module.cells:
        if cell.type not in FLOPS and cell.type not in LATCHES:
            continue
        variable = driven_variable(cell.name)
        for lane, net in enumerate(cell.outputs["Q"]):
            if isinstance(net, int):
                names = module.names.get(net, ())
                # The variable that the cell is named after; other names are copies of it.
                best = next((n for n in names if n.variable == variable), None) or next(
                    (n for n in names if variable.startswith(n.variable)), names[0] if names else None
                )
                found.append(Register(best, names, net, cell, lane, module.init.get(net, "x")))
    return found


def step(register: Register, cone: Cone) -> Next:
    """Give a register's next state as literals."""
    cell, lane = register.cell, register.lane
    own = cone.bit(register.net)
    data = cone.bit(cell.inputs["D"][lane])
    kind = cell.type
    enable = _control(cell, "EN", "EN_POLARITY", cone) if kind.endswith("e") else (TRUE, FALSE)
    if kind.startswith("$sdff"):
        reset = _control(cell, "SRST", "SRST_POLARITY", cone)
        value = _constant(cell.parameters["SRST_VALUE"], lane)
        if kind == "$sdffce":
            data = bit_mux(cone.aig, enable, bit_mux(cone.aig, reset, value, data), own)
        else:
            data = bit_mux(cone.aig, reset, value, bit_mux(cone.aig, enable, data, own))
        return Next(data, (FALSE, FALSE), (FALSE, FALSE))
    data = bit_mux(cone.aig, enable, data, own)
    if kind.startswith("$adff"):
        return Next(data, _control(cell, "ARST", "ARST_POLARITY", cone), _constant(cell.parameters["ARST_VALUE"], lane))
    if kind.startswith("$aldff"):
        load = _control(cell, "ALOAD", "ALOAD_POLARITY", cone)
        if cell.inputs["AD"][lane] == register.net:
            # Not written by the reset branch: it keeps its value there, like a synchronous condition.
            return Next(bit_mux(cone.aig, load, own, data), (FALSE, FALSE), (FALSE, FALSE))
        return Next(data, load, cone.bit(cell.inputs["AD"][lane]))
    return Next(data, (FALSE, FALSE), (FALSE, FALSE))


def loads_constant(register: Register) -> bool:
    """Tell whether an asynchronous load, if any, brings a constant."""
    if not register.cell.type.startswith("$aldff"):
        return True
    value = register.cell.inputs["AD"][register.lane]
    return isinstance(value, str) or value == register.net


def _control(cell: Cell, port: str, polarity: str, cone: Cone) -> Bit:
    value, unknown = cone.bit(cell.inputs[port][0])
    return value ^ (not cell.parameters[polarity]), unknown


def _constant(value: int | str, lane: int) -> Bit:
    if isinstance(value, int):
        return (TRUE if value >> lane & 1 else FALSE), FALSE
    digit = value[::-1][lane] if lane < len(value) else "0"
    return (TRUE if digit == "1" else FALSE), (TRUE if digit in "xz" else FALSE)


@dataclass(frozen=True)
class WritePort:
    """One write port of a memory: its clock net and edge, and its enable, address and data."""

    clock: Net
    rising: bool
    enable: Word
    address: Word
    data: Word


def write_ports(memory: Cell, cone: Cone) -> list[WritePort]:
    """List the write ports of a memory, in order of priority."""
    p = memory.numbers
    width, address = p["WIDTH"], p["ABITS"]
    return [
        WritePort(
            memory.inputs["WR_CLK"][port],
            bool(p["WR_CLK_POLARITY"] >> port & 1),
            cone.word(memory.inputs["WR_EN"][port * width : (port + 1) * width]),
            cone.word(memory.inputs["WR_ADDR"][port * address : (port + 1) * address]),
            cone.word(memory.inputs["WR_DATA"][port * width : (port + 1) * width]),
        )
        for port in range(p["WR_PORTS"])
    ]


def memory_shape(memory: Cell) -> Mapping[str, int | str]:
    """Give the parameters of a memory that both sides must share, read ports aside."""
    kept = ("MEMID", "SIZE", "OFFSET", "WIDTH", "INIT", "WR_PORTS", "WR_CLK_ENABLE", "WR_CLK_POLARITY",
            "WR_PRIORITY_MASK", "WR_WIDE_CONTINUATION")  # fmt: skip
    return {key: memory.parameters[key] for key in kept}
