"""A finished rewrite to plant mutants into: texts, cells, and the registers behind each cell."""

from dataclasses import dataclass, replace
from functools import cached_property

from rewriter.analysis import temporaries
from rewriter.edit.cells import load_cell_map
from rewriter.flow.checks import rewritten_source
from rewriter.flow.job import Job
from rewriter.flow.loop import rewrite
from rewriter.logic.elaborate import elaborate
from rewriter.logic.lemma import prove_cells
from rewriter.logic.netlist import Netlist
from rewriter.model.evidence import ProofJob
from rewriter.model.run import Run
from tests.mutants.places import Text, read_places
from tests.mutants.planting import Planted, alone, plant, with_all

CellName = tuple[str, str]
"""Definition and instance of a gating cell."""


@dataclass(frozen=True)
class Subject:
    """One rewrite under test."""

    run: Run
    job: ProofJob

    @cached_property
    def texts(self) -> dict[str, Text]:
        """The changed files, with all places of their wake conditions."""
        assert self.run.rewrite is not None
        return {file.path: read_places(file.new, self.run.rewrite.cells) for file in self.run.rewrite.files}

    @cached_property
    def planted(self) -> tuple[Planted, ...]:
        """Every mutant of every wake condition."""
        return plant(self.texts)

    @cached_property
    def registers(self) -> dict[CellName, frozenset[str]]:
        """What the plan put behind each cell: the names a proof must name."""
        assert self.run.rewrite is not None
        names = {cell.cell: (cell.definition, cell.instance) for cell in self.run.rewrite.cells}
        found: dict[CellName, frozenset[str]] = dict.fromkeys(names.values(), frozenset())
        for bank in self.run.plan.banks:
            variables = {variable(part.variable) for register in bank.registers for part in register.parts}
            found[names[bank.cell]] |= variables
        return found

    @cached_property
    def sides(self) -> tuple[Netlist, Netlist]:
        """The original, and the rewrite that holds all mutants of wake conditions; elaborated once."""
        return self._elaborated(memories=True)

    @cached_property
    def flat(self) -> tuple[Netlist, Netlist]:
        """The same, with memories as registers."""
        return self._elaborated(memories=False)

    def _elaborated(self, *, memories: bool) -> tuple[Netlist, Netlist]:
        changed = {
            file: with_all(text, [one for one in self.planted if one.file == file]) for file, text in self.texts.items()
        }
        assert self.job.gold is not None
        sources = {"gold": self.job.gold, "gate": self.job.gate.with_texts(changed)}
        done = elaborate(sources, self.job.top, self.job.limits.run_seconds, memories=memories)
        assert len(done.sides) == 2, done.message
        return done.sides[0], done.sides[1]

    @cached_property
    def lemma(self) -> dict[str, str]:
        """The proof of the cells: no mutant touches their text."""
        return prove_cells(dict(self.job.cell_texts))

    def alone(self, planted: Planted) -> ProofJob:
        """Give the whole proof with one mutant as text."""
        return self.with_text(planted.file, alone(self.texts[planted.file], planted))

    def with_text(self, file: str, text: bytes) -> ProofJob:
        """Give the whole proof with another text of one file."""
        return replace(self.job, gate=self.job.gate.with_texts({file: text}))


def subject(*arguments: str) -> Subject:
    """Rewrite a design in memory."""
    run = rewrite(Job(arguments, load_cell_map("behavioural"), prove=False), lambda _: None)
    done = run.rewrite
    assert done is not None
    gate = rewritten_source(run.design, done)
    top = run.design.top
    job = ProofJob(
        run.design.source, gate, top, done.cell_files, done.test_ports.get(top),
        stubs=run.design.stubs, temporaries=temporaries.all_of(run.design),
    )  # fmt: skip
    return Subject(run, job)


def variable(name: str) -> str:
    """Give the variable's own name, without scope and bits."""
    return name.partition("[")[0].rpartition(".")[2]
