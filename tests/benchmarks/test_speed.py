"""Where the time goes: ratios measured in one run, printed and kept, never judged by a limit of their own.

`pytest tests/benchmarks -s` prints the table; it also goes to speed.json in the folder that
STILLCLOCK_BENCHMARKS names (a temporary one without it).
"""

import json
import os
import subprocess
import sys
from pathlib import Path

import pyslang
import pytest
from pyslang.driver import CommandLineOptions, Driver

from rewriter.frontend import read
from rewriter.methods import METHODS
from rewriter.model.plan import Policy
from rewriter.plan import choose, settle
from tests.benchmarks.measure import cost
from tests.cores.corpus import SITE, core

_ROUNDS = 5
ROOT = Path(__file__).parents[2]


def best(action: str, arguments: tuple[str, ...]) -> float:
    """Give the shortest of several runs in seconds, each in a fresh interpreter whose start does not count."""
    code = (
        f"import time; from tests.benchmarks.test_speed import {action} as action; start = time.perf_counter(); "
        f"kept = action({arguments!r}); print(time.perf_counter() - start)"
    )
    command = [sys.executable, "-c", code]
    runs = [subprocess.run(command, cwd=ROOT, check=True, capture_output=True, text=True) for _ in range(_ROUNDS)]
    return min(float(run.stdout) for run in runs)


def slang(arguments: tuple[str, ...]) -> pyslang.ast.Compilation:
    """Parse and elaborate with slang alone."""
    driver = Driver()
    driver.addStandardArgs()
    options = CommandLineOptions()
    options.ignoreProgramName = True
    assert driver.parseCommandLine(" ".join(arguments), options)
    assert driver.processOptions()
    driver.parseAllSources()
    compilation = driver.createCompilation()
    compilation.getAllDiagnostics()
    return compilation


def survey(arguments: tuple[str, ...]) -> int:
    """Do what `survey` does, short of the table; give the number of banks."""
    design = read(arguments)
    outcomes = [
        outcome for module in design.modules for method in METHODS for outcome in method.propose(module, design)
    ]
    return len(choose(settle(outcomes), Policy(), {}).banks)


def keep(name: str, figures: dict[str, float], folder: Path) -> None:
    """Print figures, and add them to the table that is kept."""
    place = Path(os.environ.get("STILLCLOCK_BENCHMARKS", folder)) / "speed.json"
    table: dict[str, dict[str, float]] = json.loads(place.read_text()) if place.exists() else {}
    table[name] = {key: round(value, 3) for key, value in figures.items()}
    place.write_text(json.dumps(table, indent=2) + "\n")
    sys.stderr.write(f"\n{name}: {table[name]}\n")


@pytest.mark.core
@pytest.mark.parametrize("name", ["ibex", "cv32e40p", "vexriscv_full", "picorv32"])
def test_survey_against_slang(name: str, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("SITE", str(SITE))
    arguments = core(name).arguments()
    assert survey(arguments) > 0
    alone, whole = best("slang", arguments), best("survey", arguments)
    keep(f"survey {name}", {"slang s": alone, "survey s": whole, "ratio": whole / alone}, tmp_path)


@pytest.mark.core
@pytest.mark.engine
@pytest.mark.slow
@pytest.mark.parametrize("name", ["ibex", "picorv32", "vexriscv_full"])
def test_rewrite_with_proof(name: str, tmp_path: Path) -> None:
    out = tmp_path / "out"
    command = [sys.executable, "-m", "rewriter", "rewrite", *core(name).arguments(), "--out", str(out)]
    spent = cost(command, {"SITE": str(SITE)})
    report = json.loads((out / "report.json").read_text())
    assert report["totals"]["gated_bits"] > 0
    keep(f"rewrite {name}", {"s": spent.seconds, "MB": spent.megabytes}, tmp_path)
