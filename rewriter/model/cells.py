"""The gating cell: the names of its wrapper, and what a cell map says about it."""

from dataclasses import dataclass
from enum import Enum

from rewriter.model.design import Edge

RISING = "stillclock_icg"
FALLING = "stillclock_icg_n"
WRAPPERS = {Edge.RISING: RISING, Edge.FALLING: FALLING}
FILES = {Edge.RISING: f"{RISING}.v", Edge.FALLING: f"{FALLING}.v"}

NEEDS_MAP = "stillclock_needs_a_cell_map"
"""Module that a synthesis run without a cell map finds unresolved, so that it stops and says why."""

EXACT = "STILLCLOCK_EXACT"
"""Macro under which the wrapper lets the first clock edge pass only when awake (proofs, replays)."""

COUNT = "STILLCLOCK_COUNT"
"""Macro under which every wrapper prints `stillclock-count SCOPE PULSES` at the end of a simulation."""


@dataclass(frozen=True)
class Ports:
    """Name the ports of a wrapper, all one bit wide."""

    clock: str = "clk"
    wake: str = "wake"
    test: str = "test"
    output: str = "gclk"


PORTS = Ports()


class CellKind(Enum):
    """Say what a wrapper becomes in synthesis."""

    LIBRARY = "library"  # a clock-gating cell of the library
    DISCRETE = "discrete"  # a latch and a gate, asked for by name
    TRANSPARENT = "transparent"  # gclk = clk
    BEHAVIOURAL = "behavioural"  # nothing: the run stops at an unresolved module


@dataclass(frozen=True)
class LibraryCell:
    """A clock-gating cell of a library: its module, its pins, its area in square micrometres if known."""

    module: str
    clock: str
    enable: str
    test: str
    output: str
    area: float | None = None


@dataclass(frozen=True)
class CellMap:
    """What the wrappers become.

    Args:
        name: of a shipped map, or the path it was read from.
        description: one line for people.
        kind: as said.
        rising: the cell for rising-edge banks, given exactly when `kind` is LIBRARY and the library has one.
        falling: the same for falling-edge banks.
    """

    name: str
    description: str
    kind: CellKind
    rising: LibraryCell | None = None
    falling: LibraryCell | None = None

    def cell(self, edge: Edge) -> LibraryCell | None:
        """Give the library's cell for an edge."""
        return self.rising if edge is Edge.RISING else self.falling

    def supports(self, edge: Edge) -> bool:
        """Tell whether banks of this edge can be gated; only a library may lack a cell."""
        return self.kind is not CellKind.LIBRARY or self.cell(edge) is not None
