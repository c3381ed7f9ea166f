"""Rewrite a core through the command line, as a user would, and hand the outcome to its testbench."""

import json
import sys
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path
from typing import Any

from tests.cores.corpus import SITE, Core, core
from tests.cores.running import Ran, Rtl, run

TEST_PORT = "test_en"  # the default of --test-port


@dataclass(frozen=True)
class GatedBank:
    """What the report says of a bank with a cell; its occurrences may differ in width."""

    name: str
    module: str
    instance: str
    registers: tuple[str, ...]
    widths: frozenset[int]
    evidence: str

    @property
    def bits(self) -> int:
        """Give the bits of one occurrence, where all are alike."""
        (bits,) = self.widths
        return bits

    @property
    def place(self) -> str:
        """Name its cell in the text, `module.instance`."""
        return f"{self.module}.{self.instance}"


@dataclass(frozen=True)
class Rewritten:
    """One finished rewrite.

    Attributes:
        core: the design.
        folder: what `--out` wrote.
        messages: what the run printed.
    """

    core: Core
    folder: Path
    messages: str

    @cached_property
    def report(self) -> dict[str, Any]:
        """The report, as JSON."""
        return json.loads((self.folder / "report.json").read_text(encoding="utf-8"))

    @cached_property
    def changed(self) -> tuple[tuple[Path, Path], ...]:
        """Pairs of original and changed file."""
        files = _files(self.folder / "rtl")
        return tuple((_original(self.core, path.relative_to(self.folder / "rtl")), path) for path in files)

    @cached_property
    def rtl(self) -> Rtl:
        """What a bench compiles; without any cell there is no test port either."""
        return Rtl(self.changed, _files(self.folder / "cell"), TEST_PORT if self.banks else None)

    @cached_property
    def banks(self) -> tuple[GatedBank, ...]:
        """The banks that got a cell."""
        names = {cell["id"]: f"u_icg_{cell['name']}" for cell in self.report["cells"]}
        gated = [bank for bank in self.report["banks"] if bank["verdict"] == "gated"]
        return tuple(_bank(bank, names[bank["cell"]]) for bank in gated)

    @cached_property
    def registers(self) -> dict[str, tuple[str, ...]]:
        """The registers behind each cell, by `module.instance`."""
        found: dict[str, tuple[str, ...]] = {}
        for bank in self.banks:
            found[bank.place] = (*found.get(bank.place, ()), *bank.registers)
        return found


def rewrite(name: str, out: Path, *options: str) -> Rewritten:
    """Rewrite a core into a folder; fails with the tool's messages when it does not end with 0."""
    ran = stillclock("rewrite", *core(name).arguments(), "--out", str(out), *options)
    assert ran.status == 0, f"stillclock rewrite of {name} ended with {ran.status}:\n{ran.output}"
    return Rewritten(core(name), out, ran.output)


def stillclock(*arguments: str, folder: Path = Path()) -> Ran:
    """Run the tool of this checkout in a process of its own."""
    return run((sys.executable, "-m", "rewriter", *arguments), folder, environment={"SITE": str(SITE)})


def _files(folder: Path) -> tuple[Path, ...]:
    return tuple(sorted(path for path in folder.rglob("*") if path.is_file()))


def _bank(bank: dict[str, Any], instance: str) -> GatedBank:
    widths = {int(occurrence["bits"]) for occurrence in bank["occurrences"]}
    registers = tuple(bank["registers"])
    return GatedBank(bank["name"], bank["module"], instance, registers, frozenset(widths), bank["evidence"]["kind"])


def _original(design: Core, path: Path) -> Path:
    """Find the source that a changed file stands for: the one whose path ends with the same folders and name."""
    found = [source for source in design.sources() if source.parts[-len(path.parts) :] == path.parts]
    assert len(found) == 1, f"{path} stands for {len(found)} files of {design.name}"
    return found[0]
