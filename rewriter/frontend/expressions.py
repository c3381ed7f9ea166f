"""Expressions: slang's bound tree as the model's, each node with its text, key, self-determined size and value."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Callable
from typing import Any

from pyslang.ast import (
    BinaryExpression,
    BinaryOperator,
    CallExpression,
    ConcatenationExpression,
    ConditionalExpression,
    ConversionExpression,
    ElementSelectExpression,
    EvalContext,
    Expression,
    ExpressionKind,
    HierarchicalValueExpression,
    InsideExpression,
    InstanceBodySymbol,
    IntegerLiteral,
    MemberAccessExpression,
    NamedValueExpression,
    RangeSelectExpression,
    RangeSelectionKind,
    ReplicationExpression,
    SimpleAssignmentPatternExpression,
    Statement,
    Symbol,
    Type,
    UnaryExpression,
    UnaryOperator,
    UnbasedUnsizedIntegerLiteral,
    ValueExpressionBase,
    ValueRangeExpression,
)

from rewriter.frontend.bits import extent, integer
from rewriter.frontend.calls import Calls
from rewriter.frontend.names import Names, is_local, is_parameter
from rewriter.frontend.places import Locator
from rewriter.model.expr import Call, Concatenation, Conditional, Constant, Expr, Opaque, Operation, Reference, Select
from rewriter.model.source import Span

_UNARY = {
    UnaryOperator.Plus: "+",
    UnaryOperator.Minus: "-",
    UnaryOperator.BitwiseNot: "~",
    UnaryOperator.BitwiseAnd: "&",
    UnaryOperator.BitwiseOr: "|",
    UnaryOperator.BitwiseXor: "^",
    UnaryOperator.BitwiseNand: "~&",
    UnaryOperator.BitwiseNor: "~|",
    UnaryOperator.BitwiseXnor: "~^",
    UnaryOperator.LogicalNot: "!",
}
_WIDE_UNARY = {"+", "-", "~"}
_BINARY = {
    BinaryOperator.Add: "+",
    BinaryOperator.Subtract: "-",
    BinaryOperator.Multiply: "*",
    BinaryOperator.Divide: "/",
    BinaryOperator.Mod: "%",
    BinaryOperator.BinaryAnd: "&",
    BinaryOperator.BinaryOr: "|",
    BinaryOperator.BinaryXor: "^",
    BinaryOperator.BinaryXnor: "~^",
    BinaryOperator.Equality: "==",
    BinaryOperator.Inequality: "!=",
    BinaryOperator.CaseEquality: "===",
    BinaryOperator.CaseInequality: "!==",
    BinaryOperator.GreaterThanEqual: ">=",
    BinaryOperator.GreaterThan: ">",
    BinaryOperator.LessThanEqual: "<=",
    BinaryOperator.LessThan: "<",
    BinaryOperator.WildcardEquality: "==?",
    BinaryOperator.WildcardInequality: "!=?",
    BinaryOperator.LogicalAnd: "&&",
    BinaryOperator.LogicalOr: "||",
    BinaryOperator.LogicalImplication: "->",
    BinaryOperator.LogicalEquivalence: "<->",
    BinaryOperator.LogicalShiftLeft: "<<",
    BinaryOperator.LogicalShiftRight: ">>",
    BinaryOperator.ArithmeticShiftLeft: "<<<",
    BinaryOperator.ArithmeticShiftRight: ">>>",
    BinaryOperator.Power: "**",
}
_OF_BOTH = {"+", "-", "*", "/", "%", "&", "|", "^", "~^"}  # as wide as the wider operand
_OF_LEFT = {"<<", ">>", "<<<", ">>>", "**"}
_RANGES = {RangeSelectionKind.Simple: ":", RangeSelectionKind.IndexedUp: "+:", RangeSelectionKind.IndexedDown: "-:"}


class Expressions:
    """Lower the expressions of one module body."""

    def __init__(self, body: InstanceBodySymbol, names: Names, locator: Locator, texts: dict[str, bytes]) -> None:
        self.names = names
        self._locator = locator
        self._texts = texts
        self._context = EvalContext(body)
        self.calls = Calls(names)
        self._by_kind: dict[type[Expression], Callable[[Any], Expr]] = {
            NamedValueExpression: self._reference,
            HierarchicalValueExpression: self._reference,
            IntegerLiteral: self._literal,
            UnbasedUnsizedIntegerLiteral: self._literal,
            UnaryExpression: self._unary,
            BinaryExpression: self._binary,
            ConditionalExpression: self._conditional,
            ConversionExpression: self._conversion,
            ConcatenationExpression: self._concatenation,
            ReplicationExpression: self._replication,
            ElementSelectExpression: self._element,
            RangeSelectExpression: self._range,
            MemberAccessExpression: self._member,
            InsideExpression: self._inside,
            ValueRangeExpression: self._value_range,
            SimpleAssignmentPatternExpression: self._pattern,
            CallExpression: self._call,
        }

    def lower(self, expression: Expression) -> Expr:
        """Lower one expression with everything below it."""
        return self._by_kind.get(type(expression), self._opaque)(expression)

    def value(self, expression: Expression) -> int | None:
        """Give the value of an expression that is fixed in this body, None otherwise."""
        folded = expression.constant
        if folded is not None and (found := integer(folded.value)) is not None:
            return found
        return self.lower(expression).constant

    def _evaluate(self, expression: Expression) -> int | None:
        return integer(expression.eval(self._context).value)

    def _text(self, span: Span) -> str:
        return "".join(self._texts[span.file][span.start : span.end].decode("utf-8", "replace").split())

    def _reference(self, expression: ValueExpressionBase) -> Expr:
        symbol = expression.symbol
        span, copyable = self._locator.placed(expression.sourceRange)
        fixed = is_parameter(symbol)
        outside = not fixed and (self.names.is_outside(symbol) or isinstance(expression, HierarchicalValueExpression))
        kind = expression.type
        path = self.names.path(symbol)
        return Reference(
            span,
            path,
            _width(kind),
            kind.isSigned,
            self._evaluate(expression) if fixed else None,
            copyable,
            name=self._text(span) if outside else path,
            is_parameter=fixed,
            is_local=is_local(symbol),
            is_hierarchical=outside,
        )

    def _literal(self, expression: IntegerLiteral | UnbasedUnsizedIntegerLiteral) -> Expr:
        span, copyable = self._locator.placed(expression.sourceRange)
        kind = expression.type
        value = expression.value
        filling = isinstance(expression, UnbasedUnsizedIntegerLiteral)
        key = self._text(span) if copyable else str(value)
        unknown = bool(value.hasUnknown)
        number = None if unknown else int(value)
        if filling:  # '1 is one bit by itself and takes the width of its context
            number = None if number is None else min(number, 1)
        return Constant(
            span, key, 1 if filling else kind.bitWidth, kind.isSigned and not filling, number, copyable, has_x=unknown
        )

    def _unary(self, expression: UnaryExpression) -> Expr:
        operator = _UNARY.get(expression.op)
        if operator is None:
            return self._opaque(expression)  # ++ and -- inside an expression write
        operand = self.lower(expression.operand)
        wide = operator in _WIDE_UNARY
        return self._operation(
            expression,
            operator,
            (operand,),
            f"{operator}{operand.key}",
            operand.width if wide else 1,
            signed=wide and operand.signed,
        )

    def _binary(self, expression: BinaryExpression) -> Expr:
        operator = _BINARY[expression.op]
        left, right = self.lower(expression.left), self.lower(expression.right)
        width, signed = 1, False
        if operator in _OF_BOTH:
            width, signed = max(left.width, right.width), left.signed and right.signed
        elif operator in _OF_LEFT:
            width, signed = left.width, left.signed
        known = _short_circuit(operator, left.constant, right.constant)
        return self._operation(
            expression, operator, (left, right), f"({left.key}{operator}{right.key})", width, signed=signed, known=known
        )

    def _operation(  # noqa: PLR0913 (the fields of the node)
        self,
        expression: Expression,
        operator: str,
        operands: tuple[Expr, ...],
        key: str,
        width: int,
        *,
        signed: bool = False,
        known: int | None = None,
    ) -> Expr:
        span, copyable = self._locator.placed(expression.sourceRange)
        if known is None and all(operand.constant is not None for operand in operands):
            known = self._evaluate(expression)
        return Operation(
            span,
            key,
            width if expression.type.isIntegral else 0,
            signed,
            known,
            copyable,
            operator=operator,
            operands=operands,
        )

    def _conversion(self, expression: ConversionExpression) -> Expr:
        if expression.isImplicit:
            return self.lower(expression.operand)
        operand = self.lower(expression.operand)
        kind = expression.type
        return self._operation(
            expression, "cast", (operand,), f"{kind}'({operand.key})", _width(kind), signed=kind.isSigned
        )

    def _conditional(self, expression: ConditionalExpression) -> Expr:
        conditions = expression.conditions
        if len(conditions) != 1 or conditions[0].pattern is not None:
            return self._opaque(expression)
        condition = self.lower(conditions[0].expr)
        then, other = self.lower(expression.left), self.lower(expression.right)
        span, copyable = self._locator.placed(expression.sourceRange)
        value = None
        if condition.constant is not None:
            value = then.constant if condition.constant else other.constant
        return Conditional(
            span,
            f"({condition.key}?{then.key}:{other.key})",
            max(then.width, other.width) if expression.type.isIntegral else 0,
            then.signed and other.signed,
            value,
            copyable,
            condition=condition,
            then=then,
            other=other,
        )

    def _concatenation(
        self, expression: ConcatenationExpression, count: int = 1, prefix: str = "", whole: Expression | None = None
    ) -> Expr:
        parts = tuple(self.lower(part) for part in expression.operands)
        outer = whole or expression
        span, copyable = self._locator.placed(outer.sourceRange)
        key = f"{{{prefix}{','.join(part.key for part in parts)}}}"
        known = all(part.constant is not None for part in parts) and count > 0
        value = self._evaluate(outer) if known else None
        return Concatenation(span, key, outer.type.bitWidth, False, value, copyable, parts=parts, count=count)  # noqa: FBT003

    def _replication(self, expression: ReplicationExpression) -> Expr:
        count = self.lower(expression.count)
        inner = expression.concat
        if count.constant is None or not isinstance(inner, ConcatenationExpression):
            return self._opaque(expression)
        return self._concatenation(inner, count.constant, f"{count.key}*", expression)

    def _element(self, expression: ElementSelectExpression) -> Expr:
        index = self.lower(expression.selector)
        return self._select(expression, (index,), f"[{index.key}]")

    def _range(self, expression: RangeSelectExpression) -> Expr:
        left, right = self.lower(expression.left), self.lower(expression.right)
        return self._select(expression, (left, right), f"[{left.key}{_RANGES[expression.selectionKind]}{right.key}]")

    def _member(self, expression: MemberAccessExpression) -> Expr:
        return self._select(expression, (), f".{expression.member.name}")

    def _select(
        self,
        expression: ElementSelectExpression | RangeSelectExpression | MemberAccessExpression,
        indices: tuple[Expr, ...],
        suffix: str,
    ) -> Expr:
        value = self.lower(expression.value)
        span, copyable = self._locator.placed(expression.sourceRange)
        kind = expression.type
        place = extent(expression, self.value)
        bits = place.bits if place is not None and place.exact else None
        root_fixed = all(not isinstance(node, Reference) or node.is_parameter for node in value.walk())
        fixed = root_fixed and all(index.constant is not None for index in indices)
        return Select(
            span,
            f"{value.key}{suffix}",
            _width(kind),
            kind.isSigned,
            self._evaluate(expression) if fixed else None,
            copyable,
            value=value,
            indices=indices,
            bits=bits,
        )

    def _inside(self, expression: InsideExpression) -> Expr:
        operands = (self.lower(expression.left), *(self.lower(item) for item in expression.rangeList))
        key = f"({operands[0].key} inside{{{','.join(item.key for item in operands[1:])}}})"
        return self._operation(expression, "inside", operands, key, 1)

    def _value_range(self, expression: ValueRangeExpression) -> Expr:
        left, right = self.lower(expression.left), self.lower(expression.right)
        span, copyable = self._locator.placed(expression.sourceRange)
        return Operation(
            span,
            f"[{left.key}:{right.key}]",
            width=0,
            signed=False,
            constant=None,
            copyable=copyable,
            operator="[:]",
            operands=(left, right),
        )

    def _pattern(self, expression: SimpleAssignmentPatternExpression) -> Expr:
        operands = tuple(self.lower(element) for element in expression.elements)
        key = f"{expression.type}'{{{','.join(operand.key for operand in operands)}}}"
        return self._operation(expression, "'{}", operands, key, expression.type.bitWidth)

    def _call(self, expression: CallExpression) -> Expr:
        facts = self.calls.facts(expression)
        if facts is None:
            return self._opaque(expression)
        arguments = tuple(self.lower(argument) for argument in expression.arguments)
        span, copyable = self._locator.placed(expression.sourceRange)
        kind = expression.type
        fixed = facts.pure and not facts.hidden_reads and all(a.constant is not None for a in arguments)
        return Call(
            span,
            f"{facts.name}({','.join(argument.key for argument in arguments)})",
            _width(kind),
            kind.isSigned,
            self._evaluate(expression) if fixed else None,
            copyable,
            function=facts.name,
            arguments=arguments,
            hidden_reads=facts.hidden_reads,
            pure=facts.pure,
            system=facts.system,
        )

    def _opaque(self, expression: Expression) -> Expr:
        span, copyable = self._locator.placed(expression.sourceRange)
        kind = expression.type
        reads = tuple(self._reference(name) for name in names_in(expression))
        return Opaque(
            span,
            f"opaque@{span.file}:{span.start}-{span.end}",
            _width(kind),
            kind.isSigned,
            None,
            copyable,
            kind=expression.kind.name,
            operands=reads,
        )


def names_in(part: Expression | Statement | Symbol) -> list[ValueExpressionBase]:
    """Give every name that an expression, statement or block uses, in source order."""
    found: list[ValueExpressionBase] = []
    part.visit(lookup_table={ExpressionKind.NamedValue: found.append, ExpressionKind.HierarchicalValue: found.append})
    return found


def _width(kind: Type) -> int:
    return kind.bitWidth if kind.isIntegral else 0


def _short_circuit(operator: str, left: int | None, right: int | None) -> int | None:
    """Give a value that one operand decides alone, whatever the other is."""
    if operator == "&&" and 0 in (left, right):
        return 0
    if operator == "||" and (left or right):
        return 1
    return None
