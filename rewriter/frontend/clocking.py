"""Clocks and asynchronous resets of a body: what drives them, and where they are read as data."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Iterable, Iterator

from pyslang.analysis import AnalysisManager
from pyslang.ast import (
    ArgumentDirection,
    AssignmentExpression,
    ContinuousAssignSymbol,
    ConversionExpression,
    ElementSelectExpression,
    Expression,
    ExpressionKind,
    GenerateBlockSymbol,
    MemberAccessExpression,
    NamedValueExpression,
    NetSymbol,
    PortConnection,
    PortSymbol,
    RangeSelectExpression,
    Symbol,
    SymbolKind,
    ValueExpressionBase,
    VisitAction,
)

from rewriter.frontend.blocks import event_signals
from rewriter.frontend.bodies import Body
from rewriter.frontend.drivers import net_value
from rewriter.frontend.elaboration import body_of
from rewriter.frontend.expressions import names_in
from rewriter.frontend.places import Locator
from rewriter.frontend.targets import parts_of
from rewriter.model.source import Span


class EventPorts:
    """Tell which ports of a body are clocks or asynchronous resets, below it as well."""

    def __init__(self, bodies: dict[str, Body]) -> None:
        self._bodies = bodies
        self._known: dict[str, frozenset[str]] = {}

    def of(self, key: str) -> frozenset[str]:
        """Give the names of ports of body `key` that reach an event list."""
        if key not in self._known:
            self._known[key] = frozenset()  # a circle of instances cannot be elaborated
            self._known[key] = self._find(self._bodies[key])
        return self._known[key]

    def connections(self, body: Body) -> Iterator[Expression]:
        """Give what a body connects to such ports of its instances."""
        for _, child in body.children:
            names = self.of(body_of(child).hierarchicalPath)
            for connection in child.portConnections if names else ():
                if connection.port.name in names and connection.expression is not None:
                    yield connection.expression

    def _find(self, body: Body) -> frozenset[str]:
        symbols = {name.symbol for signal in event_expressions(body) for name in names_in(signal)}
        symbols |= {name.symbol for expression in self.connections(body) for name in names_in(expression)}
        ports = [p for p in body.symbol.portList if isinstance(p, PortSymbol) and p.internalSymbol is not None]
        return frozenset(port.name for port in ports if port.internalSymbol in symbols)


def event_expressions(body: Body) -> Iterator[Expression]:
    """Give the signals of all edge events in a body."""
    for procedure in body.procedures:
        yield from event_signals(procedure)


def clock_drivers(body: Body, ports: EventPorts, analysis: AnalysisManager) -> dict[Symbol, Expression]:
    """Give every variable that reaches a clock or asynchronous reset of the body, also through assignments.

    Returns:
        The place of use by symbol.
    """
    found: dict[Symbol, Expression] = {}
    waiting = [*event_expressions(body), *ports.connections(body)]
    for expression in waiting:  # grows while it is walked
        for name in names_in(expression):
            symbol = name.symbol
            if symbol in found:
                continue
            found[symbol] = expression
            waiting.extend(_assigned(analysis, name))
    return found


def _assigned(analysis: AnalysisManager, name: ValueExpressionBase) -> Iterator[Expression]:
    for driver in analysis.getDrivers(name.symbol):
        source = driver.containingSymbol
        if isinstance(source, ContinuousAssignSymbol) and isinstance(source.assignment, AssignmentExpression):
            yield source.assignment.right
    initial = net_value(name.symbol)
    if initial is not None:
        yield initial


def data_uses(body: Body, clocks: Iterable[Symbol], locator: Locator) -> dict[Symbol, Span]:
    """Find clocks that are read as data or combined with something in a body.

    A plain alias (`assign a = clk`) is no such use; its other reads are.
    """
    uses: dict[Symbol, Span] = {}
    origin: dict[Symbol, Symbol] = {clock: clock for clock in clocks}
    before = 0
    while len(origin) > before:
        before = len(origin)
        reads = _DataReads(body, origin)
        for name in reads.found():
            uses.setdefault(origin[name.symbol], locator.span(name.sourceRange))
        for alias, clock in reads.aliases.items():
            origin.setdefault(alias, clock)
    return uses


class _DataReads:
    """Walk a body once for reads of clocks that are no events, no writes, no aliases and no plain connections."""

    def __init__(self, body: Body, clocks: dict[Symbol, Symbol]) -> None:
        self._body = body
        self._clocks = clocks
        self._hits: list[ValueExpressionBase] = []
        self._other = {_key(signal) for signal in event_expressions(body)}
        self.aliases: dict[Symbol, Symbol] = {}

    def found(self) -> Iterator[ValueExpressionBase]:
        """Give every such read."""
        self._body.symbol.visit(
            lookup_table={
                ExpressionKind.NamedValue: self._read,
                SymbolKind.Instance: _skip,
                SymbolKind.GenerateBlock: _taken,
            }
        )
        if self._remaining():  # most clocks are only events; only the others are worth a closer look
            self._body.symbol.visit(
                lookup_table={
                    ExpressionKind.Assignment: self._write,
                    SymbolKind.ContinuousAssign: self._assign,
                    SymbolKind.Net: self._net,
                    SymbolKind.Instance: _skip,
                    SymbolKind.GenerateBlock: _taken,
                }
            )
        yield from self._remaining()
        for _, child in self._body.children:
            for connection in child.portConnections:
                yield from self._connected(connection)

    def _remaining(self) -> list[ValueExpressionBase]:
        return [hit for hit in self._hits if _key(hit) not in self._other]

    def _read(self, name: ValueExpressionBase) -> None:
        if name.symbol in self._clocks:
            self._hits.append(name)

    def _write(self, assignment: AssignmentExpression) -> None:
        self._other.update(_key(_root(part)) for part in parts_of(assignment.left))

    def _assign(self, symbol: ContinuousAssignSymbol) -> None:
        assignment = symbol.assignment
        if isinstance(assignment, AssignmentExpression):
            self._alias(_plain(assignment.left), assignment.right)

    def _net(self, net: NetSymbol) -> None:
        initial = net_value(net)
        if initial is not None:
            self._alias(net, initial)

    def _alias(self, left: Symbol | Expression, right: Expression) -> None:
        """Note `left` as another name of a clock when it takes its plain value."""
        source = _plain(right)
        symbol = left.symbol if isinstance(left, NamedValueExpression) else left
        if isinstance(symbol, Symbol) and isinstance(source, NamedValueExpression) and source.symbol in self._clocks:
            self.aliases[symbol] = self._clocks[source.symbol]
            self._other.add(_key(source))

    def _connected(self, connection: PortConnection) -> Iterator[ValueExpressionBase]:
        expression, port = connection.expression, connection.port
        driven = isinstance(port, PortSymbol) and port.direction is ArgumentDirection.Out
        if expression is None or driven or isinstance(_plain(expression), NamedValueExpression):
            return
        yield from (name for name in names_in(expression) if name.symbol in self._clocks)


def _root(expression: Expression) -> Expression:
    """Give the name that a select chain starts from."""
    while isinstance(expression, (ElementSelectExpression, RangeSelectExpression, MemberAccessExpression)):
        expression = expression.value
    return expression


def _taken(branch: GenerateBlockSymbol) -> VisitAction:
    """Leave out branches that are not taken: there is nothing in them."""
    return VisitAction.Skip if branch.isUninstantiated else VisitAction.Advance


def _skip(_: object) -> VisitAction:
    return VisitAction.Skip


def _key(expression: Expression) -> tuple[int, int]:
    start = expression.sourceRange.start
    return start.buffer.id, start.offset


def _plain(expression: Expression) -> Expression:
    while isinstance(expression, ConversionExpression) and expression.isImplicit:
        expression = expression.operand
    return expression
