"""Statements of a clocked block; spans cover attributes and labels and end after the last token."""

from collections.abc import Iterator
from dataclasses import dataclass
from enum import Enum
from functools import cached_property

from rewriter.model.expr import Expr
from rewriter.model.source import Span


class Index(Enum):
    """Say what the indices of an assignment target depend on."""

    CONSTANT = "constant"
    LOOP = "loop"
    VARIABLE = "variable"


@dataclass(frozen=True)
class Target:
    """Name what an assignment writes.

    Args:
        variable: path within the module body (`q`, `gen[2].q`).
        bits: (msb, lsb) of the flattened variable that may be written; the whole when the
            indices are not constant.
        index: what the indices depend on.
        unpacked: an index that is not constant selects an unpacked dimension (a word of an array).
        span: text of the target.
        is_local: declared inside the block.
        indices: index expressions, constant or not.
    """

    variable: str
    bits: tuple[int, int]
    index: Index
    unpacked: bool
    span: Span
    is_local: bool
    indices: tuple[Expr, ...] = ()


@dataclass(frozen=True)
class Statement:
    """Base of every statement."""

    span: Span

    def children(self) -> tuple["Statement", ...]:
        """Give the statements directly below, in source order."""
        return ()

    def walk(self) -> Iterator["Statement"]:
        """Yield this statement and all below, outermost first."""
        yield self
        for child in self.children():
            yield from child.walk()

    @cached_property
    def family(self) -> tuple[tuple["Statement", int], ...]:
        """Give what walk gives, each with the place of its parent (-1 for this one); kept, since blocks are large."""
        family: list[tuple[Statement, int]] = [(self, -1)]
        place = 0
        stack: list[tuple[Statement, int]] = [(self, 0)]
        while stack:
            statement, place = stack.pop()
            if statement is not self:
                family.append((statement, place))
                place = len(family) - 1
            stack.extend((child, place) for child in reversed(statement.children()))
        return tuple(family)


@dataclass(frozen=True)
class LocalDeclaration:
    """Declare variables inside a block; `span` includes the semicolon. `initial` says one has an initialiser."""

    span: Span
    names: tuple[str, ...]
    initial: bool = False


@dataclass(frozen=True)
class Block(Statement):
    """Group statements: `begin … end`. `begin` covers the keyword and its label, `end` the keyword and its label."""

    begin: Span
    end: Span
    label: str
    declarations: tuple[LocalDeclaration, ...]
    body: tuple[Statement, ...]

    def children(self) -> tuple[Statement, ...]:
        """Give the statements of the block."""
        return self.body


@dataclass(frozen=True)
class If(Statement):
    """Branch: `if (condition) then else other`.

    Args:
        head: from `unique`/`priority`/`if` to the closing parenthesis (no attributes).
        else_keyword: the `else` token, None without else.
        qualifier: `unique`, `unique0`, `priority` or empty.
        attributes: span of leading `(* *)`, None without.
    """

    head: Span
    condition: Expr
    then: Statement
    other: Statement | None
    else_keyword: Span | None
    qualifier: str = ""
    attributes: Span | None = None

    def children(self) -> tuple[Statement, ...]:
        """Give the branches."""
        return (self.then, self.other) if self.other else (self.then,)


@dataclass(frozen=True)
class CaseItem:
    """Pair labels with a statement; `labels` is empty for `default`; `head` ends after the colon (if any)."""

    span: Span
    head: Span
    labels: tuple[Expr, ...]
    body: Statement

    @property
    def is_default(self) -> bool:
        """Say whether this is the default item."""
        return not self.labels


@dataclass(frozen=True)
class Case(Statement):
    """Select among items.

    Args:
        head: from the qualifier or keyword to the closing parenthesis (and `inside`); no attributes.
        keyword: `case`, `casez` or `casex`; `inside` says it is `case … inside`.
        tail: the `endcase` token.
        attribute_names: names in leading `(* *)` such as `full_case`, `parallel_case`.
    """

    head: Span
    keyword: str
    inside: bool
    selector: Expr
    items: tuple[CaseItem, ...]
    tail: Span
    qualifier: str = ""
    attributes: Span | None = None
    attribute_names: tuple[str, ...] = ()

    def children(self) -> tuple[Statement, ...]:
        """Give the bodies of all items."""
        return tuple(item.body for item in self.items)


@dataclass(frozen=True)
class Loop(Statement):
    """Repeat: a `for`, `foreach` or `repeat` with bounds known at elaboration.

    Args:
        head: from the keyword to the closing parenthesis.
        variables: loop variables declared in the head.
        outer_variables: loop variables declared elsewhere (`integer i;` of the module or block).
        reads: variables read by the head, loop variables excluded.
    """

    head: Span
    keyword: str
    variables: tuple[str, ...]
    outer_variables: tuple[str, ...]
    reads: frozenset[str]
    body: Statement

    def children(self) -> tuple[Statement, ...]:
        """Give the body."""
        return (self.body,)


@dataclass(frozen=True)
class Assign(Statement):
    """Write targets.

    Args:
        targets: one, or several for a concatenation.
        rhs: right-hand side; for `x += y`, `x++` the whole operation with x as an operand.
        blocking: `=` rather than `<=`.
        delay: `<= #1 …` (harmless in text), None without; an event control is Opaque.
    """

    targets: tuple[Target, ...]
    rhs: Expr
    blocking: bool
    delay: Span | None = None


@dataclass(frozen=True)
class Empty(Statement):
    """Do nothing: `;`."""


@dataclass(frozen=True)
class Opaque(Statement):
    """Stand for anything else: system tasks, task calls, waits, forks, assertions, `disable`, jumps.

    `what` names it for a message; `harmless` holds for immediate assertions and calls of
    $display-like tasks that write nothing (they must stay on the ungated clock, all the same).
    """

    what: str
    harmless: bool
    reads: frozenset[str] = frozenset()
    writes: tuple[Target, ...] = ()
