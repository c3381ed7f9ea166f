"""Mentions: which variables appear in more than one process of a body."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections import Counter
from collections.abc import Iterator

from pyslang.ast import (
    ContinuousAssignSymbol,
    NetSymbol,
    PrimitiveInstanceSymbol,
    Symbol,
    SymbolKind,
    VisitAction,
)

from rewriter.frontend.bodies import Body
from rewriter.frontend.drivers import net_value
from rewriter.frontend.expressions import names_in


def shared_symbols(body: Body) -> frozenset[Symbol]:
    """Give the symbols that stand in more than one block, assignment or connection of a body."""
    counter: Counter[Symbol] = Counter()
    for symbols in _processes(body):
        counter.update(symbols)
    return frozenset(symbol for symbol, times in counter.items() if times > 1)


def _processes(body: Body) -> Iterator[set[Symbol]]:
    assigns: list[ContinuousAssignSymbol | PrimitiveInstanceSymbol] = []
    nets: list[NetSymbol] = []
    body.symbol.visit(
        lookup_table={
            SymbolKind.ContinuousAssign: assigns.append,
            SymbolKind.PrimitiveInstance: assigns.append,
            SymbolKind.Net: nets.append,
            SymbolKind.Instance: _skip,
        }
    )
    for process in (*body.procedures, *assigns):
        yield {name.symbol for name in names_in(process)}
    for net in nets:
        value = net_value(net)
        if value is not None:
            yield {name.symbol for name in names_in(value)}
    for _, child in body.children:
        for connection in child.portConnections:
            if connection.expression is not None:
                yield {name.symbol for name in names_in(connection.expression)}


def _skip(_: object) -> VisitAction:
    return VisitAction.Skip
