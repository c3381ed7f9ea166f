"""Declarations: how variables were declared, as text that declares a copy."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from pyslang.ast import Compilation, NetSymbol, Symbol, ValueSymbol
from pyslang.syntax import (
    DeclaratorSyntax,
    ImplicitTypeSyntax,
    IntegerTypeSyntax,
    KeywordTypeSyntax,
    NamedTypeSyntax,
)

from rewriter.frontend.bits import width_of
from rewriter.frontend.places import Locator
from rewriter.model.design import Variable
from rewriter.model.source import Span

_COPYABLE = (ImplicitTypeSyntax, IntegerTypeSyntax, KeywordTypeSyntax, NamedTypeSyntax)


class Declarations:
    """Describe the variables of module bodies."""

    def __init__(self, compilation: Compilation, locator: Locator, texts: dict[str, bytes]) -> None:
        self._compilation = compilation
        self._locator = locator
        self._texts = texts

    def variable(self, symbol: ValueSymbol, name: str, *, is_port: bool) -> Variable:
        """Describe one variable or net."""
        kind = symbol.type
        element = kind
        while element.isUnpackedArray and element.hasFixedRange:
            element = element.arrayElementType
        syntax = symbol.syntax
        unpacked = ""
        span = Span("", 0, 0)
        if isinstance(syntax, DeclaratorSyntax):
            span = self._locator.span(syntax.sourceRange)
            unpacked = " ".join(self._text(self._locator.span(d.sourceRange)) for d in syntax.dimensions)
        elif syntax is not None:
            span = self._locator.span(syntax.sourceRange)
        return Variable(
            name=name,
            declaration=self._declaration(symbol, span),
            width=width_of(kind),
            unpacked=unpacked,
            element_width=width_of(element),
            attributes=tuple(attribute.name for attribute in self._compilation.getAttributes(symbol)),
            is_port=is_port,
            is_net=isinstance(symbol, NetSymbol),
            span=span,
        )

    def _declaration(self, symbol: Symbol, span: Span) -> str | None:
        declared = symbol.declaredType
        syntax = declared.typeSyntax if declared is not None else None
        if not isinstance(syntax, _COPYABLE):
            return None
        source = syntax.sourceRange
        text = ""
        if source.start.buffer.id or source.end.offset:
            place, exact = self._locator.placed(source)
            if not exact and place.start != place.end:
                return None
            text = self._text(place)
        if isinstance(syntax, ImplicitTypeSyntax):
            word = "reg" if span.file.endswith((".v", ".vh")) else "logic"
            return f"{word} {text}".strip()
        return text or None

    def _text(self, span: Span) -> str:
        return " ".join(self._texts[span.file][span.start : span.end].decode("utf-8", "replace").split())
