"""Count the clock edges that are left: what the cells printed, weighed with the bits behind them.

The cells print their pulses in a simulation built with `STILLCLOCK_COUNT`; a bit without a cell sees every clock cycle.
"""

import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from tests.cores.fragments import blank_comments
from tests.cores.rewriting import GatedBank

COUNT = "STILLCLOCK_COUNT"
_PULSES = re.compile(r"^stillclock-count (\S+) (\d+)$", re.MULTILINE)
_CYCLES = re.compile(r"^stillclock-cycles (\d+)$", re.MULTILINE)
_NAME = re.compile(r"\s*(\w+)\s*(?:\[[^\]]*\]\s*)?\(")


@dataclass(frozen=True)
class CellCount:
    """One cell of the running design: where it stands, the bits it clocks, and how often it pulsed."""

    path: str
    bits: int
    pulses: int


@dataclass(frozen=True)
class EdgeCount:
    """Clock edges at register bits, over one simulation.

    Attributes:
        cycles: clock cycles.
        bits: register bits in all, with a cell or without.
        cells: the cells.
    """

    cycles: int
    bits: int
    cells: tuple[CellCount, ...]

    @property
    def before(self) -> int:
        """Edges without any cell."""
        return self.bits * self.cycles

    @property
    def after(self) -> int:
        """Edges with the cells."""
        behind = sum(cell.bits for cell in self.cells)
        return sum(cell.bits * cell.pulses for cell in self.cells) + (self.bits - behind) * self.cycles

    @property
    def left(self) -> float:
        """Share of the edges that is left, 0 to 1."""
        return self.after / self.before

    @property
    def left_behind_cells(self) -> float:
        """Share of the edges that is left at the bits that have a cell, 0 to 1."""
        bits = sum(cell.bits for cell in self.cells)
        return sum(cell.bits * cell.pulses for cell in self.cells) / (bits * self.cycles)


def count_edges(log: str, banks: Iterable[GatedBank], text: str, bits: int) -> EdgeCount:
    """Weigh the pulses of a simulation.

    Args:
        log: what it printed.
        banks: the gated banks of the report of the report.
        text: the rewritten RTL, which says which module an instance is of.
        bits: register bits of the whole design.
    """
    loads = _loads(banks)
    modules = instance_modules(text, {module for module, _ in loads})
    cells = tuple(_count(path, int(pulses), loads, modules) for path, pulses in _PULSES.findall(log))
    cycles = _CYCLES.search(log)
    assert cycles, "the simulation did not print its clock cycles"
    assert cells, "the simulation printed no pulses"
    return EdgeCount(int(cycles[1]), bits, cells)


def instance_modules(text: str, modules: Iterable[str]) -> dict[str, str]:
    """Give the module of each instance in a text, for the modules asked for."""
    code = blank_comments(text)
    found: dict[str, str] = {}
    for module in modules:
        for use in re.finditer(rf"\b(?<!module ){re.escape(module)}\b", code):
            name = _NAME.match(code, _after_parameters(code, use.end()))
            if name:
                found[name[1]] = module
    return found


def _loads(banks: Iterable[GatedBank]) -> dict[tuple[str, str], int]:
    """Add up the bits behind each cell: several banks may share one."""
    loads: dict[tuple[str, str], int] = {}
    for bank in banks:
        key = (bank.module, bank.instance)
        loads[key] = loads.get(key, 0) + bank.bits
    return loads


def _count(path: str, pulses: int, loads: Mapping[tuple[str, str], int], modules: Mapping[str, str]) -> CellCount:
    *scopes, cell = path.split(".")
    module = next((modules[scope] for scope in reversed(scopes) if scope in modules), None)
    owners = [key for key in loads if key[1] == cell and module in {None, key[0]}]
    assert len(owners) == 1, f"{path} could be any of {owners or 'no bank'}"
    return CellCount(path, loads[owners[0]], pulses)


def _after_parameters(code: str, start: int) -> int:
    """Skip `#( … )` after a module's name."""
    opened = re.compile(r"\s*#\s*\(").match(code, start)
    if opened is None:
        return start
    depth, index = 1, opened.end()
    while depth:
        depth += (code[index] == "(") - (code[index] == ")")
        index += 1
    return index
