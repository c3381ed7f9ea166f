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
        return Rtl(self.changed, _files(self.folder / "cell"), TEST_PORT if self.gated else None)

    @cached_property
    def registers(self) -> dict[str, tuple[str, ...]]:
        """The registers behind each cell, by `module.instance`."""
        found: dict[str, tuple[str, ...]] = {}
        for bank in self.gated:
            cell = f"{bank['module']}.{instance(bank)}"
            found[cell] = (*found.get(cell, ()), *(str(register) for register in bank["registers"]))
        return found

    @property
    def gated(self) -> tuple[dict[str, Any], ...]:
        """The banks that got a cell."""
        return tuple(bank for bank in self.report["banks"] if bank["verdict"] == "gated")


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


def instance(bank: dict[str, Any]) -> str:
    """Give the name of a gated bank's cell in the text; its id ends with the name it was given."""
    return f"u_icg_{bank['cell'].rpartition(':')[2]}"


def _original(design: Core, path: Path) -> Path:
    """Find the source that a changed file stands for: the one whose path ends with the same folders and name."""
    found = [source for source in design.sources() if source.parts[-len(path.parts) :] == path.parts]
    assert len(found) == 1, f"{path} stands for {len(found)} files of {design.name}"
    return found[0]
