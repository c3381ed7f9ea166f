"""Prove a rewrite: elaborate both texts, prove module by module, then check what crosses modules."""

import time
from collections.abc import Callable
from concurrent.futures import ThreadPoolExecutor
from dataclasses import replace
from typing import TypeVar

from rewriter.logic.blast import UnsupportedCellError
from rewriter.logic.cone import LoopError
from rewriter.logic.elaborate import Elaborated, elaborate
from rewriter.logic.engine import compile_once
from rewriter.logic.lemma import PROVED, prove_cells
from rewriter.logic.netlist import Module, Netlist
from rewriter.model.cells import FALLING, RISING
from rewriter.model.evidence import CellEvidence, Mismatch, ProofJob, ProofResult
from rewriter.model.reasons import EvidenceKind
from rewriter.prove.domains import Domains
from rewriter.prove.hierarchy import Hierarchy
from rewriter.prove.module import CellFinding, ModuleProof, prove_module
from rewriter.prove.override import check_override
from rewriter.prove.pair import GATING
from rewriter.prove.wakes import equal_wakes, find_wider

Progress = Callable[[str], None]
_T = TypeVar("_T")


def prove(job: ProofJob, progress: Progress | None = None) -> ProofResult:
    """Prove a rewrite against its original, or RTL that holds our cells against itself.

    Args:
        job: what to prove.
        progress: is told what takes long.

    Raises:
        NoAnswerError: the engine cannot run.
    """
    return _Run(job, progress).result()


