"""Cells of ours that already stand in the source."""

import re
from dataclasses import dataclass

from rewriter.model.cells import FALLING, RISING
from rewriter.model.design import Definition, Design

_PIN = re.compile(r"\.\s*(clk|gclk)\s*\(\s*([^()]*?)\s*\)")


@dataclass(frozen=True)
class GatedClock:
    """A clock that one of our cells makes: its name, and the clock that feeds the cell, both as written."""

    gclk: str
    clk: str


def gated_clocks(design: Design, definition: Definition) -> dict[str, GatedClock]:
    """Find the clocks that our own cells make in a definition, by name."""
    found: dict[str, GatedClock] = {}
    for instance in definition.instances:
        if instance.target not in (RISING, FALLING):
            continue
        text = design.source.by_path[instance.span.file].slice(instance.parentheses).decode("latin-1")
        pins = dict(_PIN.findall(text))
        if "gclk" in pins and "clk" in pins:
            found[pins["gclk"]] = GatedClock(pins["gclk"], pins["clk"])
    return found


def gated_by(name: str, gated: dict[str, GatedClock]) -> GatedClock | None:
    """Find the cell that makes a clock; a cell is written by names as its generate scope sees them."""
    return gated.get(name.rpartition(".")[2])


def root_clock(name: str, gated: dict[str, GatedClock]) -> str:
    """Follow our own cells back to the clock that feeds them."""
    seen: set[str] = set()
    while (cell := gated_by(name, gated)) and cell.gclk not in seen:
        seen.add(cell.gclk)
        name = cell.clk
    return name
