"""Ask the proof about a fault: does it disprove the rewrite, and does it name the right register?"""

import json
import shutil
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path
from typing import Any

from tests.cores.faults import Fault
from tests.cores.rewriting import Rewritten, stillclock


@dataclass(frozen=True)
class Proof:
    """What the proof said of a fault.

    Attributes:
        verdict: `disproved`: it found a difference; `too often`: a cell runs in cycles in which nothing is written;
            `unproved`: it could not read the faulty text, so the rewrite would not be accepted either; empty: proved.
        named: the difference it reports is at the faulty cell or one of its registers.
    """

    verdict: str
    named: bool


@dataclass(frozen=True)
class Prover:
    """Prove a rewrite whose changed file is replaced by a faulty one."""

    rewritten: Rewritten
    scratch: Path

    def __call__(self, fault: Fault, text: str) -> Proof:
        """Run `prove` on a copy of the output folder with the faulty text in it."""
        return judge(fault, self._prove(text), self._wide_anyway)

    @cached_property
    def _wide_anyway(self) -> frozenset[str]:
        """The cells that run too often without a fault: they say nothing about one."""
        ((_, changed),) = self.rewritten.changed
        answer = self._prove(changed.read_text(encoding="utf-8"))
        assert answer["proved"], "the rewrite is not proved without a fault"
        return frozenset(_place(cell) for cell in answer["cells"] if cell["wider"])

    def _prove(self, text: str) -> Mapping[str, Any]:
        folder = self.scratch / "proved"
        shutil.rmtree(folder, ignore_errors=True)
        shutil.copytree(self.rewritten.folder, folder)
        ((_, changed),) = self.rewritten.changed
        (folder / changed.relative_to(self.rewritten.folder)).write_text(text, encoding="utf-8")
        ran = stillclock("prove", str(folder), "--format", "json")
        assert ran.status in {0, 1, 3}, f"the proof ended with {ran.status}\n{ran.output[-2000:]}"
        return json.loads(ran.output[ran.output.index("{\n") : ran.output.rindex("}\n") + 1])


def judge(fault: Fault, answer: Mapping[str, Any], wide_anyway: frozenset[str]) -> Proof:
    """Read what the proof said: a difference, or a cell that newly runs in cycles in which nothing is written."""
    disproved = [cell for cell in answer["cells"] if cell["kind"] == "disproved"]
    wider = [cell for cell in answer["cells"] if cell["wider"] and _place(cell) not in wide_anyway]
    if disproved or answer["mismatches"]:
        named = any(name in _accepted(fault) for name in _named(disproved, answer["mismatches"]))
        return Proof("disproved", named)
    if wider:
        return Proof("too often", any(_place(cell) == fault.bank for cell in wider))
    return Proof("" if answer["proved"] else "unproved", named=False)


def _place(cell: Mapping[str, Any]) -> str:
    """Name a cell as faults do, `module.instance`."""
    return f"{cell['definition']}.{str(cell['cell']).rpartition('.')[2]}"


def _accepted(fault: Fault) -> set[str]:
    """Give the names that point at the fault: the cell's, and those of its registers."""
    instance = fault.bank.rpartition(".")[2]
    return {instance, *(_variable(register) for register in fault.registers)}


def _named(cells: list[dict[str, Any]], mismatches: list[dict[str, Any]]) -> Iterator[str]:
    for cell in cells:
        yield str(cell["cell"]).rpartition(".")[2]
        yield from (_variable(register) for register in cell["failing"])
    for mismatch in mismatches:
        yield from (_variable(word.strip(",:()")) for word in f"{mismatch['what']} {mismatch['detail']}".split())


def _variable(name: str) -> str:
    """Give the variable's own name, without scope and bits."""
    return name.partition("[")[0].rpartition(".")[2]
