"""Rewrite clocked blocks: move them to their gated clocks, and put the cells before them."""

from dataclasses import dataclass

from rewriter.edit.site import Site
from rewriter.edit.split import Splitter
from rewriter.edit.temporaries import Temporaries
from rewriter.edit.text import CODEC, CannotEditError, Page
from rewriter.model.design import ClockedBlock, Module
from rewriter.model.plan import Bank, BlockPlan, Shape
from rewriter.model.rewrite import Edit
from rewriter.model.source import Span


def rewrite_block(site: Site, plan: BlockPlan) -> list[Edit]:
    """Give the edits of one block.

    Raises:
        CannotEditError: with the reason word; nothing has been placed then that counts.
    """
    banks = tuple(site.banks[name] for name in plan.banks)
    module, block = site.body_of(banks[0])
    editor = _BlockEditor(site, plan, banks, module, block, site.page(block.span.file))
    match plan.shape:
        case Shape.KEEP:
            return editor.keep()
        case Shape.SPLIT:
            return editor.split()
        case _:
            raise CannotEditError("unsplittable", f"shape `{plan.shape.value}` is not known", block.span)


@dataclass(frozen=True)
class _BlockEditor:
    """Edit one block in its file."""

    site: Site
    plan: BlockPlan
    banks: tuple[Bank, ...]
    module: Module
    block: ClockedBlock
    page: Page

    def keep(self) -> list[Edit]:
        """Replace the clock's name alone."""
        (bank,) = self.banks
        if self.block.clock is None or not self.block.clock.signal.copyable:
            raise CannotEditError("clock-unclear", "the clock's name cannot be replaced", self.block.span)
        lines = self._fragment(bank)
        clock = self._edit(self.block.clock.signal.span, self.site.gclk(bank.cell), "clock")
        return [*self._before(lines), clock, *self._after([])]

    def split(self) -> list[Edit]:
        """Leave what no bank takes, and put a copy for each bank after it."""
        definition = self.site.definition(self.plan.block.definition)
        temporaries = Temporaries(self.page, definition, self.module, self.block, self.site.macro_words)
        splitter = Splitter(self.page, self.block, self.banks, temporaries, self.step)
        splitter.check()
        residual = splitter.residual
        pieces: list[str] = []
        for bank in self.banks:
            names = self.site.names_of(bank.block.definition)
            stem = bank.registers[0].name
            lines = self._fragment(bank)
            keep_labels = residual is None and bank is self.banks[0]
            copy = splitter.copy(bank, self.site.gclk(bank.cell), stem, names, keep_labels=keep_labels)
            pieces += [*lines, copy]
        if residual is None:
            text = (self.page.newline + self.indent).join(pieces)
            return [*self._before([]), self._edit(self.block.span, text, "split"), *self._after([])]
        cuts = [self._edit(Span(self.page.path, cut.start, cut.end), cut.text, "split") for cut in residual]
        return [*self._before([]), *cuts, *self._after(pieces)]

    def _fragment(self, bank: Bank) -> list[str]:
        """Give the lines that declare the bank's cell, none when an earlier block did."""
        if bank.cell in self.site.placed:
            return []
        return self.site.fragment(self.site.cells[bank.cell], bank, self.step)

    @property
    def indent(self) -> str:
        """Give the white space before the block, one step more when it is wrapped."""
        return self.page.indent(self.block.span.start)

    @property
    def step(self) -> str:
        """Give one step of indentation."""
        return self.page.unit(self.block.span)

    def _before(self, lines: list[str]) -> list[Edit]:
        """Insert lines before the block, and a `begin` where it is the lone item of a generate branch."""
        start = self.block.span.start
        wrapped = ["begin", *lines] if self.block.unbraced else lines
        if not wrapped:
            return []
        if self.page.opens_line(start):
            at = self.page.line_start(start)
            return [self._insert(at, "".join(self.indent + line + self.page.newline for line in wrapped))]
        return [self._insert(start, "".join(line + self.page.newline + self.indent for line in wrapped))]

    def _after(self, lines: list[str]) -> list[Edit]:
        """Insert lines after the block, and the `end` that belongs to `begin`."""
        wrapped = [*lines, "end"] if self.block.unbraced else lines
        if not wrapped:
            return []
        end = self.block.span.end
        text = "".join(self.page.newline + self.indent + line for line in wrapped)
        if self.page.rest_is_comment(end):
            return [self._insert(self.page.line_end(end), text)]
        rest = self.page.data[end : self.page.line_end(end)]
        spaces = len(rest) - len(rest.lstrip(" \t"))
        return [self._edit(Span(self.page.path, end, end + spaces), text + self.page.newline + self.indent, "cell")]

    def _insert(self, offset: int, text: str) -> Edit:
        why = "wrap" if self.block.unbraced else "cell" if self.plan.shape is Shape.KEEP else "split"
        return self._edit(Span(self.page.path, offset, offset), text, why)

    def _edit(self, span: Span, text: str, why: str) -> Edit:
        return Edit(span, text.encode(CODEC), tuple(bank.name for bank in self.banks), why)
