"""Ask the prover about mutants without elaborating each: from their netlists, or with the solver told which one."""

import time
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from functools import cached_property
from typing import Any
from unittest.mock import patch

from rewriter.logic.aig import FALSE, Lit
from rewriter.logic.elaborate import Elaborated
from rewriter.logic.netlist import Module, Netlist
from rewriter.logic.solver import Model, Solver
from rewriter.model.evidence import ProofJob, ProofResult
from rewriter.prove import job as prover
from rewriter.prove.compare import Comparison
from rewriter.prove.module import Liveness, ModuleProof, judge, prove_module
from rewriter.prove.pair import Shared, Side
from rewriter.prove.wakes import find_wider
from tests.mutants.netlists import choose, word
from tests.mutants.relation import Beside, Relation

_QUERY, _RUN = 20.0, 3600.0


class _Known:
    """One module of the rewrite and of the original; mutants of it share their graph and solver."""

    def __init__(self, gold: Module, good: Module) -> None:
        self.shared = Shared(_QUERY, time.monotonic() + _RUN)
        self.gold = Side(self.shared, gold, None)
        self.good = self.side(good)

    def side(self, module: Module) -> Side:
        """Put a mutant into the graph."""
        return Side(self.shared, module, self.gold)

    def prove(self, module: Module, temporaries: frozenset[str]) -> ModuleProof:
        """Do what `prove_module` does, in the shared graph."""
        comparison = Comparison(self.shared, self.gold, self.side(module))
        comparison.collect()
        return judge(comparison, Liveness(comparison, temporaries))


@dataclass(frozen=True)
class Netlists:
    """Runs the whole prover on netlists that are there already.

    Modules that a mutant leaves alone are the same objects, and are proved once for all mutants.

    Args:
        job: of the rewrite.
        gold: the original.
        good: the rewrite.
        flat: both, with memories elaborated as registers; asked for when a mutant sets the ports of one apart.
        lemma: the proof of the cells.
    """

    job: ProofJob
    gold: Netlist
    good: Netlist
    flat: Callable[[], tuple[Netlist, Netlist]]
    lemma: dict[str, str]

    @cached_property
    def _proofs(self) -> dict[str, ModuleProof]:
        return {}

    @cached_property
    def _known(self) -> dict[str, _Known]:
        return {
            name: _Known(self.gold.modules[name], module) for name, module in self.good.modules.items() if module.cells
        }

    def prove(self, change: Callable[[Netlist], Netlist]) -> ProofResult:
        """Prove a mutant: everything after the elaboration."""
        with (
            patch.object(prover, "elaborate", self._elaborated(change)),
            patch.object(prover, "prove_cells", return_value=self.lemma),
            patch.object(prover, "compile_once"),
            patch.object(prover, "prove_module", self._proved),
        ):
            return prover.prove(self.job)

    def relation(self, bad: Netlist) -> Relation:
        """Compare the edges of the modules that a mutant changes with those of the rewrite."""
        changed = [name for name, module in bad.modules.items() if module is not self.good.modules[name]]
        known = [(self._known[name], bad.modules[name]) for name in changed]
        found = [Beside(one.shared, one.good, one.side(module)).relation() for one, module in known]
        return max(found, key=list(Relation).index, default=Relation.SAME)

    def _elaborated(self, change: Callable[[Netlist], Netlist]) -> Callable[..., Elaborated]:
        def elaborated(*_: object, memories: bool, **__: object) -> Elaborated:
            gold, good = (self.gold, self.good) if memories else self.flat()
            return Elaborated((gold, change(good)), "", (), (0.0, 0.0))

        return elaborated

    def _proved(self, gold: Module, gate: Module, **options: Any) -> ModuleProof:  # noqa: ANN401 (passed on)
        name = gate.name
        if self.gold.modules.get(name) is not gold:
            return prove_module(gold, gate, **options)
        if gate is not self.good.modules[name]:
            return self._known[name].prove(gate, options["temporaries"])
        if name not in self._proofs:
            self._proofs[name] = self._known[name].prove(gate, options["temporaries"])
        return self._proofs[name]


class _Assuming(Solver):
    """A solver that takes some literals as 1 in every question."""

    assumed: Sequence[Lit] = ()

    def ask(self, lits: Sequence[Lit]) -> Model | bool | None:
        return super().ask([*lits, *self.assumed])


class Chooser:
    """One module with all mutants of its wake conditions in it: the prover's comparison is built once.

    The word that chooses a mutant is free in the graph; a mutant is proved with the solver told the word's value.
    Clocks, resets and test pins do not depend on the word, so domains and the override are as in the rewrite.

    Args:
        gold: the original.
        gate: the rewrite with all mutants.
        temporaries: of the module.
    """

    def __init__(self, gold: Module, gate: Module, temporaries: frozenset[str]) -> None:
        self.shared = Shared(_QUERY, time.monotonic() + _RUN)
        self.solver = _Assuming(self.shared.aig, _QUERY, time.monotonic() + _RUN)
        self.shared.solver = self.solver
        original = Side(self.shared, gold, None)
        self.bad = Side(self.shared, gate, original)
        self.comparison = Comparison(self.shared, original, self.bad)
        self.comparison.collect()
        self.live = Liveness(self.comparison, temporaries)
        good = choose(Netlist("", {"": gate}), 0).modules[""]
        self._beside = Beside(self.shared, Side(self.shared, good, original), self.bad)
        self._word = {place: self.bad.cone.bit(net)[0] for net, place in word(gate).items()}

    def prove(self, number: int, *cells: str) -> ModuleProof:
        """Prove one mutant; ask whether conditions are too wide for some cells only."""
        self.solver.assumed = self._chosen(number)
        proof = judge(self.comparison, self.live)
        find_wider(replace(proof, cells={name: proof.cells[name] for name in cells}))
        return proof

    def relation(self, number: int) -> Relation:
        """Compare its edges with those of the rewrite."""
        self.solver.assumed = ()
        return self._beside.relation(self._chosen(number))

    def unchanged(self, number: int, cell: str) -> bool:
        """Say whether a mutant's condition is, node for node, the rewrite's: then so is every question about it."""
        wake, unknown = self.comparison.gate.gating_cells()[cell].wake
        return self._with(number, wake, unknown) == self._with(0, wake, unknown)

    def _with(self, number: int, *lits: Lit) -> list[Lit]:
        """Put a value of the word into literals."""
        aig = self.shared.aig
        known = {0: FALSE} | {lit >> 1: lit & 1 ^ 1 for lit in self._chosen(number)}
        for node in aig.cone(lits):
            if node not in known:
                a, b = aig.left[node], aig.right[node]
                known[node] = node << 1 if a < 0 else aig.both(known[a >> 1] ^ a & 1, known[b >> 1] ^ b & 1)
        return [known[lit >> 1] ^ lit & 1 for lit in lits]

    def _chosen(self, number: int) -> list[Lit]:
        return [lit ^ (not number >> place & 1) for place, lit in self._word.items()]
