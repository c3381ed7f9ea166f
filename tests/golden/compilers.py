"""What Icarus and Verilator say of a case, original and rewritten."""

import re
from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path

from rewriter import tools

_WARNING = re.compile(r"^%(?:Warning|Error)-(\w+):", re.MULTILINE)


@dataclass(frozen=True)
class Sources:
    """One side of a case: the files to compile, library files among them, and the macros."""

    files: tuple[Path, ...]
    includes: tuple[Path, ...]
    defines: tuple[str, ...]

    @property
    def verilog(self) -> bool:
        """Say whether the design (its first file) is plain Verilog."""
        return self.files[0].suffix == ".v"

    @property
    def flags(self) -> list[str]:
        return [*(f"-I{path}" for path in self.includes), *(f"-D{name}" for name in self.defines)]


def icarus_can(sources: Sequence[Sources], folder: Path, *, verilog: bool, top: Path | None, output: str) -> str:
    """Compile with Icarus as IEEE 1364-2005 or IEEE 1800-2012 and give its complaints; empty when it can."""
    files = [str(path) for one in sources for path in one.files]
    flags = [flag for one in sources for flag in one.flags]
    bench = [str(top)] if top else []
    language = "-g2005" if verilog else "-g2012"
    ran = tools.run(
        "iverilog", [language, *flags, "-o", output, *bench, *dict.fromkeys(files)], folder=folder, seconds=120
    )
    said = [line for line in (ran.stdout + ran.stderr).splitlines() if "sorry: constant selects" not in line]
    return "" if ran.ok else "\n".join(said)[:1500] or "failed"


def simulate(output: str, folder: Path) -> str:
    """Run a compiled bench."""
    ran = tools.run("vvp", ["-N", output], folder=folder, seconds=300)
    assert ran.ok, ran.stdout[-2000:] + ran.stderr
    return ran.stdout


def verilator(sources: Sources, top: str, folder: Path) -> Counter[str] | None:
    """Count what Verilator 5.006 warns of with -Wall, by kind; None when it cannot read the design."""
    language = "1364-2005" if sources.verilog else "1800-2017"
    arguments = ["--lint-only", "-Wall", "--timing", "-Wno-fatal", "--default-language", language, "--top-module", top]
    ran = tools.run("verilator", [*arguments, *sources.flags, *map(str, sources.files)], folder=folder, seconds=60)
    said = Counter(_WARNING.findall(ran.stdout + ran.stderr))
    return said if ran.ok else None
