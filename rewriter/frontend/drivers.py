"""Drivers: what drives a variable; combinational logic is lowered only when somebody asks."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from pyslang.analysis import AnalysisManager, DriverFlags, DriverKind, DriverSource, ValueDriver
from pyslang.ast import (
    AssignmentExpression,
    ContinuousAssignSymbol,
    Expression,
    NetSymbol,
    ProceduralBlockSymbol,
    Symbol,
    TimedStatement,
    ValueSymbol,
)

from rewriter.frontend.bits import slang_bits, width_of
from rewriter.frontend.blocks import is_clocked
from rewriter.frontend.expressions import Expressions
from rewriter.frontend.places import Locator
from rewriter.frontend.statements import Statements
from rewriter.model.design import Driver, Writer, WriterKind
from rewriter.model.expr import Expr
from rewriter.model.source import Span
from rewriter.model.statement import Statement

_PROCEDURES = {
    DriverSource.Initial: WriterKind.INITIAL,
    DriverSource.Final: WriterKind.INITIAL,
    DriverSource.AlwaysComb: WriterKind.COMBINATIONAL,
    DriverSource.AlwaysLatch: WriterKind.LATCH,
    DriverSource.AlwaysFF: WriterKind.CLOCKED,
}


def kind_of(driver: ValueDriver) -> WriterKind | None:
    """Name the kind of a driver; None for an input port and for the initial value of a declaration."""
    source = driver.containingSymbol
    if driver.isInputPort:
        return None
    if driver.flags & DriverFlags.Initializer:
        return None
    if driver.flags & DriverFlags.OutputPort:
        return WriterKind.INSTANCE
    if isinstance(source, ProceduralBlockSymbol) and driver.source is DriverSource.Always:
        return WriterKind.CLOCKED if is_clocked(source) else WriterKind.COMBINATIONAL
    if driver.kind is DriverKind.Continuous:
        return WriterKind.CONTINUOUS if isinstance(source, ContinuousAssignSymbol) else WriterKind.INSTANCE
    return _PROCEDURES.get(driver.source, WriterKind.COMBINATIONAL)


def net_value(symbol: Symbol) -> Expression | None:
    """Give the expression of `wire w = …`, a continuous assignment that slang does not count as a driver."""
    return symbol.initializer if isinstance(symbol, NetSymbol) else None


def _whole(symbol: ValueSymbol) -> tuple[int, int]:
    return max(width_of(symbol.type) - 1, 0), 0


def writers_of(symbol: ValueSymbol, analysis: AnalysisManager, locator: Locator) -> tuple[Writer, ...]:
    """Give everything that writes a variable, clocked blocks included."""
    found: list[Writer] = []
    for driver in analysis.getDrivers(symbol):
        kind = kind_of(driver)
        if kind is None:
            continue
        source = driver.containingSymbol
        syntax = source.syntax
        block = isinstance(source, (ProceduralBlockSymbol, ContinuousAssignSymbol)) and syntax is not None
        place = syntax.sourceRange if block and syntax is not None else driver.sourceRange
        found.append(Writer(kind, slang_bits(driver.bounds, symbol.type), locator.span(place)))
    initial = net_value(symbol)
    if initial is not None:
        found.append(Writer(WriterKind.CONTINUOUS, _whole(symbol), locator.span(initial.sourceRange)))
    return tuple(dict.fromkeys(found))


class LazyDrivers:
    """Implement `Drivers`; it keeps the elaboration alive through what it holds."""

    def __init__(self, owner: object, analysis: AnalysisManager, locator: Locator) -> None:
        self._bodies: dict[str, Expressions] = {}
        self._known: dict[tuple[str, str], tuple[Driver, ...]] = {}
        self._locator = locator
        self._analysis = analysis
        self._owner = owner  # last, for attributes are dropped in order

    def add(self, body: str, expressions: Expressions) -> None:
        """Make a body known."""
        self._bodies[body] = expressions

    def expressions(self, body: str) -> Expressions:
        """Give what lowers expressions of a body."""
        return self._bodies[body]

    def drivers_of(self, body: str, variable: str) -> tuple[Driver, ...]:
        """Give what drives a variable of a module body; empty for inputs and undriven ones."""
        key = (body, variable)
        if key not in self._known:
            self._known[key] = self._find(body, variable)
        return self._known[key]

    def _find(self, body: str, variable: str) -> tuple[Driver, ...]:
        expressions = self._bodies[body]
        symbol = expressions.names.symbol(variable)
        if not isinstance(symbol, ValueSymbol):
            return ()
        found: list[Driver] = []
        for driver in self._analysis.getDrivers(symbol):
            kind = kind_of(driver)
            if kind is not None:
                span, value = self._value(driver, kind, expressions)
                found.append(Driver(kind, slang_bits(driver.bounds, symbol.type), span, value))
        initial = net_value(symbol)
        if initial is not None:
            span = self._locator.span(initial.sourceRange)
            found.append(Driver(WriterKind.CONTINUOUS, _whole(symbol), span, expressions.lower(initial)))
        return tuple(dict.fromkeys(found))

    def _value(
        self, driver: ValueDriver, kind: WriterKind, expressions: Expressions
    ) -> tuple[Span, Expr | Statement | None]:
        source = driver.containingSymbol
        span = self._locator.span(driver.sourceRange)
        if kind is WriterKind.CONTINUOUS:
            assignment = source.assignment if isinstance(source, ContinuousAssignSymbol) else None
            if isinstance(assignment, AssignmentExpression):
                return self._locator.span(assignment.sourceRange), expressions.lower(assignment.right)
            return span, None
        if isinstance(source, ProceduralBlockSymbol) and kind in (WriterKind.COMBINATIONAL, WriterKind.LATCH):
            body = source.body
            inner = body.stmt if isinstance(body, TimedStatement) else body
            return span, Statements(expressions, self._locator).lower(inner)
        return span, None
