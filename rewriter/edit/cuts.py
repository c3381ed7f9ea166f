"""Cuts: the pieces of a block's text that go, and the white space and comments that go with them."""

import re
from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.edit.branches import merged_labels, runs
from rewriter.edit.text import DIRECTIVE, Page, copied
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Block, Case, CaseItem, Empty, If, Loop, Statement

_LINE_COMMENT = re.compile(r"[ \t]*(?://.*|/\*[^\n]*?\*/[ \t]*)\r?\Z")
_AFTER = re.compile(r"[ \t]*(?://.*|/\*[^\n]*?\*/[ \t]*)?\r?\Z")
_OPENS = re.compile(r"\bbegin(?:[ \t]*:[ \t]*\w+)?[ \t]*(?://.*)?\r?\n?\Z")
_CLOSES = re.compile(r"[ \t]*end")


@dataclass(frozen=True, order=True)
class Cut:
    """Replace the characters of [start, end) by `text`."""

    start: int
    end: int
    text: str = ""

    def covers(self, other: "Cut") -> bool:
        """Say whether the other one lies inside; an insertion at the end does not."""
        return self.start <= other.start and other.end <= self.end and other.start < self.end


def difference(page: Page, old: Statement, new: Statement, step: str) -> Iterator[Cut]:
    """Yield what turns a statement's text into that of its pruned form."""
    match old, new:
        case Block(), Block():
            kept = {inner.span: inner for inner in new.body}
            for inner in old.body:
                if inner.span in kept:
                    yield from difference(page, inner, kept[inner.span], step)
                else:
                    yield _gone(inner.span)
        case If(), If():
            yield from _if_difference(page, old, new, step)
        case Case(), Case():
            yield from _case_difference(page, old, new, step)
        case Loop(), Loop():
            yield from difference(page, old.body, new.body, step)
        case _:
            return


def _promises(page: Page, old: If | Case, new: If | Case) -> Iterator[Cut]:
    """Take off qualifiers, attributes and comments that promise something about all branches, when one went."""
    if old.qualifier and not new.qualifier:
        head = page.text(old.head)
        yield Cut(old.head.start, old.head.start + len(head) - len(re.sub(r"\A\w+\s+", "", head)))
    if isinstance(old, Case) and isinstance(new, Case) and old.items != new.items:
        if old.attributes and not new.attributes:
            yield from _without_promise(page, old.attributes)
        after = page.data[old.head.end : page.line_end(old.head.end)]
        if found := re.search(r"[ \t]*(?://|/\*).*\b(?:full|parallel)_case\b.*", after):
            yield Cut(old.head.end + found.start(), old.head.end + found.end())


def _without_promise(page: Page, attributes: Span) -> Iterator[Cut]:
    text = page.text(attributes)
    others = re.sub(r"\b(?:full|parallel)_case\b(?:\s*=\s*[\w']+)?\s*,?", "", text)
    if re.fullmatch(r"(?:\(\*[\s,]*\*\)\s*)+", others):
        yield _gone(attributes)
    elif others != text:
        yield Cut(attributes.start, attributes.end, re.sub(r",\s*\*\)", " *)", others))


def _if_difference(page: Page, old: If, new: If, step: str) -> Iterator[Cut]:
    yield from _promises(page, old, new)
    yield from _branch(page, old.head.end, old.then, new.then, step)
    if old.other is None or old.else_keyword is None:
        return
    if new.other is None:
        yield Cut(old.then.span.end, old.other.span.end)
    else:
        # `else ;` would make lint tools ask whether the semicolon was meant.
        yield from _branch(page, old.else_keyword.end, old.other, new.other, step, " begin end")


def _branch(  # noqa: PLR0913, PLR0917 (one place, before and after)
    page: Page, head_end: int, old: Statement, new: Statement, step: str, nothing: str = " ;"
) -> Iterator[Cut]:
    if isinstance(new, Empty):
        if not isinstance(old, Empty):
            yield Cut(head_end, old.span.end, nothing)
    else:
        yield from difference(page, old, new, step)


def _case_difference(page: Page, old: Case, new: Case, step: str) -> Iterator[Cut]:
    if old.attributes and "parallel_case" in old.attribute_names and _newly_idle(old, new):
        # Read as a promise about arms, the attribute makes an engine drop an arm that does nothing (measured
        # with Yosys 0.70: the default arm then takes its place). Without it the arms mean what IEEE 1800 says.
        yield _gone(old.attributes)
    yield from _promises(page, old, new)
    before = {item.span: item for item in old.items}
    kept = {item.span for item in new.items}
    for item in old.items:
        if item.span not in kept:
            yield _gone(item.span)
    for run in runs(new.items):
        first = before[run[0].span]
        if len(run) > 1:
            yield Cut(run[0].span.start, run[-1].span.end, _merged(page, run, step))
        else:
            yield from _branch(page, first.head.end, first.body, run[0].body, step)


def _newly_idle(old: Case, new: Case) -> bool:
    acted = {item.span for item in old.items if _acts(item.body)}
    return any(item.span in acted and not _acts(item.body) for item in new.items)


def _acts(statement: Statement) -> bool:
    """Say whether a statement writes something, whatever value the parameters have."""
    if isinstance(statement, If) and statement.condition.constant is not None:
        return _acts(statement.then) and statement.other is not None and _acts(statement.other)
    return isinstance(statement, Assign) or any(_acts(inner) for inner in statement.children())


