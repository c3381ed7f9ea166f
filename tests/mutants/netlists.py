"""Mutants of the elaborated rewrite: clock edges, cell types, and what is connected to the pins of cells and instances.

What each stands for in the text:
  edge            `posedge gclk` <-> `negedge gclk` in every block on that gated clock: the engine turns the edge of a
                  block into the clock polarity of its registers, and into nothing else
  type            `stillclock_icg` <-> `stillclock_icg_n`: the cells are black boxes with equal ports
  pins            another net in a named connection of the cell, or of an instance
The sample in test_mutants.py that is planted as text, and elaborated anew, checks that this is so.
"""

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, replace
from itertools import count

from rewriter.logic.netlist import Bit, Cell, Module, Netlist
from rewriter.model.cells import FALLING, PORTS, RISING
from tests.mutants.planting import WORD, Mutant

Change = Callable[[Module], Module]
GATING = (RISING, FALLING)
OTHER_TYPE = {RISING: FALLING, FALLING: RISING}


@dataclass(frozen=True)
class Rewired:
    """A mutant, the definition it changes, and how."""

    mutant: Mutant
    change: Change

    def __call__(self, netlist: Netlist) -> Netlist:
        """Change every instance of the definition alike, as its text would."""
        return on_modules(netlist, self.mutant.definition, self.change)


def on_modules(netlist: Netlist, definition: str, change: Change) -> Netlist:
    """Change all modules of one definition."""
    changed = {
        name: change(module) if module.definition == definition else module for name, module in netlist.modules.items()
    }
    return Netlist(netlist.top, changed)


def choose(netlist: Netlist, number: int) -> Netlist:
    """Give the word that chooses a mutant a value."""
    return Netlist(netlist.top, {name: tied(module, number) for name, module in netlist.modules.items()})


def word(module: Module) -> dict[int, int]:
    """Give the nets of the word, with their places in it."""
    return {net: name.place for net, names in module.names.items() for name in names if name.variable == WORD}


def tied(module: Module, number: int) -> Module:
    """Give the word of one module a value."""
    values: dict[Bit, Bit] = {net: str(number >> place & 1) for net, place in word(module).items()}

    def tie(cell: Cell) -> Cell:
        if not any(net in values for nets in cell.inputs.values() for net in nets):
            return cell
        inputs = {pin: tuple(values.get(net, net) for net in nets) for pin, nets in cell.inputs.items()}
        return replace(cell, inputs=inputs)

    names = {net: found for net, found in module.names.items() if net not in values}
    return replace(module, cells=tuple(map(tie, module.cells)), names=names) if values else module


def rewired(netlist: Netlist, test_ports: Mapping[str, str]) -> Iterator[Rewired]:
    """Give every mutant of edges, types and pins.

    Args:
        netlist: the rewrite.
        test_ports: by definition, the input that carries the override.
    """
    seen: set[str] = set()
    for module in netlist.instances().values():
        if module.definition not in seen:
            seen.add(module.definition)
            yield from _of_module(module, test_ports)


def _of_module(module: Module, test_ports: Mapping[str, str]) -> Iterator[Rewired]:
    cells = [cell for cell in module.instances.values() if cell.type in GATING]
    for index, cell in enumerate(cells):
        yield from _of_cell(module, cell)
        yield from _of_link(module, cell, PORTS.test, test_ports[module.definition])
        other = cells[(index + 1) % len(cells)]
        if other is not cell:
            yield from _with_other(module, cell, other)
    for instance in module.instances.values():
        port = test_ports.get(instance.definition)
        if port is not None:
            yield from _of_link(module, instance, port, test_ports[module.definition])


def _of_cell(module: Module, cell: Cell) -> Iterator[Rewired]:
    yield _rewired(module, cell, "edge of the bank flipped", "", _flipped(cell.name))
    yield _rewired(module, cell, "cell type swapped", "", _edited(cell, lambda c: replace(c, type=OTHER_TYPE[c.type])))


