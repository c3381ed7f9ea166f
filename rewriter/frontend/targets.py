"""Targets: what an assignment writes, down to the bits."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Iterator

from pyslang.ast import (
    ConcatenationExpression,
    ConversionExpression,
    ElementSelectExpression,
    Expression,
    MemberAccessExpression,
    RangeSelectExpression,
    SimpleAssignmentPatternExpression,
    StreamingConcatenationExpression,
)

from rewriter.frontend.bits import extent
from rewriter.frontend.expressions import Expressions
from rewriter.frontend.names import is_local
from rewriter.frontend.places import Locator
from rewriter.model.expr import Expr, Reference
from rewriter.model.statement import Index, Target


def targets_of(
    expression: Expression, expressions: Expressions, locator: Locator, loop_variables: frozenset[str]
) -> tuple[Target, ...] | None:
    """Give the targets of a left-hand side, None when it has a form that is not understood.

    Args:
        expression: the left-hand side.
        expressions: lowers its indices.
        locator: gives its text.
        loop_variables: paths of the variables of enclosing loops.
    """
    found: list[Target] = []
    for part in parts_of(expression):
        target = _target(part, expressions, locator, loop_variables)
        if target is None:
            return None
        found.append(target)
    return tuple(found)


def parts_of(expression: Expression) -> Iterator[Expression]:
    """Give the names and selects that a left-hand side writes, concatenations taken apart."""
    if isinstance(expression, ConversionExpression) and expression.isImplicit:
        yield from parts_of(expression.operand)
    elif isinstance(expression, ConcatenationExpression):
        for part in expression.operands:
            yield from parts_of(part)
    elif isinstance(expression, SimpleAssignmentPatternExpression):
        for part in expression.elements:
            yield from parts_of(part)
    elif isinstance(expression, StreamingConcatenationExpression):
        for stream in expression.streams:
            yield from parts_of(stream.operand)
    else:
        yield expression


def _target(
    expression: Expression, expressions: Expressions, locator: Locator, loop_variables: frozenset[str]
) -> Target | None:
    place = extent(expression, expressions.value)
    if place is None:
        return None
    indices = tuple(expressions.lower(index) for index in _indices(expression))
    return Target(
        variable=expressions.names.path(place.symbol),
        bits=place.bits,
        index=_index(indices, loop_variables),
        unpacked=place.unpacked,
        span=locator.span(expression.sourceRange),
        is_local=is_local(place.symbol),
        indices=indices,
    )


def _indices(expression: Expression) -> Iterator[Expression]:
    if isinstance(expression, ElementSelectExpression):
        yield from _indices(expression.value)
        yield expression.selector
    elif isinstance(expression, RangeSelectExpression):
        yield from _indices(expression.value)
        yield expression.left
        yield expression.right
    elif isinstance(expression, MemberAccessExpression):
        yield from _indices(expression.value)


def _index(indices: tuple[Expr, ...], loop_variables: frozenset[str]) -> Index:
    """Say what indices depend on: constants, loop variables (and constants), or anything else."""
    kind = Index.CONSTANT
    for index in indices:
        if index.constant is not None:
            continue
        names = {node.name for node in index.walk() if isinstance(node, Reference) and not node.is_parameter}
        if not names or not index.reads() <= loop_variables or not names <= loop_variables:
            return Index.VARIABLE
        kind = Index.LOOP
    return kind
