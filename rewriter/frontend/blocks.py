"""Clocked blocks: one `always` with an edge event, taken apart."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

import re
from collections.abc import Iterator

from pyslang.ast import (
    BlockStatement,
    EdgeKind,
    EventListControl,
    Expression,
    ProceduralBlockKind,
    ProceduralBlockSymbol,
    SignalEventControl,
    StatementKind,
    TimedStatement,
    TimingControl,
)
from pyslang.parsing import Token, TriviaKind
from pyslang.syntax import (
    ConditionalBranchDirectiveSyntax,
    ProceduralBlockSyntax,
    SyntaxKind,
    SyntaxNode,
    UnconditionalBranchDirectiveSyntax,
)

from rewriter.frontend.expressions import Expressions
from rewriter.frontend.places import Locator
from rewriter.frontend.resets import split_events
from rewriter.frontend.statements import Statements
from rewriter.model.design import ClockedBlock, Edge, Event
from rewriter.model.source import Span
from rewriter.model.statement import Block

_DIRECTIVE = re.compile(rb"`(?:ifn?def|elsif|else|endif)\b")
_ITEM_LISTS = (
    SyntaxKind.GenerateBlock,
    SyntaxKind.ModuleDeclaration,
    SyntaxKind.InterfaceDeclaration,
    SyntaxKind.ProgramDeclaration,
    SyntaxKind.GenerateRegion,
)
_NO_EDGE = EdgeKind(0)  # its name is missing in the stubs
_ALWAYS = (ProceduralBlockKind.Always, ProceduralBlockKind.AlwaysFF)


def is_clocked(block: ProceduralBlockSymbol) -> bool:
    """Say whether a procedural block is an `always` or `always_ff` with an edge event."""
    if block.procedureKind not in _ALWAYS:
        return False
    return any(event.edge is not _NO_EDGE for timing in _timings(block) for event in _signals(timing))


def _timings(block: ProceduralBlockSymbol) -> Iterator[TimingControl]:
    """Give the block's timing control, or those inside it when it has none of its own."""
    body = block.body
    if isinstance(body, TimedStatement):
        yield body.timing
        return
    inner: list[TimedStatement] = []
    if isinstance(body, BlockStatement):
        body.visit(lookup_table={StatementKind.Timed: inner.append})
    for statement in inner:
        yield statement.timing


def _signals(timing: TimingControl) -> Iterator[SignalEventControl]:
    if isinstance(timing, SignalEventControl):
        yield timing
    elif isinstance(timing, EventListControl):
        for event in timing.events:
            yield from _signals(event)


def lower_block(
    block: ProceduralBlockSymbol, expressions: Expressions, locator: Locator, texts: dict[str, bytes]
) -> ClockedBlock:
    """Lower a clocked block.

    Args:
        block: one that `is_clocked`.
        expressions: of its module body.
        locator: gives places.
        texts: bytes of every file by path.
    """
    syntax = block.syntax
    assert isinstance(syntax, ProceduralBlockSyntax)  # noqa: S101 (every `always` has this syntax)
    statements = Statements(expressions, locator)
    span = statements.whole(syntax.sourceRange)
    keyword = statements.whole(syntax.keyword.range)
    if span.file in locator.shared:
        statements.trap("shared-include", span)
    timed = block.body
    events = tuple(_event(event, expressions, statements) for t in _timings(block) for event in _signals(t))
    if isinstance(timed, TimedStatement):
        body = statements.lower(timed.stmt)
        split = split_events(events, body)
        if any(event.edge is _NO_EDGE or event.edge is EdgeKind.BothEdges for event in _signals(timed.timing)):
            split = type(split)(None, (), body, "an event has no edge, or both")
        if split.clock is None:
            statements.trap("clock-unclear", span, split.problem)
        clock, resets, synchronous = split.clock, split.resets, split.synchronous
    else:
        body = statements.lower(timed)
        clock, resets, synchronous = None, (), body
        statements.trap("timing-control", span, "the event control stands inside the block")
    return ClockedBlock(
        scope=expressions.names.scope(block),
        span=span,
        keyword=syntax.keyword.rawText,
        keyword_span=keyword,
        clock=clock,
        resets=resets,
        body=body,
        synchronous=synchronous,
        traps=tuple(statements.traps),
        disabled=_disabled(syntax, span, locator, texts),
        unbraced=_is_unbraced(syntax),
        label=body.label if isinstance(body, Block) else "",
    )


def _event(event: SignalEventControl, expressions: Expressions, statements: Statements) -> Event:
    edge = Edge.FALLING if event.edge is EdgeKind.NegEdge else Edge.RISING
    signal = expressions.lower(event.expr)
    if not signal.copyable:  # a macro that stands for the whole signal can be replaced
        statements.whole(event.expr.sourceRange)
    condition = expressions.lower(event.iffCondition) if event.iffCondition is not None else None
    return Event(edge, signal, condition)


def _is_unbraced(syntax: SyntaxNode) -> bool:
    return syntax.parent.kind not in _ITEM_LISTS


def _disabled(syntax: SyntaxNode, span: Span, locator: Locator, texts: dict[str, bytes]) -> tuple[Span, ...]:
    """Find text that a directive switches off; tokens are only looked at where a directive is seen."""
    if not _DIRECTIVE.search(texts[span.file], span.start, span.end):
        return ()
    found: list[Span] = []

    def visit(node: object) -> None:
        if isinstance(node, Token):
            found.extend(_disabled_before(node, locator))

    syntax.visit(visit)
    return tuple(sorted(part for part in found if span.covers(part)))


def _disabled_before(token: Token, locator: Locator) -> Iterator[Span]:
    for trivia in token.trivia:
        if trivia.kind is not TriviaKind.Directive:
            continue
        directive = trivia.syntax()
        if isinstance(directive, (ConditionalBranchDirectiveSyntax, UnconditionalBranchDirectiveSyntax)):
            tokens = list(directive.disabledTokens)
            if tokens:
                first, last = locator.span(tokens[0].range), locator.span(tokens[-1].range)
                yield Span(first.file, first.start, last.end)


def event_signals(block: ProceduralBlockSymbol) -> Iterator[Expression]:
    """Give the signals of a block's edge events."""
    if block.procedureKind in _ALWAYS:
        for timing in _timings(block):
            yield from (event.expr for event in _signals(timing) if event.edge is not _NO_EDGE)
