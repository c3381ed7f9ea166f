"""What the benches share: the RTL to put in, the outcome, and running outside programs within a time limit."""

import os
import shutil
import signal
import subprocess
import time
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field, replace
from pathlib import Path
from typing import Protocol

from tests.cores.corpus import package

_INSTALL = {
    "iverilog": "apt-get install iverilog",
    "vvp": "apt-get install iverilog",
    "verilator": "apt-get install verilator",
    "make": "apt-get install make",
    "g++": "apt-get install g++",
    "riscv64-unknown-elf-gcc": "apt-get install gcc-riscv64-unknown-elf picolibc-riscv64-unknown-elf",
}
_TAIL = 1500


@dataclass(frozen=True)
class Rtl:
    """The RTL a bench compiles: what stands in for the originals, and what comes on top.

    Attributes:
        replaced: pairs of original and replacement file.
        extra: files to compile as well, such as the one of the cell.
        test_port: top-level input added by the rewrite; None where there is none.
        test_level: what the bench drives on it; None leaves it unconnected where the language allows it, else low.
        defines: macros, without the leading `-D`.
    """

    replaced: tuple[tuple[Path, Path], ...] = ()
    extra: tuple[Path, ...] = ()
    test_port: str | None = None
    test_level: int | None = None
    defines: tuple[str, ...] = ()

    def of(self, original: Path) -> Path:
        """Give the file that stands in for an original, or the original itself."""
        table = {before.resolve(): after for before, after in self.replaced}
        return table.get(original.resolve(), original)

    def with_override(self, level: int) -> "Rtl":
        """Give the same RTL with the test port driven to a level."""
        assert self.test_port is not None, "this RTL has no test port"
        return replace(self, test_level=level)


ORIGINAL = Rtl()


@dataclass(frozen=True)
class BenchRun:
    """How a design's own testbench ended.

    Attributes:
        built: the simulator accepted the sources; a fault that does not build says nothing about the bench.
        hung: the simulation was stopped at its time limit.
        figures: what the bench counts (clock cycles, tests passed), by name.
        log: what the simulation printed, or the build's messages where it did not build.
    """

    bench: str
    passed: bool
    built: bool
    hung: bool
    figures: Mapping[str, int]
    log: str
    seconds: float

    @property
    def tail(self) -> str:
        """Give the end of the log, for an assertion's message."""
        return f"{self.bench}: {dict(self.figures)}\n…{self.log[-_TAIL:]}"


@dataclass(frozen=True)
class Ran:
    """One outside program: its exit status (None when stopped at the limit) and what it printed, both streams."""

    status: int | None
    output: str


class Verdict(Protocol):
    """Judge what a simulation printed: whether it passed, and its figures."""

    def __call__(self, output: str) -> tuple[bool, Mapping[str, int]]: ...


@dataclass(frozen=True)
class Job:
    """A bench ready to go: the commands that build it, the one that simulates, and what counts as passing."""

    bench: str
    folder: Path
    build: tuple[tuple[str, ...], ...]
    simulate: tuple[str, ...]
    verdict: Verdict
    limit: float  # seconds of simulation
    environment: Mapping[str, str] = field(default_factory=dict[str, str])


def run_job(job: Job) -> BenchRun:
    """Build and simulate, and judge the outcome."""
    start = time.monotonic()
    for command in job.build:
        built = run(command, job.folder, environment=job.environment)
        if built.status != 0:
            return _not_built(job, built.output, time.monotonic() - start)
    simulated = run(job.simulate, job.folder, limit=job.limit)
    passed, figures = job.verdict(simulated.output)
    return BenchRun(
        job.bench,
        passed=passed and simulated.status == 0,
        built=True,
        hung=simulated.status is None,
        figures=figures,
        log=simulated.output,
        seconds=time.monotonic() - start,
    )


def _not_built(job: Job, messages: str, seconds: float) -> BenchRun:
    return BenchRun(job.bench, passed=False, built=False, hung=False, figures={}, log=messages, seconds=seconds)


def run(
    command: Sequence[str], folder: Path, *, limit: float = 600.0, environment: Mapping[str, str] | None = None
) -> Ran:
    """Run a program in a folder, with its children, for at most `limit` seconds."""
    require(command[0], folder)
    # A session of its own: at the limit make's children go as well, and nothing else does.
    with subprocess.Popen(
        list(command),
        cwd=folder,
        env={**os.environ, **(environment or {})},
        stdin=subprocess.DEVNULL,
        stdout=subprocess.PIPE,
        stderr=subprocess.STDOUT,
        text=True,
        errors="replace",
        start_new_session=True,
    ) as process:
        try:
            output, _ = process.communicate(timeout=limit)
        except subprocess.TimeoutExpired:
            os.killpg(process.pid, signal.SIGKILL)
            output, _ = process.communicate()
            return Ran(None, output)
        return Ran(process.returncode, output)


def require(program: str, folder: Path | None = None) -> None:
    """Fail, with the line that installs it, when a program is missing."""
    local = folder is not None and (folder / program).is_file()
    how = _INSTALL.get(program, f"apt-get install {program}")
    assert local or shutil.which(program), f"the program {program} is not on the PATH; run: {how}"


def copy_tree(package_name: str, inside: str, target: Path) -> Path:
    """Copy part of an installed package, so that a build may write into it."""
    shutil.copytree(package(package_name) / inside, target, ignore=shutil.ignore_patterns("__pycache__"))
    return target


def bring(files: Sequence[Path], folder: Path, stem: str) -> tuple[str, ...]:
    """Copy files into a bench's folder under plain names (make splits paths at spaces), and give those names."""
    names = tuple(f"{stem}_{index}{path.suffix}" for index, path in enumerate(files))
    for path, name in zip(files, names, strict=True):
        shutil.copyfile(path, folder / name)
    return names


def replace_once(text: str, before: str, after: str) -> str:
    """Change one place of a harness; fail when it is not there exactly once (another version of the package)."""
    assert text.count(before) == 1, f"the installed harness changed: {text.count(before)} places read {before!r}"
    return text.replace(before, after)


def compiler_cache(folder: Path) -> tuple[tuple[str, ...], Mapping[str, str]]:
    """Give Verilator's make variable and environment for ccache where it is installed; faults build 4 times faster.

    The simulator's run-time library and the unchanged parts of a model compile to the same bytes, so only speed
    depends on it.
    """
    if not shutil.which("ccache"):
        return (), {}
    return ("OBJCACHE=ccache",), {"CCACHE_DIR": os.environ.get("CCACHE_DIR", str(folder))}
