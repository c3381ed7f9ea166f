"""Walk the branches around some assignments: what a pruned copy of a block keeps."""

from collections.abc import Callable, Iterator

from rewriter.model.expr import Expr, Reference
from rewriter.model.statement import Assign, Case, If, Loop, Statement

Wanted = Callable[[Assign], bool]


def around(body: Statement, wanted: Wanted) -> tuple[Statement, ...]:
    """Give the wanted assignments and every statement above them, outermost first."""
    kept: set[int] = set()
    for start, (statement, _) in enumerate(body.family):
        if isinstance(statement, Assign) and wanted(statement):
            place = start
            while place >= 0 and place not in kept:
                kept.add(place)
                place = body.family[place][1]
    return tuple(body.family[place][0] for place in sorted(kept))


def conditions(statements: tuple[Statement, ...]) -> Iterator[Expr]:
    """Yield the conditions of `if`s and the selectors of `case`s among the statements."""
    for statement in statements:
        if isinstance(statement, If):
            yield statement.condition
        elif isinstance(statement, Case):
            yield statement.selector


def labels(statements: tuple[Statement, ...]) -> Iterator[tuple[Expr, bool]]:
    """Yield the labels of `case`s, with whether they may hold wildcards."""
    for statement in statements:
        if isinstance(statement, Case):
            wildcards = statement.keyword != "case" or statement.inside
            for item in statement.items:
                for label in item.labels:
                    yield label, wildcards


def control_reads(statements: tuple[Statement, ...]) -> frozenset[str]:
    """Give the variables that decide which of the statements run."""
    reads: frozenset[str] = frozenset()
    for expr in conditions(statements):
        reads |= expr.reads()
    for expr, _ in labels(statements):
        reads |= expr.reads()
    for statement in statements:
        if isinstance(statement, Loop):
            reads |= statement.reads
    return reads


def local_reads(statements: tuple[Statement, ...]) -> frozenset[str]:
    """Give the variables declared inside the block that conditions and blocking assignments read."""
    exprs = [*conditions(statements), *(label for label, _ in labels(statements))]
    exprs += [s.rhs for s in statements if isinstance(s, Assign) and s.blocking]
    return frozenset(n.name for e in exprs for n in e.walk() if isinstance(n, Reference) and n.is_local)


def value_reads(statement: Assign) -> frozenset[str]:
    """Give the variables that an assignment reads: right-hand side and indices."""
    return statement.rhs.reads().union(*(i.reads() for target in statement.targets for i in target.indices))


def outer_loop_variables(statements: tuple[Statement, ...]) -> frozenset[str]:
    """Give the loop variables of the statements that are declared outside them."""
    return frozenset(name for s in statements if isinstance(s, Loop) for name in s.outer_variables)


def with_sources(body: Statement, reads: frozenset[str], temporaries: frozenset[str]) -> frozenset[str]:
    """Give the temporaries among `reads`, and those that their own assignments and branches need."""
    needed = reads & temporaries
    while True:
        chosen = needed
        statements = around(body, lambda a, names=chosen: a.blocking and any(t.variable in names for t in a.targets))
        found = control_reads(statements)
        for statement in statements:
            if isinstance(statement, Assign):
                found |= value_reads(statement)
        more = needed | (found & temporaries)
        if more == needed:
            return needed
        needed = more
