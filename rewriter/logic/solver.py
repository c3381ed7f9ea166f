"""One incremental SAT solver over an and-inverter graph."""

import time
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Any, cast

from pysat.solvers import Cadical153  # pyright: ignore[reportMissingTypeStubs, reportUnknownVariableType]

from rewriter.logic.aig import FALSE, TRUE, Aig, Lit

_SLICE = 4000
"""Conflicts between two looks at the clock."""


@dataclass(frozen=True)
class Model:
    """A satisfying assignment: the variable nodes that are 1."""

    ones: frozenset[int]

    def values(self) -> dict[int, int]:
        """Give it as the patterns of `Aig.simulate`."""
        return dict.fromkeys(self.ones, 1)


class Solver:
    """Ask whether literals of a graph can be 1 together; cones are encoded when first asked about.

    Args:
        aig: the graph.
        query_seconds: limit of one question.
        deadline: `time.monotonic()` value after which every question is undecided.
    """

    def __init__(self, aig: Aig, query_seconds: float, deadline: float) -> None:
        self.aig = aig
        self.query_seconds = query_seconds
        self.deadline = deadline
        self.seconds = 0.0
        self._engine: Any = cast("Any", Cadical153)()
        self._numbers: dict[int, int] = {}

    def close(self) -> None:
        """Free the engine's memory."""
        self._engine.delete()

    def require(self, clause: Iterable[Lit]) -> None:
        """Add a clause over literals of the graph for all later questions."""
        lits = [lit for lit in clause if lit != FALSE]
        if TRUE not in lits:
            self._encode(lits)
            self._engine.add_clause([self._number(lit) for lit in lits])

    def ask(self, lits: Sequence[Lit]) -> Model | bool | None:
        """Ask whether all literals can be 1 together.

        Returns:
            A model, False when they cannot, None when the limit was reached.
        """
        wanted = [lit for lit in lits if lit != TRUE]
        if FALSE in wanted:
            return False
        start = time.monotonic()
        self._encode(wanted)
        answer = self._solve([self._number(lit) for lit in wanted], min(start + self.query_seconds, self.deadline))
        self.seconds += time.monotonic() - start
        return self._model(wanted) if answer else answer

    def _solve(self, assumptions: list[int], until: float) -> bool | None:
        while True:
            if time.monotonic() >= until:
                return None
            self._engine.conf_budget(_SLICE)
            answer = cast("bool | None", self._engine.solve_limited(assumptions=assumptions))
            if answer is not None:
                return answer

    def _model(self, roots: list[Lit]) -> Model:
        signs = cast("list[int]", self._engine.get_model())
        numbers, known = self._numbers, len(signs)
        return Model(
            frozenset(
                node for node in self.aig.support(roots) if numbers[node] <= known and signs[numbers[node] - 1] > 0
            )
        )

    def _number(self, lit: Lit) -> int:
        number = self._numbers[lit >> 1]
        return -number if lit & 1 else number

    def _encode(self, roots: list[Lit]) -> None:
        numbers, left, right = self._numbers, self.aig.left, self.aig.right
        stack = [root >> 1 for root in roots]
        fresh: list[int] = []
        while stack:
            node = stack.pop()
            if node in numbers:
                continue
            numbers[node] = len(numbers) + 1
            if left[node] >= 0:
                fresh.append(node)
                stack += (left[node] >> 1, right[node] >> 1)
        add = self._engine.add_clause
        for node in fresh:
            out, a, b = numbers[node], self._number(left[node]), self._number(right[node])
            add([-out, a])
            add([-out, b])
            add([out, -a, -b])
