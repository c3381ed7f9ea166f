"""Take the text of a condition apart at its `||` and `&&`, parentheses respected."""

from collections.abc import Iterator
from dataclasses import dataclass

from tests.cores.fragments import Span

_OPEN, _CLOSE = "([{", ")]}"


@dataclass(frozen=True)
class _Group:
    """The inside of one pair of parentheses (or the whole text), and what stands in it outside deeper ones."""

    span: Span
    operators: tuple[tuple[str, Span], ...]
    simple: bool  # no `?`, no comma: its parts are operands of the operators alone


def alternatives(text: str) -> tuple[tuple[Span, ...], ...]:
    """Give the operands of each `||`, group by group; each group has two at least."""
    return tuple(_operands(text, group, "||") for group in _groups(text) if _joined(group, "||"))


def conjunctions(text: str) -> tuple[tuple[Span, ...], ...]:
    """Give the operands of each `&&` that stands without a `||` beside it."""
    return tuple(
        _operands(text, group, "&&") for group in _groups(text) if _joined(group, "&&") and not _joined(group, "||")
    )


def _joined(group: _Group, operator: str) -> bool:
    return group.simple and any(found == operator for found, _ in group.operators)


def _operands(text: str, group: _Group, operator: str) -> tuple[Span, ...]:
    cuts = [span for found, span in group.operators if found == operator]
    starts = [group.span.start, *(cut.end for cut in cuts)]
    ends = [*(cut.start for cut in cuts), group.span.end]
    return tuple(_trim(text, start, end) for start, end in zip(starts, ends, strict=True))


def _trim(text: str, start: int, end: int) -> Span:
    inside = text[start:end]
    return Span(start + len(inside) - len(inside.lstrip()), end - len(inside) + len(inside.rstrip()))


def _groups(text: str) -> Iterator[_Group]:
    """Give the whole text and the inside of every parenthesis that groups (not `name(…)`, `[…]` or `{…}`).

    What is negated is left out: there `||` and `&&` change places.
    """
    yield _group(text, Span(0, len(text)))
    opened: list[tuple[int, bool]] = []
    for index, character in enumerate(text):
        if character in _OPEN:
            outer = opened[-1][1] if opened else False
            opened.append((index, outer or text[:index].rstrip().endswith(("!", "~"))))
        elif character in _CLOSE:
            start, negated = opened.pop()
            if character == ")" and not negated and not _is_call(text, start):
                yield _group(text, Span(start + 1, index))


def _is_call(text: str, start: int) -> bool:
    before = text[:start].rstrip()
    return bool(before) and (before[-1].isalnum() or before[-1] in "_$'")


def _group(text: str, span: Span) -> _Group:
    depth, simple = 0, True
    operators: list[tuple[str, Span]] = []
    for index in range(span.start, span.end):
        character = text[index]
        depth += (character in _OPEN) - (character in _CLOSE)
        if depth == 0 and character in "?,":
            simple = False
        if depth == 0 and text[index : index + 2] in {"||", "&&"} and text[index - 1 : index] != character:
            operators.append((text[index : index + 2], Span(index, index + 2)))
    return _Group(span, tuple(operators), simple)
