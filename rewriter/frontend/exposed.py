"""Reads of a block that can see a value from before the clock edge, because no `=` came first."""

from collections.abc import Iterable
from functools import reduce

from rewriter.model.expr import Expr
from rewriter.model.statement import Assign, Block, Case, If, Loop, Opaque, Statement


def read_before_written(body: Statement) -> frozenset[str]:
    """Give the variables that a block may read before it has written them with `=`."""
    walk = _Walk()
    walk.statement(body, frozenset())
    return frozenset(walk.exposed)


class _Walk:
    """Follow what is certainly written at each point; `exposed` collects the other reads."""

    def __init__(self) -> None:
        self.exposed: set[str] = set()

    def statement(self, statement: Statement | None, written: frozenset[str]) -> frozenset[str]:
        """Walk a statement; give what is written after it."""
        if isinstance(statement, Assign):
            return self._assign(statement, written)
        if isinstance(statement, Block):
            for inner in statement.body:
                written = self.statement(inner, written)
            return written
        if isinstance(statement, If):
            self._read([statement.condition], written)
            return self.statement(statement.then, written) & self.statement(statement.other, written)
        if isinstance(statement, Case):
            return self._case(statement, written)
        if isinstance(statement, Loop):
            counted = written.union(statement.variables, statement.outer_variables)
            self.statement(statement.body, counted)
            return counted
        if isinstance(statement, Opaque):
            self.exposed |= statement.reads - written
        return written

    def _assign(self, statement: Assign, written: frozenset[str]) -> frozenset[str]:
        indices = [index for target in statement.targets for index in target.indices]
        self._read([statement.rhs, *indices], written)
        if not statement.blocking:
            return written
        return written.union(target.variable for target in statement.targets if not target.indices)

    def _case(self, statement: Case, written: frozenset[str]) -> frozenset[str]:
        self._read([statement.selector, *(label for item in statement.items for label in item.labels)], written)
        ends = [self.statement(item.body, written) for item in statement.items]
        if not any(item.is_default for item in statement.items):
            return written
        return reduce(frozenset[str].intersection, ends)

    def _read(self, expressions: Iterable[Expr], written: frozenset[str]) -> None:
        for expression in expressions:
            self.exposed |= expression.reads() - written