def _of_link(module: Module, cell: Cell, port: str, own: str) -> Iterator[Rewired]:
    """Cut, invert and replace what carries the override into a cell or an instance."""
    what = "cell" if cell.type in GATING else "instance"
    net = cell.inputs[port][0]
    others = (p.bits[0] for n, p in module.ports.items() if p.direction == "input" and len(p.bits) == 1 and n != own)
    clock = cell.inputs.get(PORTS.clock, ("x",))[0]
    another = next(bit for bit in others if bit not in (net, clock))
    yield _rewired(module, cell, f"test link of {what} cut", "tied to 0", _connected(cell, port, "0"))
    yield _rewired(module, cell, f"test link of {what} inverted", "", _inverted(cell, port))
    yield _rewired(module, cell, f"test link of {what} replaced", "by another input", _connected(cell, port, another))


def _with_other(module: Module, cell: Cell, other: Cell) -> Iterator[Rewired]:
    """Connect pins to the nets of another bank of the module."""
    own, its = cell.outputs[PORTS.output][0], other.outputs[PORTS.output][0]
    yield _rewired(module, cell, "clk from another bank's gclk", other.name, _connected(cell, PORTS.clock, its))
    wake = other.inputs[PORTS.wake][0]
    yield _rewired(module, cell, "wake of another bank", other.name, _connected(cell, PORTS.wake, wake))
    yield _rewired(module, cell, "bank on another bank's gclk", other.name, _moved({own: its}, ("CLK", "WR_CLK")))
    exchanged = _moved({own: its, its: own}, ("CLK", "WR_CLK"))
    yield _rewired(module, cell, "gclk exchanged with another bank's", other.name, exchanged)
    yield _rewired(
        module, cell, "gclk driven onto another bank's",
        other.name, _edited(cell, lambda c: replace(c, outputs={PORTS.output: (its,)})),
    )  # fmt: skip


def _rewired(module: Module, cell: Cell, kind: str, what: str, change: Change) -> Rewired:
    return Rewired(Mutant(0, kind, module.definition, cell.name, what), change)


def _edited(cell: Cell, edit: Callable[[Cell], Cell]) -> Change:
    return lambda module: replace(
        module, cells=tuple(edit(one) if one.name == cell.name else one for one in module.cells)
    )


def _connected(cell: Cell, port: str, net: Bit) -> Change:
    return _edited(cell, lambda c: replace(c, inputs={**c.inputs, port: (net,)}))


def _inverted(cell: Cell, port: str) -> Change:
    def change(module: Module) -> Module:
        taken = {net for one in module.cells for nets in (*one.inputs.values(), *one.outputs.values()) for net in nets}
        fresh = next(net for net in count(1_000_000) if net not in taken)
        numbers = {"A_SIGNED": 0, "A_WIDTH": 1, "Y_WIDTH": 1}
        inverter = Cell("$mutant", "$not", "$not", numbers, {"A": cell.inputs[port]}, {"Y": (fresh,)})
        connected = _connected(cell, port, fresh)(module)
        return replace(connected, cells=(*connected.cells, inverter))

    return change


def _flipped(cell: str) -> Change:
    def change(module: Module) -> Module:
        # By name, since the net has another number where memories are elaborated as registers.
        clock = module.instances[cell].outputs[PORTS.output][0]
        return replace(module, cells=tuple(_at_other_edge(one, clock) for one in module.cells))

    return change


def _at_other_edge(cell: Cell, clock: Bit) -> Cell:
    flipped = dict(cell.numbers)
    if not cell.is_instance and clock in cell.inputs.get("CLK", ()):
        flipped["CLK_POLARITY"] ^= 1
    for port, net in enumerate(cell.inputs.get("WR_CLK", ())):
        flipped["WR_CLK_POLARITY"] ^= (net == clock) << port
    return replace(cell, parameters={**cell.parameters, **flipped}) if flipped != cell.numbers else cell


def _moved(nets: Mapping[Bit, Bit], pins: tuple[str, ...]) -> Change:
    def move(cell: Cell) -> Cell:
        if cell.is_instance or not any(net in nets for pin in pins for net in cell.inputs.get(pin, ())):
            return cell
        inputs = {
            pin: tuple(nets.get(net, net) for net in bits) if pin in pins else bits for pin, bits in cell.inputs.items()
        }
        return replace(cell, inputs=inputs)

    return lambda module: replace(module, cells=tuple(map(move, module.cells)))