class _Run:
    def __init__(self, job: ProofJob, progress: Progress | None) -> None:
        self.job = job
        self.progress = progress
        self.deadline = time.monotonic() + job.limits.run_seconds
        self.seconds: dict[str, float] = {}
        self.cells: list[CellEvidence] = []
        self.mismatches: list[Mismatch] = []
        self.undecided: list[str] = []
        self.unread: list[tuple[str, str]] = []
        self.notes: list[str] = []
        self.wakes: list[tuple[str, ...]] = []
        self.registers = self.bits = 0
        self.apart = True
        self._proofs: dict[tuple[str, str], ModuleProof | str] = {}

    def result(self) -> ProofResult:
        """Do all of it."""
        compile_once(self.progress)
        with ThreadPoolExecutor(1) as pool:
            # The cells are proved beside the elaboration: both wait for the engine.
            cells = pool.submit(prove_cells, self._cell_texts())
            elaborated = self._elaborate(memories=True)
            if elaborated.sides and self._memories_differ(elaborated):
                elaborated = self._elaborate(memories=False)
            lemma = self._timed("cell", cells.result)
        if elaborated.sides:
            self.notes += elaborated.notes
            self._prove(elaborated.sides[0], elaborated.sides[-1], lemma)
        else:
            self.unread.append((self.job.top, elaborated.message))
        return ProofResult(
            tuple(self.cells), tuple(self.mismatches), tuple(self.undecided), lemma, tuple(self.wakes),
            tuple(self.unread), self.seconds, self.registers, self.bits, tuple(dict.fromkeys(self.notes)),
        )  # fmt: skip

    def _elaborate(self, *, memories: bool) -> Elaborated:
        sources = {"gate": self.job.gate} if self.job.gold is None else {"gold": self.job.gold, "gate": self.job.gate}
        done = elaborate(sources, self.job.top, self._left(), memories=memories, stubs=self.job.stubs)
        for stage, seconds in zip(("elaborate", "read"), done.seconds, strict=True):
            self.seconds[stage] = self.seconds.get(stage, 0.0) + seconds
        self.apart = done.apart
        return done

    def _temporaries(self, definition: str) -> frozenset[str]:
        """Give the temporaries of a module; one that holds others flattened has theirs as well."""
        return frozenset(name for owner, name in self.job.temporaries if owner == definition or not self.apart)

    def _prove(self, gold: Netlist, gate: Netlist, lemma: dict[str, str]) -> None:
        originals, rewritten = gold.instances(), gate.instances()
        proofs: dict[str, ModuleProof] = {}
        start = time.monotonic()
        for path, module in rewritten.items():
            original = originals.get(path)
            if original is None:
                self._not_checked(path, module, "the original has no such instance")
                continue
            proof = self._module(original, module)
            if isinstance(proof, str):
                self._not_checked(path, module, proof)
            else:
                proofs[path] = proof
        self.seconds["modules"] = time.monotonic() - start
        hierarchy = Hierarchy(self.job.top, proofs)
        self._report(hierarchy, lemma)

    def _module(self, gold: Module, gate: Module) -> ModuleProof | str:
        key = (gold.digest, gate.digest)
        known = self._proofs.get(key)
        if known is not None:
            return known
        limits = self.job.limits
        try:
            proof = prove_module(
                gold,
                gate,
                itself=self.job.gold is None,
                query_seconds=limits.query_seconds,
                deadline=self.deadline,
                temporaries=self._temporaries(gate.definition),
            )
            find_wider(proof)
            self.wakes += [(gate.definition, *group) for group in equal_wakes(proof)]
        except UnsupportedCellError as error:
            proof = f"not modelled: {error}"
        except LoopError as error:
            proof = f"a combinational loop through {error}"
        self._proofs[key] = proof
        return proof

    def _not_checked(self, path: str, module: Module, message: str) -> None:
        self.unread.append((path, message))
        for name, cell in module.instances.items():
            if cell.type in GATING:
                self.cells.append(
                    CellEvidence(
                        path, module.definition, name, EvidenceKind.NOT_CHECKED, (), (), "not-checked", message
                    )
                )

    def _report(self, hierarchy: Hierarchy, lemma: dict[str, str]) -> None:
        start = time.monotonic()
        domains = Domains(hierarchy)
        for path, proof in hierarchy.proofs.items():
            self.registers += proof.registers
            self.bits += proof.bits
            self.mismatches += [Mismatch(path, f.what, f.detail, f.counterexample) for f in proof.findings]
            self.undecided += [f"{path}.{text}" for text in proof.undecided]
            self.notes += [f"{path}.{text}" for text in proof.notes]
            for cell in proof.cells.values():
                own = replace(cell)
                _refuse_cell(own, lemma)
                objection = domains.objection(path, own)
                if objection:
                    own.refuse(EvidenceKind.DISPROVED, objection.reason, objection.detail)
                self.cells.append(_evidence(path, hierarchy.side(path).module.definition, own))
        self.seconds["domains"] = time.monotonic() - start
        answer = self._timed(
            "override",
            lambda: check_override(hierarchy, self.job.test_port, active_low=self.job.test_active_low),
        )
        self.mismatches += answer.mismatches
        self.undecided += answer.undecided

    def _cell_texts(self) -> dict[str, str]:
        if self.job.cell_texts:
            return dict(self.job.cell_texts)
        marks = [f"module {name}".encode() for name in (RISING, FALLING)]
        return {
            text.path: text.data.decode("utf-8", "replace")
            for text in self.job.gate.texts
            if any(mark in text.data for mark in marks)
        }

    def _left(self) -> float:
        return max(self.deadline - time.monotonic(), 1.0)

    def _timed(self, stage: str, work: Callable[[], _T]) -> _T:
        start = time.monotonic()
        try:
            return work()
        finally:
            self.seconds[stage] = self.seconds.get(stage, 0.0) + time.monotonic() - start

    def _memories_differ(self, elaborated: Elaborated) -> bool:
        """Tell whether a memory has other write ports on one side, so that it must be compared word by word."""
        before, after = (side.instances() for side in (elaborated.sides[0], elaborated.sides[-1]))
        return any(_ports(before[path]) != _ports(module) for path, module in after.items() if path in before)


def _ports(module: Module) -> dict[str, tuple[object, ...]]:
    return {
        cell.name: tuple(cell.parameters[key] for key in ("WR_PORTS", "WR_CLK_POLARITY", "WR_PRIORITY_MASK"))
        for cell in module.cells
        if cell.type == "$mem_v2"
    }


def _refuse_cell(cell: CellFinding, lemma: dict[str, str]) -> None:
    said = lemma.get(RISING if cell.gating.rising else FALLING, PROVED)
    if not said.startswith(PROVED):
        cell.refuse(EvidenceKind.DISPROVED, "disproved", f"the cell itself: {said}")


def _evidence(path: str, definition: str, cell: CellFinding) -> CellEvidence:
    return CellEvidence(
        path, definition, cell.gating.name, cell.kind, tuple(cell.registers), tuple(cell.failing), cell.reason,
        cell.detail, cell.counterexample, cell.wider, tuple(cell.dead),
    )  # fmt: skip
