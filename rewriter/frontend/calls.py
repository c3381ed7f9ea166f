"""Calls: what a function reads besides its arguments, and whether it does anything but return a value."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from dataclasses import dataclass

from pyslang.ast import (
    ArgumentDirection,
    AssignmentExpression,
    BlockStatement,
    CallExpression,
    ConcurrentAssertionStatement,
    EmptyStatement,
    Expression,
    ExpressionKind,
    ExpressionStatement,
    ImmediateAssertionStatement,
    Statement,
    StatementKind,
    StatementList,
    SubroutineSymbol,
    Symbol,
    UnaryExpression,
    UnaryOperator,
    ValueExpressionBase,
)

from rewriter.frontend.names import Names, is_parameter

# IEEE 1800-2017 clause 20: functions of their arguments alone
_PURE_SYSTEM = frozenset(
    (
        "$signed",
        "$unsigned",
        "$clog2",
        "$bits",
        "$countones",
        "$countbits",
        "$onehot",
        "$onehot0",
        "$isunknown",
        "$size",
        "$left",
        "$right",
        "$low",
        "$high",
        "$increment",
        "$dimensions",
        "$unpacked_dimensions",
        "$rtoi",
        "$itor",
        "$bitstoreal",
        "$realtobits",
        "$pow",
        "$ln",
        "$log10",
        "$exp",
        "$sqrt",
        "$floor",
        "$ceil",
    )
)

# IEEE 1800-2017 clause 21: they print, and write no variable
_PRINTING = (
    "$display",
    "$write",
    "$strobe",
    "$monitor",
    "$fdisplay",
    "$fwrite",
    "$fstrobe",
    "$fmonitor",
    "$info",
    "$warning",
    "$error",
)

STEPS = {
    UnaryOperator.Preincrement: "++",
    UnaryOperator.Postincrement: "++",
    UnaryOperator.Predecrement: "--",
    UnaryOperator.Postdecrement: "--",
}


@dataclass(frozen=True)
class CallFacts:
    """Say what a call does: see model.expr.Call."""

    name: str
    hidden_reads: frozenset[str]
    pure: bool
    system: bool


class Calls:
    """Examine the functions that one module body calls, each once."""

    def __init__(self, names: Names) -> None:
        self._names = names
        self._known: dict[SubroutineSymbol, CallFacts] = {}

    def facts(self, call: CallExpression) -> CallFacts:
        """Say what a call does."""
        subroutine = call.subroutine
        if isinstance(subroutine, SubroutineSymbol):
            if subroutine not in self._known:
                self._known[subroutine] = self._examine(subroutine, frozenset((subroutine,)))
            return self._known[subroutine]
        name = call.subroutineName
        return CallFacts(name, frozenset(), name in _PURE_SYSTEM, system=True)

    def does_nothing(self, call: CallExpression) -> bool:
        """Say whether a call is one of a task without arguments and statements."""
        subroutine = call.subroutine
        if not isinstance(subroutine, SubroutineSymbol) or len(call.arguments):
            return False
        body = subroutine.body
        while isinstance(body, BlockStatement):
            body = body.body
        return isinstance(body, EmptyStatement) or (isinstance(body, StatementList) and not len(body.list))

    def _examine(self, subroutine: SubroutineSymbol, seen: frozenset[SubroutineSymbol]) -> CallFacts:
        body = subroutine.body
        reads: list[ValueExpressionBase] = []
        writes: list[Expression] = []
        calls: list[CallExpression] = []
        other: list[object] = []

        def assign(expression: AssignmentExpression) -> None:
            writes.append(expression.left)

        def step(expression: UnaryExpression) -> None:
            if expression.op in STEPS:
                writes.append(expression.operand)

        table: dict[object, object] = {
            ExpressionKind.NamedValue: reads.append,
            ExpressionKind.HierarchicalValue: reads.append,
            ExpressionKind.Assignment: assign,
            ExpressionKind.UnaryOp: step,
            ExpressionKind.Call: calls.append,
            StatementKind.Timed: other.append,
            StatementKind.Wait: other.append,
            StatementKind.ProceduralAssign: other.append,
            StatementKind.EventTrigger: other.append,
        }
        body.visit(lookup_table=table)
        pure = not other and all(argument.direction is ArgumentDirection.In for argument in subroutine.arguments)
        hidden = {self._names.path(read.symbol) for read in reads if _is_hidden(read.symbol, subroutine)}
        for write in writes:
            root = write.getSymbolReference(allowPacked=True)
            pure = pure and root is not None and not _is_hidden(root, subroutine)
        for call in calls:
            callee = call.subroutine
            if isinstance(callee, SubroutineSymbol) and callee in seen:
                continue
            inner = self._examine(callee, seen | {callee}) if isinstance(callee, SubroutineSymbol) else self.facts(call)
            hidden |= inner.hidden_reads
            pure = pure and inner.pure
        return CallFacts(self._names.path(subroutine), frozenset(hidden), pure, system=False)


def _is_hidden(symbol: Symbol, subroutine: SubroutineSymbol) -> bool:
    """Say whether a symbol is neither fixed nor declared inside a subroutine."""
    return not is_parameter(symbol) and not symbol.hierarchicalPath.startswith(f"{subroutine.hierarchicalPath}.")


def describe(statement: Statement) -> tuple[str, bool]:
    """Name a statement for a message, and say whether it is known to write nothing."""
    if isinstance(statement, ExpressionStatement) and isinstance(statement.expr, CallExpression):
        name = statement.expr.subroutineName
        return f"call of {name}", name.startswith(_PRINTING)
    if isinstance(statement, (ImmediateAssertionStatement, ConcurrentAssertionStatement)):
        return "assertion", True
    return f"{statement.kind.name} statement", False
