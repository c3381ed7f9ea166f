"""Existing gating cells: a latch whose output is joined with the clock that it follows."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from pyslang.ast import (
    AssignmentExpression,
    BinaryExpression,
    BinaryOperator,
    BlockStatement,
    ConditionalStatement,
    ContinuousAssignSymbol,
    ExpressionKind,
    ProceduralBlockKind,
    ProceduralBlockSymbol,
    Symbol,
    SymbolKind,
    TimedStatement,
)

from rewriter.frontend.blocks import is_clocked
from rewriter.frontend.bodies import Body
from rewriter.frontend.expressions import names_in

_JOINS = (BinaryOperator.BinaryAnd, BinaryOperator.LogicalAnd, BinaryOperator.BinaryOr, BinaryOperator.LogicalOr)


def is_cell_like(body: Body) -> bool:
    """Say whether a body holds a latch ANDed or ORed with a signal that the latch's block reads."""
    latched: set[Symbol] = set()
    read: set[Symbol] = set()
    for block in body.procedures:
        if _is_latch(block):
            written = _written(block)
            latched |= written
            read |= {name.symbol for name in names_in(block)} - written
    if not latched:
        return False
    assigns: list[ContinuousAssignSymbol] = []
    body.symbol.visit(lookup_table={SymbolKind.ContinuousAssign: assigns.append})
    return any(_joins(assign, latched, read) for assign in assigns)


def _is_latch(block: ProceduralBlockSymbol) -> bool:
    """Say whether a block is a latch: `always_latch`, or `always @(…)` around a lone `if` without else."""
    if block.procedureKind is ProceduralBlockKind.AlwaysLatch:
        return True
    statement = block.body
    if block.procedureKind is not ProceduralBlockKind.Always or not isinstance(statement, TimedStatement):
        return False
    statement = statement.stmt
    while isinstance(statement, BlockStatement):
        statement = statement.body
    return isinstance(statement, ConditionalStatement) and statement.ifFalse is None and not is_clocked(block)


def _written(block: ProceduralBlockSymbol) -> set[Symbol]:
    writes: list[AssignmentExpression] = []
    block.visit(lookup_table={ExpressionKind.Assignment: writes.append})
    symbols = (write.left.getSymbolReference(allowPacked=True) for write in writes)
    return {symbol for symbol in symbols if symbol is not None}


def _joins(assign: ContinuousAssignSymbol, latched: set[Symbol], read: set[Symbol]) -> bool:
    assignment = assign.assignment
    right = assignment.right if isinstance(assignment, AssignmentExpression) else None
    if not isinstance(right, BinaryExpression) or right.op not in _JOINS:
        return False
    sides = [{name.symbol for name in names_in(side)} for side in (right.left, right.right)]
    return any(len(a) == 1 and a <= latched and b & read for a, b in (sides, sides[::-1]))
