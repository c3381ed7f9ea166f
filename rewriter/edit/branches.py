"""Print a pruned tree of branches that sets a wake signal at its leaves."""

import re
from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass
from itertools import groupby

from rewriter.edit.formula import FormulaWriter
from rewriter.edit.prune import ends_open
from rewriter.edit.text import WIDTH, Page, copied, indented
from rewriter.model.source import Span
from rewriter.model.statement import Block, Case, CaseItem, Empty, If, Loop, Statement
from rewriter.model.wake import Leaf

_FEWEST = 3  # items that wake are joined from this number on


@dataclass(frozen=True)
class Printer:
    """Print branches.

    Args:
        page: where their text stands.
        leaves: by the span of the assignment that wakes.
        repeated: leaves that may come after another one.
        formulas: writes the conditions of leaves.
        target: what a leaf sets to 1.
        label: names an inner block that declares variables.
        step: one step of indentation.
    """

    page: Page
    leaves: Mapping[Span, Leaf]
    repeated: frozenset[Span]
    formulas: FormulaWriter
    target: str
    label: Callable[[Block], str]
    step: str

    def lines(self, statement: Statement) -> list[str]:
        """Give the lines of a statement, starting at the left margin."""
        match statement:
            case Block():
                declared = [copied(self.page.text(d.span)) for d in statement.declarations]
                inner = [line for s in statement.body for line in self.lines(s)]
                label = f" : {self.label(statement)}" if declared else ""
                return [f"begin{label}", *indented([*declared, *inner], self.step), "end"]
            case If():
                return self._print_if(statement)
            case Case():
                return self._print_case(statement)
            case Loop():
                return self._attached(copied(self.page.text(statement.head)), statement.body)
            case Empty():
                return [";"]
            case _ if statement.span in self.leaves:
                return [self._leaf_line(self.leaves[statement.span])]
            case _:
                return [copied(self.page.text(statement.span))]

    def _leaf_line(self, leaf: Leaf) -> str:
        if leaf.condition is None:
            return f"{self.target} = 1'b1;"
        # An assignment and no `if`: where the condition is unknown, so is the choice that it stands for.
        if leaf.statement in self.repeated:
            return f"{self.target} = {self.target} || {self.formulas.alternative(leaf.condition)};"
        return f"{self.target} = {self.formulas.write(leaf.condition)};"

    def _print_if(self, statement: If) -> list[str]:
        head = re.sub(r"\A(?:unique0?|priority)\s+", "", copied(self.page.text(statement.head)))
        if statement.other is None:
            return self._attached(head, statement.then)
        guarded = ends_open(statement.then)
        lines = self._attached(head, statement.then, bracket=guarded)
        # `else ;` would make lint tools ask whether the semicolon was meant.
        empty = isinstance(statement.other, Empty)
        other = ["else begin end"] if empty else self._attached("else", statement.other)
        if lines[-1] == "end":
            return [*lines[:-1], f"end {other[0]}", *other[1:]]
        return [*lines, *other]

    def _print_case(self, statement: Case) -> list[str]:
        head = re.sub(r"\A(?:unique0?|priority)\s+", "", copied(self.page.text(statement.head)))
        lines: list[str] = []
        for run in runs(statement.items, self._alike):
            if len(run) > 1:
                (body,) = self.lines(run[0].body)
                lines += indented(merged_labels([self._label(item) for item in run], body, self.step), self.step)
            else:
                lines += indented(self._attached(self._label(run[0]) + ":", run[0].body), self.step)
        if not any(item.is_default for item in statement.items):
            lines.append(f"{self.step}default: ;")
        return [head, *lines, "endcase"]

    def _alike(self, item: CaseItem) -> str:
        """Say what an item does, if it may share its line with neighbours."""
        if item.is_default:
            return ""
        leaf = self.leaves.get(item.body.span)
        return "wakes" if leaf and leaf.condition is None else idle(item)

    def _label(self, item: CaseItem) -> str:
        text = copied(self.page.text(item.head)).rstrip()
        return "default" if item.is_default else text.removesuffix(":").rstrip() + (" " if "\\" in text else "")

    def _attached(self, head: str, body: Statement, *, bracket: bool = False) -> list[str]:
        """Join a head with its body: on one line if it fits, else below."""
        lines = self.lines(body)
        if bracket:
            return [f"{head} begin", *indented(lines, self.step), "end"]
        short = len(lines) == 1 and len(head) + len(lines[0]) < WIDTH
        if short or isinstance(body, (Block, Case)) or (head == "else" and isinstance(body, If)):
            return [f"{head} {lines[0]}", *lines[1:]]
        return [head, *indented(lines, self.step)]


def repeated_leaves(tree: Statement, leaves: Mapping[Span, Leaf]) -> frozenset[Span]:
    """Find leaves that may come after another one in the same run."""
    found: set[Span] = set()

    def visit(statement: Statement, *, after: bool) -> bool:
        """Note leaves, and say whether one may have come by the end of the statement."""
        match statement:
            case Block():
                for inner in statement.body:
                    after = visit(inner, after=after)
                return after
            case If() | Case():
                branches = [visit(inner, after=after) for inner in statement.children()]
                return after or any(branches)
            case Loop():
                return visit(statement.body, after=visit(statement.body, after=after))
            case _ if statement.span in leaves:
                if after:
                    found.add(statement.span)
                return True
            case _:
                return after

    visit(tree, after=False)
    return frozenset(found)


def idle(item: CaseItem) -> str:
    """Say whether an item does nothing, so that it may share its `;` with neighbours."""
    return "idle" if isinstance(item.body, Empty) and not item.is_default else ""


def runs(items: tuple[CaseItem, ...], alike: Callable[[CaseItem], str] = idle) -> Iterator[list[CaseItem]]:
    """Group neighbouring items that do the same; two that wake keep their lines, as the original has them."""
    for word, group in groupby(items, alike):
        run = list(group)
        if word == "idle" or (word and len(run) >= _FEWEST):
            yield run
        else:
            yield from ([item] for item in run)


def merged_labels(labels: list[str], body: str, step: str) -> list[str]:
    """Write `a, b, c: ;`, on several lines if it is long."""
    lines = [labels[0]]
    for label in labels[1:]:
        if len(lines[-1]) + len(label) + len(body) < WIDTH - 20:
            lines[-1] += f", {label}"
        else:
            lines[-1] += ","
            lines.append(step + label)
    lines[-1] += f": {body}"
    return lines