def _merged(page: Page, run: list[CaseItem], step: str) -> str:
    labels = [copied(page.text(item.head)).rstrip().removesuffix(":").rstrip() for item in run]
    labels = [label + " " if re.search(r"\\\S+\Z", label) else label for label in labels]
    indent = page.indent(run[0].span.start)
    return (page.newline + indent).join(merged_labels(labels, ";", step))


def _gone(span: Span) -> Cut:
    return Cut(span.start, span.end)


def tidied(page: Page, within: Span, cuts: list[Cut]) -> list[Cut]:
    """Widen deletions so that no empty lines and no stray spaces stay behind.

    Args:
        page: the file.
        within: no cut may reach outside.
        cuts: in any order; those inside others are dropped.
    """
    outer: list[Cut] = []
    for cut in sorted(cuts, key=lambda c: (c.start, -c.end)):
        if outer and outer[-1].covers(cut):
            continue
        joins = outer and not outer[-1].text and not cut.text and not page.data[outer[-1].end : cut.start].strip()
        if joins:
            outer[-1] = Cut(outer[-1].start, cut.end)
        else:
            outer.append(cut)
    widened = [_widened(page, within, cut) if not cut.text else cut for cut in outer]
    return disjoint(widened)


def _widened(page: Page, within: Span, cut: Cut) -> Cut:
    line = max(page.data.rfind("\n", 0, cut.start) + 1, within.start)
    end = page.data.find("\n", cut.end)
    end = min(end if end >= 0 else within.end, within.end)
    prefix, suffix = page.data[line : cut.start], page.data[cut.end : end]
    if not prefix.strip() and line > within.start:
        if _AFTER.fullmatch(suffix) and end < within.end:
            return without_blanks(page, within, Cut(line, end + 1))
        return Cut(cut.start, cut.end + len(suffix) - len(suffix.lstrip(" \t")))
    if not suffix.strip() or suffix.lstrip().startswith(("//", "/*")):
        return Cut(cut.start - (len(prefix) - len(prefix.rstrip(" \t"))), cut.end)
    return Cut(cut.start, cut.end + len(suffix) - len(suffix.lstrip(" \t")))


def without_blanks(page: Page, within: Span, cut: Cut) -> Cut:
    """Take a blank line along when whole lines go and it would end up doubled or at the edge of its block."""
    above = page.data[page.data.rfind("\n", 0, cut.start - 1) + 1 : cut.start]
    below = page.data[cut.end : page.data.find("\n", cut.end) + 1]
    if not below.strip() and (not above.strip() or _OPENS.search(above)) and cut.end + len(below) < within.end:
        return Cut(cut.start, cut.end + len(below))
    if _CLOSES.match(below) and not above.strip() and cut.start - len(above) > within.start:
        return Cut(cut.start - len(above), cut.end)
    return cut


def disjoint(cuts: list[Cut]) -> list[Cut]:
    """Join deletions that came to touch."""
    joined: list[Cut] = []
    for cut in cuts:
        if joined and cut.start < joined[-1].end:
            joined[-1] = Cut(joined[-1].start, max(joined[-1].end, cut.end), joined[-1].text + cut.text)
        else:
            joined.append(cut)
    return joined


def applied(page: Page, within: Span, cuts: list[Cut]) -> str:
    """Give the text of a span after its cuts."""
    pieces: list[str] = []
    done = within.start
    for cut in sorted(cuts):
        pieces += [page.data[done : cut.start], cut.text]
        done = cut.end
    return "".join([*pieces, page.data[done : within.end]])


def gaps(body: Statement) -> Iterator[tuple[int, int]]:
    """Yield the stretches of a statement's text that belong to no token: white space, comments, directives, macros."""
    solid = sorted((span.start, span.end) for statement in body.walk() for span in _solid(statement))
    done = body.span.start
    for start, end in solid:
        if start > done:
            yield done, start
        done = max(done, end)
    if done < body.span.end:
        yield done, body.span.end


def _solid(statement: Statement) -> Iterator[Span]:
    match statement:
        case Block():
            yield statement.begin
            yield statement.end
            yield from (declaration.span for declaration in statement.declarations)
        case If():
            yield statement.head
            yield from (span for span in (statement.attributes, statement.else_keyword) if span)
        case Case():
            yield statement.head
            yield statement.tail
            if statement.attributes:
                yield statement.attributes
            yield from (item.head for item in statement.items)
        case Loop():
            yield statement.head
        case _:
            yield statement.span


def has_directive(text: str) -> bool:
    """Say whether a compiler directive stands in a piece of text."""
    return DIRECTIVE.search(text) is not None


def whole_line_comments(page: Page, start: int, end: int) -> Iterator[Cut]:
    """Yield the comments between two offsets that stand on lines of their own."""
    offset = start
    while offset < end:
        line = page.data.rfind("\n", 0, offset) + 1
        stop = page.data.find("\n", offset)
        stop = len(page.data) if stop < 0 else stop
        text = page.data[line:stop]
        if line >= start and stop <= end and _LINE_COMMENT.fullmatch(text):
            yield Cut(line + len(text) - len(text.lstrip()), stop - text.endswith("\r"))
        offset = stop + 1
