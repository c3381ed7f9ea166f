"""What slang and Verilator say about a design, in a form that compares across a rewrite: without line numbers."""

import re
import shlex
import sys
from collections import Counter
from collections.abc import Sequence
from pathlib import Path

from tests.cores.corpus import expand, read_list
from tests.cores.running import run

# One message: `%Warning-CODE: file:line:column: text`.
_VERILATOR = re.compile(r"^%(Warning|Error)(?:-(\w+))?: (?:([^:\s]+):\d+:(?:\d+:)?)?\s*(.*)$", re.MULTILINE)
_SLANG = re.compile(r"^(\S+?):\d+:\d+: (warning|error): (.*)$", re.MULTILINE)
_LINE = re.compile(r":\d+(?::\d+)?|\bline \d+")
_DRIVER = """
import sys
from pyslang.driver import Driver
driver = Driver()
driver.addStandardArgs()
ready = driver.parseCommandLine(sys.argv[1]) and driver.processOptions() and driver.parseAllSources()
if ready:
    driver.reportCompilation(driver.createCompilation(), False)
    driver.reportDiagnostics(False)
sys.exit(not ready or driver.diagEngine.numErrors > 0)
"""
_OURS = {"--allow-toplevel-iface-ports"}  # options of slang alone


def verilator(list_file: Path, *extra: str) -> Counter[str]:
    """Lint with every warning on; the wrapper of the cell is read as in simulation."""
    words = ["--lint-only", "-Wall", "-Wno-fatal", "+define+STILLCLOCK_SIMULATION", *_words(list_file), *extra]
    ran = run(("verilator", *words), list_file.parent)
    assert ran.status == 0, ran.output[-3000:]
    messages = _VERILATOR.findall(ran.output)
    return Counter(f"{kind} {code} {Path(name).name}: {_LINE.sub('', text)}" for kind, code, name, text in messages)


def slang(list_file: Path) -> Counter[str]:
    """Elaborate with slang's own driver, and collect what it says; in a process, as it prints past Python."""
    ran = run(
        (sys.executable, "-c", _DRIVER, f"slang -DSTILLCLOCK_SIMULATION -F {shlex.quote(str(list_file))}"),
        list_file.parent,
    )
    assert ran.status == 0, ran.output[-3000:]
    found = _SLANG.findall(ran.output)
    return Counter(f"{kind} {Path(name).name}: {_LINE.sub('', text)}" for name, kind, text in found)


def _words(list_file: Path) -> Sequence[str]:
    """Open a file list up: Verilator writes some options otherwise than slang, and relative paths are the list's."""
    entries = [entry for entry in read_list(list_file) if not entry.startswith("//")]
    lines = [shlex.split(str(expand(entry))) for entry in entries]
    return [word for line in lines if line[0] not in _OURS for word in _translated(line)]


def _translated(line: list[str]) -> Sequence[str]:
    match line:
        case ["--top", top]:
            return ("--top-module", top)
        case ["-G", parameter]:
            return (f"-G{parameter}",)
        case _:
            return line
