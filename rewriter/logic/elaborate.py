"""Elaborate both texts of a design alike, instance by instance where the engine can."""

import shutil
import tempfile
import time
from collections.abc import Generator
from concurrent.futures import ThreadPoolExecutor
from contextlib import contextmanager
from dataclasses import dataclass
from pathlib import Path

from rewriter.logic import engine
from rewriter.logic.engine import MOUNT
from rewriter.logic.netlist import Netlist, read_netlist
from rewriter.logic.staging import Stage
from rewriter.model.source import RtlSource

_ALWAYS = ("-j", "1", "--ignore-timing", "--ignore-assertions", "--allow-use-before-declare")
_HIERARCHY = (("--keep-hierarchy",), ("--best-effort-hierarchy",), ())
_MENDS = 8


@dataclass(frozen=True)
class Elaborated:
    """Both sides, or why not.

    Args:
        sides: gold and gate, or the gate alone; empty when the engine failed.
        message: of the engine, when it failed.
        notes: what a reader of the result must know.
        seconds: time in the engine, and in reading its output.
        apart: every instance is a module of its own.
    """

    sides: tuple[Netlist, ...]
    message: str
    notes: tuple[str, ...]
    seconds: tuple[float, float]
    apart: bool = True


@dataclass(frozen=True)
class _Mode:
    hierarchy: tuple[str, ...]
    synthesis: bool
    memories: bool

    @property
    def options(self) -> tuple[str, ...]:
        define = () if self.synthesis else ("--no-synthesis-define",)
        memories = () if self.memories else ("--no-implicit-memories",)
        return (*_ALWAYS, *self.hierarchy, *define, *memories)


@contextmanager
def work_folder() -> Generator[Path]:
    """Lend a private folder that is removed afterwards."""
    folder = Path(tempfile.mkdtemp(prefix="stillclock-"))
    try:
        yield folder
    finally:
        shutil.rmtree(folder, ignore_errors=True)


def elaborate(
    sources: dict[str, RtlSource],
    top: str,
    seconds: float,
    *,
    memories: bool = True,
    stubs: str = "",
) -> Elaborated:
    """Elaborate the sides of a design, each in the same way.

    Args:
        sources: by side, `gold` and `gate`.
        top: top module.
        seconds: time limit.
        memories: keep arrays as memories; registers otherwise.
        stubs: text of the modules without source, ports and parameters only.

    Raises:
        NoAnswerError: the engine cannot run, or the limit was reached.
    """
    with work_folder() as folder:
        stages = [Stage(folder, side, source, stubs) for side, source in sources.items()]
        for stage in stages:
            stage.write()
        return _Elaboration(folder, stages, top, time.monotonic() + seconds).run(memories=memories)


class _Elaboration:
    def __init__(self, folder: Path, stages: list[Stage], top: str, deadline: float) -> None:
        self.folder = folder
        self.stages = stages
        self.top = top
        self.deadline = deadline
        self.first_message = ""

    def run(self, *, memories: bool) -> Elaborated:
        start = time.monotonic()
        defined = any(d.split("=")[0] == "SYNTHESIS" for stage in self.stages for d in stage.source.defines)
        # The texts as they are given first; only then as a synthesis run would see them.
        for synthesis in (False,) if defined else (False, True):
            for hierarchy in _HIERARCHY:
                mode = _Mode(hierarchy, synthesis, memories)
                if self._read(mode):
                    return self._elaborated(mode, time.monotonic() - start)
        return Elaborated((), self.first_message, (), seconds=(time.monotonic() - start, 0.0))

    def _elaborated(self, mode: _Mode, seconds: float) -> Elaborated:
        start = time.monotonic()
        notes: list[str] = []
        mended = [sorted(stage.mended) for stage in self.stages]
        if any(lines != mended[0] for lines in mended):
            return Elaborated((), self.first_message, (), seconds=(seconds, 0.0))
        notes += [f"initial value left out of the proof: {line}" for line in mended[0]]
        if mode.synthesis:
            notes.append("the engine reads the texts only with SYNTHESIS defined: the proof holds for that")
        sides = tuple(read_netlist(self.folder / f"{stage.side}.json", self.top) for stage in self.stages)
        if mode.hierarchy != _HIERARCHY[0]:
            notes.append("the engine cannot keep all instances apart: some are proved as part of the one above")
        apart = mode.hierarchy == _HIERARCHY[0]
        return Elaborated(sides, "", tuple(notes), (seconds, time.monotonic() - start), apart)

    def _read(self, mode: _Mode) -> bool:
        for _ in range(_MENDS):
            with ThreadPoolExecutor(len(self.stages)) as pool:
                runs = [pool.submit(self._one, stage, mode) for stage in self.stages]
                results = [run.result() for run in runs]
            if all(ran.ok for ran in results):
                return True
            for stage, ran in zip(self.stages, results, strict=True):
                if not ran.ok and not self.first_message:
                    self.first_message = stage.readable(ran.messages)
            mended = [stage.mend(ran.messages) for stage, ran in zip(self.stages, results, strict=True) if not ran.ok]
            if not all(mended):
                return False
        return False

    def _one(self, stage: Stage, mode: _Mode) -> engine.Ran:
        arguments = stage.arguments(self.top, mode.options)
        script = "\n".join(
            (
                f"read_slang -f {MOUNT}/{arguments.name}",
                f"hierarchy -top {self.top}",
                "memory_collect",
                "memory_map -rom-only",
                f"write_json {MOUNT}/{stage.side}.json",
            )
        )
        return engine.run(script, self.folder, self.deadline - time.monotonic())
