"""Statements: a clocked block's body as the model's tree, with the text of every part."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Callable
from typing import Any

import pyslang
from pyslang.ast import (
    AssignmentExpression,
    BlockStatement,
    CallExpression,
    CaseStatement,
    CaseStatementCondition,
    ConditionalStatement,
    DelayControl,
    EmptyStatement,
    Expression,
    ExpressionKind,
    ExpressionStatement,
    ForeachLoopStatement,
    ForLoopStatement,
    RepeatLoopStatement,
    StatementBlockKind,
    StatementList,
    UnaryExpression,
    VariableDeclStatement,
)
from pyslang.ast import Statement as Bound
from pyslang.parsing import Token
from pyslang.syntax import (
    AttributeInstanceSyntax,
    BlockStatementSyntax,
    CaseStatementSyntax,
    ConditionalStatementSyntax,
    DefaultCaseItemSyntax,
    ForeachLoopStatementSyntax,
    ForLoopStatementSyntax,
    StatementSyntax,
    SyntaxNode,
)

from rewriter.frontend.calls import STEPS, describe
from rewriter.frontend.expressions import Expressions, names_in
from rewriter.frontend.places import Locator
from rewriter.frontend.targets import targets_of
from rewriter.model.design import Trap
from rewriter.model.expr import Expr, Operation
from rewriter.model.source import Span
from rewriter.model.statement import (
    Assign,
    Block,
    Case,
    CaseItem,
    Empty,
    If,
    LocalDeclaration,
    Loop,
    Opaque,
    Statement,
    Target,
)


class Statements:
    """Lower the statements of one block; traps met on the way are collected in `traps`."""

    def __init__(self, expressions: Expressions, locator: Locator) -> None:
        self._expressions = expressions
        self._locator = locator
        self._loops: frozenset[str] = frozenset()
        self.traps: list[Trap] = []
        self._by_kind: dict[type[Bound], Callable[[Any], Statement]] = {
            BlockStatement: self._block,
            StatementList: self._list,
            ConditionalStatement: self._if,
            CaseStatement: self._case,
            ForLoopStatement: self._for,
            ForeachLoopStatement: self._foreach,
            RepeatLoopStatement: self._repeat,
            ExpressionStatement: self._expression,
            EmptyStatement: self._empty,
        }

    def lower(self, statement: Bound) -> Statement:
        """Lower one statement with everything below it."""
        return self._by_kind.get(type(statement), self._opaque)(statement)

    def trap(self, reason: str, span: Span, detail: str = "") -> None:
        """Record why the block must not be touched, once for each reason."""
        if all(trap.reason != reason for trap in self.traps):
            self.traps.append(Trap(reason, span, detail))

    def whole(self, source: pyslang.SourceRange) -> Span:
        """Give the span of a statement; one that begins or ends inside a macro traps the block."""
        plain = self._locator.plain(source)
        if plain is not None:
            return plain
        span = self._locator.span(source)
        macro = self._locator.macro_at(source.start) or self._locator.macro_at(source.end)
        self.trap("inside-macro", span, macro or "")
        return span

    def _span(self, statement: Bound) -> Span:
        syntax = statement.syntax
        return self.whole(statement.sourceRange if syntax is None else syntax.sourceRange)

    def _between(self, first: Token, last: Token) -> Span:
        return self.whole(pyslang.SourceRange(first.range.start, last.range.end))

    def _empty(self, statement: EmptyStatement | ExpressionStatement) -> Statement:
        """Lower a statement that does nothing; it may come from a macro, for its text is never changed."""
        syntax = statement.syntax
        return Empty(self._locator.span(statement.sourceRange if syntax is None else syntax.sourceRange))

    def _list(self, statement: StatementList) -> Statement:
        """Lower a list that stands where slang made a scope of its own; several declarations come with it."""
        parts = [self.lower(part) for part in statement.list if not isinstance(part, VariableDeclStatement)]
        if len(parts) == 1:
            return parts[0]
        return self._opaque(statement)

    def _block(self, statement: BlockStatement) -> Statement:
        syntax = statement.syntax
        if not isinstance(syntax, BlockStatementSyntax):  # the scope of a loop that declares its variable
            return self.lower(statement.body)
        if statement.blockKind is not StatementBlockKind.Sequential:
            return self._opaque(statement)
        span = self._span(statement)
        inner = statement.body
        parts = tuple(inner.list) if isinstance(inner, StatementList) else (inner,)
        declared = [part for part in parts if isinstance(part, VariableDeclStatement)]
        body = tuple(self.lower(part) for part in parts if not isinstance(part, VariableDeclStatement))
        name, end_name = syntax.blockName, syntax.endBlockName
        begin = self._up_to(syntax.begin, name)
        if syntax.label is not None:
            begin = Span(span.file, self._locator.span(syntax.label.sourceRange).start, begin.end)
        label = name.name.valueText if name else syntax.label.name.valueText if syntax.label is not None else ""
        if isinstance(inner, EmptyStatement) and not len(syntax.items):
            body = ()
        return Block(span, begin, self._up_to(syntax.end, end_name), label, self._declarations(declared), body)

    def _up_to(self, keyword: Token, name: SyntaxNode | None) -> Span:
        """Give the span of `begin` or `end` with the name that follows it."""
        end = keyword.range.end if name is None else name.sourceRange.end
        return self.whole(pyslang.SourceRange(keyword.range.start, end))

    def _declarations(self, declared: list[VariableDeclStatement]) -> tuple[LocalDeclaration, ...]:
        """Group declared variables by the declaration they stand in (`int a, b;`)."""
        groups: dict[Span, list[VariableDeclStatement]] = {}
        for statement in declared:
            declarator = statement.symbol.syntax
            declaration = declarator.parent if declarator is not None else None
            source = statement.sourceRange if declaration is None else declaration.sourceRange
            groups.setdefault(self.whole(source), []).append(statement)
        names = self._expressions.names
        return tuple(
            LocalDeclaration(
                span, tuple(names.path(s.symbol) for s in group), any(s.symbol.initializer is not None for s in group)
            )
            for span, group in groups.items()
        )

    def _if(self, statement: ConditionalStatement) -> Statement:
        syntax = statement.syntax
        conditions = statement.conditions
        matching = len(conditions) != 1 or conditions[0].pattern is not None
        if matching or not isinstance(syntax, ConditionalStatementSyntax):
            return self._opaque(statement)
        span = self._span(statement)
        condition = self._expressions.lower(conditions[0].expr)
        qualifier = syntax.uniqueOrPriority
        head = self._between(qualifier or syntax.ifKeyword, syntax.closeParen)
        other = self.lower(statement.ifFalse) if statement.ifFalse is not None else None
        clause = syntax.elseClause
        else_keyword = self.whole(clause.elseKeyword.range) if clause is not None else None
        return If(
            span,
            head,
            condition,
            self.lower(statement.ifTrue),
            other,
            else_keyword,
            _text(qualifier),
            self._attributes(syntax)[0],
        )

    def _attributes(self, syntax: StatementSyntax) -> tuple[Span | None, tuple[str, ...]]:
        attributes = [node for node in syntax.attributes if isinstance(node, AttributeInstanceSyntax)]
        if not attributes:
            return None, ()
        first, last = attributes[0], attributes[-1]
        span = self._locator.span(pyslang.SourceRange(first.sourceRange.start, last.sourceRange.end))
        return span, attribute_names(attributes)

    def _case(self, statement: CaseStatement) -> Statement:
        syntax = statement.syntax
        if not isinstance(syntax, CaseStatementSyntax):
            return self._opaque(statement)
        span = self._span(statement)
        qualifier, inside = syntax.uniqueOrPriority, statement.condition is CaseStatementCondition.Inside
        head = self._between(qualifier or syntax.caseKeyword, syntax.matchesOrInside if inside else syntax.closeParen)
        attributes, names = self._attributes(syntax)
        return Case(
            span,
            head,
            syntax.caseKeyword.rawText,
            inside,
            self._expressions.lower(statement.expr),
            self._items(statement, syntax),
            self.whole(syntax.endcase.range),
            _text(qualifier),
            attributes,
            names,
        )

    def _items(self, statement: CaseStatement, syntax: CaseStatementSyntax) -> tuple[CaseItem, ...]:
        groups = iter(statement.items)
        items: list[CaseItem] = []
        for item in syntax.items:
            if not isinstance(item, SyntaxNode):
                continue
            span = self.whole(item.sourceRange)
            default = isinstance(item, DefaultCaseItemSyntax)
            first = item.getFirstToken()
            if default:
                labels: tuple[Expr, ...] = ()
                body = statement.defaultCase
                head = self._between(first, item.colon or first)
            else:
                group = next(groups)
                labels = tuple(self._expressions.lower(label) for label in group.expressions)
                body = group.stmt
                head = self._between(first, item.colon)  # pyright: ignore[reportAttributeAccessIssue]
            items.append(CaseItem(span, head, labels, self.lower(body)))
        return tuple(items)

    def _for(self, statement: ForLoopStatement) -> Statement:
        syntax = statement.syntax
        if not isinstance(syntax, ForLoopStatementSyntax):
            return self._opaque(statement)
        inner = tuple(self._expressions.names.path(symbol) for symbol in statement.loopVars)
        writes = [e for e in statement.initializers if isinstance(e, AssignmentExpression)]
        outer: list[str] = []
        for write in writes:
            symbol = write.left.getSymbolReference(allowPacked=False)
            if symbol is None:
                return self._opaque(statement)
            outer.append(self._expressions.names.path(symbol))
        starts = [*(write.right for write in writes), *(s.initializer for s in statement.loopVars)]
        variables = frozenset((*inner, *outer))
        tests = [e for e in (statement.stopExpr, *statement.steps) if e is not None]
        head_reads = self._reads(starts) | (self._reads(tests) - variables)
        if head_reads or not variables or not tests:
            return self._opaque(statement)
        head = self._between(syntax.forKeyword, syntax.closeParen)
        return self._loop(statement, head, "for", inner, tuple(dict.fromkeys(outer)))

    def _foreach(self, statement: ForeachLoopStatement) -> Statement:
        syntax = statement.syntax
        if not isinstance(syntax, ForeachLoopStatementSyntax):
            return self._opaque(statement)
        variables = tuple(self._expressions.names.path(d.loopVar) for d in statement.loopDims if d.loopVar is not None)
        head = self._between(syntax.keyword, syntax.loopList.closeParen)
        return self._loop(statement, head, "foreach", variables, ())

    def _repeat(self, statement: RepeatLoopStatement) -> Statement:
        syntax = statement.syntax
        if self._reads([statement.count]) or syntax is None:
            return self._opaque(statement)
        head = self._between(syntax.repeatOrWhile, syntax.closeParen)  # pyright: ignore[reportAttributeAccessIssue]
        return self._loop(statement, head, "repeat", (), ())

    def _loop(
        self,
        statement: ForLoopStatement | ForeachLoopStatement | RepeatLoopStatement,
        head: Span,
        keyword: str,
        inner: tuple[str, ...],
        outer: tuple[str, ...],
    ) -> Statement:
        span = self._span(statement)
        enclosing = self._loops
        self._loops = enclosing | frozenset((*inner, *outer))
        body = self.lower(statement.body)
        self._loops = enclosing
        written = {target.variable for part in body.walk() if isinstance(part, Assign) for target in part.targets}
        if written & {*inner, *outer}:  # the bounds are then not known
            return self._opaque(statement)
        return Loop(span, head, keyword, inner, outer, frozenset(), body)

    def _reads(self, expressions: list[Expression]) -> frozenset[str]:
        return frozenset(name for part in expressions for name in self._expressions.lower(part).reads())

    def _expression(self, statement: ExpressionStatement) -> Statement:
        expression = statement.expr
        if isinstance(expression, AssignmentExpression):
            return self._assign(statement, expression)
        if isinstance(expression, UnaryExpression) and expression.op in STEPS:
            return self._step(statement, expression)
        if isinstance(expression, CallExpression) and self._expressions.calls.does_nothing(expression):
            return self._empty(statement)
        return self._opaque(statement)

    def _assign(self, statement: ExpressionStatement, expression: AssignmentExpression) -> Statement:
        targets = targets_of(expression.left, self._expressions, self._locator, self._loops)
        if targets is None:
            return self._opaque(statement)
        span = self._span(statement)
        self.whole(expression.left.sourceRange)
        timing = expression.timingControl
        delay = None
        if timing is not None:
            delay = self._locator.span(timing.sourceRange)
            if not expression.isNonBlocking or not isinstance(timing, DelayControl):
                self.trap("timing-control", delay)
                return self._opaque(statement)
        rhs = self._compound(expression) if expression.isCompound else self._expressions.lower(expression.right)
        return Assign(span, targets, rhs, not expression.isNonBlocking, delay)

    def _compound(self, expression: AssignmentExpression) -> Expr:
        """Lower `x += y`: slang keeps a stand-in for x inside the right side."""
        left = self._expressions.lower(expression.left)
        right = self._expressions.lower(expression.right)
        return Operation(
            self._locator.span(expression.sourceRange),
            f"({left.key}:={right.key})",
            left.width,
            left.signed,
            None,
            copyable=False,
            operator="compound",
            operands=(left, right),
        )

    def _step(self, statement: ExpressionStatement, expression: UnaryExpression) -> Statement:
        targets = targets_of(expression.operand, self._expressions, self._locator, self._loops)
        if targets is None:
            return self._opaque(statement)
        operand = self._expressions.lower(expression.operand)
        operator = STEPS[expression.op]
        rhs = Operation(
            self._locator.span(expression.sourceRange),
            f"({operand.key}{operator})",
            operand.width,
            operand.signed,
            None,
            copyable=False,
            operator=operator,
            operands=(operand,),
        )
        return Assign(self._span(statement), targets, rhs, blocking=True)

    def _opaque(self, statement: Bound) -> Statement:
        span = self._span(statement)
        what, harmless = describe(statement)
        if statement.kind.name in ("Timed", "Wait", "WaitFork", "WaitOrder"):
            self.trap("timing-control", span)
        names = self._expressions.names
        reads = frozenset(names.path(name.symbol) for name in names_in(statement))
        return Opaque(span, what, harmless, reads, self._written(statement))

    def _written(self, statement: Bound) -> tuple[Target, ...]:
        writes: list[AssignmentExpression] = []
        statement.visit(lookup_table={ExpressionKind.Assignment: writes.append})
        found: list[Target] = []
        for write in writes:
            found += targets_of(write.left, self._expressions, self._locator, self._loops) or ()
        return tuple(found)


def _text(token: Token | None) -> str:
    return token.rawText if token else ""


def attribute_names(attributes: list[AttributeInstanceSyntax]) -> tuple[str, ...]:
    """Give the names in `(* *)`."""
    specs = (spec for instance in attributes for spec in instance.specs if isinstance(spec, SyntaxNode))
    return tuple(spec.getFirstToken().valueText for spec in specs)
