"""What the user asked for, and where the time goes."""

import time
from collections.abc import Callable, Generator
from contextlib import contextmanager
from dataclasses import dataclass, field

from rewriter.model.cells import CellMap
from rewriter.model.evidence import Limits
from rewriter.model.rewrite import TestPin

Progress = Callable[[str], None]


@dataclass(frozen=True)
class Job:
    """What the user asked for.

    Args:
        arguments: RTL arguments for slang's driver.
        cell_map: what the cells become.
        min_bits: fewest register bits per cell.
        one_clock_per_variable: leave parts of a variable that would run on several clocks.
        test_port: name of the port that carries the test override where none is named.
        test_pins: existing ports that carry it.
        off: `MODULE` or `MODULE.REGISTER`, left alone.
        limits: of the proof.
        prove: ask the engine.
        allow_unproved: keep banks that are not disproved, though not proved either.
    """

    arguments: tuple[str, ...]
    cell_map: CellMap
    min_bits: int = 4
    one_clock_per_variable: bool = False
    test_port: str = "test_en"
    test_pins: tuple[TestPin, ...] = ()
    off: tuple[str, ...] = ()
    limits: Limits = field(default_factory=Limits)
    prove: bool = True
    allow_unproved: bool = False


@dataclass
class StopWatch:
    """Add up where the time goes, and say what runs."""

    progress: Progress
    seconds: dict[str, float] = field(default_factory=dict[str, float])

    @contextmanager
    def stage(self, name: str, what: str) -> Generator[None]:
        """Time a stage; loops add up."""
        self.progress(what)
        began = time.perf_counter()
        try:
            yield
        finally:
            self.seconds[name] = self.seconds.get(name, 0.0) + time.perf_counter() - began
