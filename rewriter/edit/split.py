"""Split a block: what stays in it, and a copy for each bank on a clock of its own."""

import re
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property

from rewriter.edit.cuts import (
    Cut,
    applied,
    difference,
    disjoint,
    gaps,
    has_directive,
    tidied,
    whole_line_comments,
    without_blanks,
)
from rewriter.edit.names import COPY_FORMS, Names
from rewriter.edit.prune import Pruner, check_separate
from rewriter.edit.temporaries import Temporaries, feeds, simple
from rewriter.edit.text import COMMENT, CannotEditError, Page, renamed, words
from rewriter.model.design import ClockedBlock
from rewriter.model.plan import Bank
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Block, Empty, Opaque, Statement

_CONDITIONAL = re.compile(r"`(?:ifdef|ifndef|elsif|else|endif)\b")
_GROUP_ENDS = re.compile(r"[ \t]*(?:end(?:case)?\b|else\b|//|/\*|\r?\n|\Z)")


@dataclass(frozen=True)
class Splitter:
    """Cut one block's text.

    Args:
        page: its file.
        block: as a body holds it.
        banks: the banks that leave it.
        temporaries: of the block.
        step: one step of indentation.
    """

    page: Page
    block: ClockedBlock
    banks: tuple[Bank, ...]
    temporaries: Temporaries
    step: str

    def check(self) -> None:
        """Refuse a block whose text cannot be cut.

        Raises:
            CannotEditError: `inside-macro`, `inactive-code`.
        """
        if overlap := check_separate(self.block.body):
            raise CannotEditError("inside-macro", "one macro makes several statements", overlap)
        for start, end in self._gaps:
            plain = _CONDITIONAL.sub(" ", self._uncommented(start, end))
            if has_directive(plain):
                raise CannotEditError("inactive-code", "a compiler directive stands inside the block", self._at(start))

    # what stays

    @cached_property
    def residual(self) -> tuple[Cut, ...] | None:
        """Give the cuts that leave what no bank takes; None when nothing is left that matters.

        Raises:
            CannotEditError: `inactive-code`, macro text would go with what leaves.
        """
        stays = self._rest(self._needed_here)
        if stays is None or not any(self._matters(inner) for inner in stays.walk()):
            return None
        cuts = list(difference(self.page, self.block.body, stays, self.step))
        cuts = tidied(self.page, self.block.span, [*cuts, *self._unused_declarations(stays, self._needed_here)])
        for start, end in self._gaps:
            lost = any(cut.start <= start and end <= cut.end for cut in cuts)
            if lost and "`" in self._uncommented(start, end):
                detail = "text of a macro stands among what leaves the block"
                raise CannotEditError("inactive-code", detail, self._at(start))
        return tuple(disjoint([self._with_comments(cut) for cut in cuts]))

    @cached_property
    def _needed_here(self) -> frozenset[str]:
        """Give the temporaries that what stays needs, among them all that text of macros mentions."""
        gaps_text = [self._uncommented(start, end) for start, end in self._gaps]
        mentioned = words("\n".join(text.replace("`", " ") for text in gaps_text if "`" in text))
        return self.temporaries.closure(self._rest, (p for p in self.temporaries.written if simple(p) in mentioned))

    def _rest(self, needed: frozenset[str]) -> Statement | None:
        """Take out what the banks write, and temporaries that nobody else can read."""
        idle = (self.temporaries.local | self.temporaries.private) - needed

        def stays(statement: Statement) -> bool:
            if not isinstance(statement, Assign):
                return True
            if statement.blocking:
                return not all(target.variable in idle for target in statement.targets)
            return not any(self._writes(bank, statement) for bank in self.banks)

        return Pruner(stays, self._holds, self._stands, self._resets).prune(self.block.body)

    def _matters(self, statement: Statement) -> bool:
        match statement:
            case Opaque():
                return True
            case Assign():
                return not all(target.is_local for target in statement.targets)
            case Block():
                return self._holds(statement)
            case Empty():
                return self._stands(statement)
            case _:
                return False

    def _with_comments(self, cut: Cut) -> Cut:
        """Let the comments right above whole lines go with them, when the lines end their paragraph."""
        data = self.page.data
        if cut.text or data[cut.start - 1] != "\n" or not _GROUP_ENDS.match(data, cut.end):
            return cut
        start = cut.start
        for comment in reversed(self._comments):
            between = data[comment.end : start]
            if comment.end < start and not between.strip() and between.count("\n") == 1:
                start = self.page.line_start(comment.start)
        return cut if start == cut.start else without_blanks(self.page, self.block.span, Cut(start, cut.end))

    # what leaves

    def copy(self, bank: Bank, gclk: str, stem: str, names: Names, *, keep_labels: bool) -> str:
        """Give the block's text for one bank, from its first token to its last.

        Args:
            bank: whose registers it writes.
            gclk: its clock.
            stem: for the names of blocks.
            names: of the definition.
            keep_labels: the original block goes, so its labels can be used again.

        Raises:
            CannotEditError: `not-copyable`, `clock-unclear`.
        """
        if self.block.clock is None:
            raise CannotEditError("clock-unclear", "the block has no clock", self.block.span)
        needed = self._needed[bank.name]
        pruned = self._pruned(bank, needed)
        clock = self.block.clock.signal.span
        cuts = [
            Cut(clock.start, clock.end, gclk),
            *difference(self.page, self.block.body, pruned, self.step),
            *self._unused_declarations(pruned, needed),
            *self._macros(),
        ]
        declared = self.temporaries.declarations(needed - self._owned(bank))
        cuts += self._labels(pruned, list(declared.values()), stem, names, keep_labels=keep_labels)
        cuts += [comment for comment in self._comments if not self._moves(comment, cuts)]
        text = applied(self.page, self.block.span, tidied(self.page, self.block.span, cuts))
        # Text of macros may name the original's temporaries; then the copies keep those names.
        text = text if "`" in COMMENT.sub("", text) else renamed(text, names.suffixed(declared, "_t"))
        return self.page.newline.join(line for line in text.split(self.page.newline) if line.strip())

    def _pruned(self, bank: Bank, needed: frozenset[str]) -> Statement:
        def keep(statement: Statement) -> bool:
            if not isinstance(statement, Assign):
                return False
            return self._writes(bank, statement) or feeds(statement, needed)

        pruned = Pruner(keep).prune(self.block.body)
        if pruned is None:
            raise CannotEditError("unsplittable", "no assignment of the bank was found", self.block.span)
        return pruned

    @cached_property
    def _needed(self) -> dict[str, frozenset[str]]:
        """Give the temporaries that each bank's assignments and branches use."""
        return {bank.name: self._needed_by(bank) for bank in self.banks}

    def _needed_by(self, bank: Bank) -> frozenset[str]:
        known = (name for proposal in bank.proposals for name in proposal.needs)
        return self.temporaries.closure(lambda needed: self._pruned(bank, needed), known)

    def _owned(self, bank: Bank) -> frozenset[str]:
        """Give the module's own temporaries that move to a bank: nothing else reads them, and it is the first to."""
        earlier = frozenset[str]()
        for other in self.banks[: self.banks.index(bank)]:
            earlier |= self._needed[other.name]
        return self.temporaries.private - self._needed_here - earlier

    def _unused_declarations(self, pruned: Statement, needed: frozenset[str]) -> Iterator[Cut]:
        for statement in pruned.walk():
            if isinstance(statement, Block):
                for declaration in statement.declarations:
                    if not needed & set(declaration.names):
                        yield Cut(declaration.span.start, declaration.span.end)

    def _labels(
        self, pruned: Statement, declared: list[str], stem: str, names: Names, *, keep_labels: bool
    ) -> Iterator[Cut]:
        """Name the copy where it declares something, and take labels off that stay with the original."""
        body = self.block.body
        if declared:
            name = names.reserve(stem, COPY_FORMS) + "_copy"
            inner = self.page.newline + self.page.indent(self.block.span.start) + self.step
            opened = f"begin : {name}" + "".join(inner + line for line in declared)
            if isinstance(body, Block):
                yield Cut(body.begin.start, body.begin.end, opened)
                yield Cut(body.end.start, body.end.end, "end")
            else:
                closing = self.page.newline + self.page.indent(self.block.span.start) + "end"
                yield Cut(body.span.start, body.span.start, opened + inner)
                yield Cut(body.span.end, body.span.end, closing)
        for block in pruned.walk():
            if not isinstance(block, Block) or not block.label or keep_labels:
                continue
            if not (declared and block.span == body.span):
                label = f" : {names.reserve(f'{block.label}_{stem}', ('{}',))}" if block.declarations else ""
                yield Cut(block.begin.start, block.begin.end, f"begin{label}")
                yield Cut(block.end.start, block.end.end, "end")

    def _macros(self) -> Iterator[Cut]:
        """Take out macros that stand for nothing and conditional text: they stay with the original."""
        for start, end in self._gaps:
            plain = self._uncommented(start, end)
            if "`" in plain:
                yield Cut(start + plain.index("`"), start + len(plain.rstrip()))

    def _moves(self, comment: Cut, cuts: list[Cut]) -> bool:
        """Say whether a comment left the original block together with the line that follows it, which is kept here."""
        residual = self.residual
        if residual is not None and not any(cut.covers(comment) for cut in residual):
            return False
        following = comment.end
        while following < self.block.span.end and self.page.data[following].isspace():
            following += 1
        after = next((c for c in self._comments if c.start == following), None)
        if after:
            return self._moves(after, cuts)
        return not any(cut.start <= following < cut.end and not cut.text for cut in cuts)

    # helpers

    def _writes(self, bank: Bank, statement: Assign) -> bool:
        return any(statement.span in proposal.writes for proposal in bank.proposals)

    @cached_property
    def _resets(self) -> frozenset[Span]:
        return frozenset(reset.branch.span for reset in self.block.resets)

    def _stands(self, statement: Empty) -> bool:
        """Say whether an empty statement is the text of a macro, which another build may fill."""
        return "`" in self.page.text(statement.span)

    def _holds(self, block: Block) -> bool:
        """Say whether text of macros or directives stands right inside a block."""
        edges = [block.begin.end, *(e for s in block.body for e in (s.span.start, s.span.end)), block.end.start]
        for declaration in block.declarations:
            edges += [declaration.span.start, declaration.span.end]
        edges.sort()
        return any("`" in self._uncommented(edges[i], edges[i + 1]) for i in range(0, len(edges), 2))

    @cached_property
    def _gaps(self) -> tuple[tuple[int, int], ...]:
        return tuple(gaps(self.block.body))

    @cached_property
    def _comments(self) -> tuple[Cut, ...]:
        return tuple(c for start, end in self._gaps for c in whole_line_comments(self.page, start, end))

    def _uncommented(self, start: int, end: int) -> str:
        return COMMENT.sub(lambda found: " " * len(found[0]), self.page.data[start:end])

    def _at(self, offset: int) -> Span:
        return Span(self.page.path, offset, offset)
