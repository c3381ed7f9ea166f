"""Prune a statement tree: keep some assignments, and only the branches that lead to them."""

from collections.abc import Callable, Iterator
from dataclasses import dataclass, replace

from rewriter.model.expr import Constant, Expr
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Block, Case, CaseItem, Empty, If, Loop, Statement


@dataclass(frozen=True)
class Pruner:
    """Say what stays.

    Args:
        keep: for statements without branches (assignments, tasks).
        stands: empty statements that must stay (a macro that means something in another build).
        resets: branches of asynchronous resets; their `else` stays, since engines ask for one.
        holds: blocks that must stay though nothing in them is kept (text of macros and directives).

    Where a branch becomes empty, `unique`, `full_case` and the like go: the promise was made for all branches, and
    Yosys 0.70 drops empty items under `parallel_case`, so that their cases fall into the default.
    """

    keep: Callable[[Statement], bool]
    holds: Callable[[Block], bool] = lambda _: False
    stands: Callable[[Empty], bool] = lambda _: False
    resets: frozenset[Span] = frozenset()

    def prune(self, statement: Statement, *, else_follows: bool = False) -> Statement | None:
        """Give the statement without what is not kept; None when nothing is.

        Args:
            statement: the tree. The result's nodes have the spans of the original's.
            else_follows: an `else` comes next in the text, so an `else` of this statement's last `if`
                must not vanish: the other one would bind to that `if`.
        """
        match statement:
            case Block():
                body = tuple(kept for inner in statement.body if (kept := self.prune(inner)))
                return replace(statement, body=body) if body or self.holds(statement) else None
            case If():
                return self._if(statement, else_follows=else_follows)
            case Case():
                return self._case(statement)
            case Loop():
                body = self.prune(statement.body, else_follows=else_follows)
                return replace(statement, body=body) if body else None
            case Empty():
                return statement if self.stands(statement) else None
            case _:
                return statement if self.keep(statement) else None

    def _if(self, statement: If, *, else_follows: bool) -> If | None:
        other = self.prune(statement.other, else_follows=else_follows) if statement.other else None
        had_else = statement.other is not None
        # With both an `else` that goes and one that follows, `else ;` stays as a guard.
        guard = had_else and other is None and (else_follows or statement.then.span in self.resets)
        then = self.prune(statement.then, else_follows=had_else and (other is not None or guard))
        if then is None and other is None:
            return None
        if guard and statement.other:
            other = Empty(statement.other.span)
        kept = replace(statement, then=then or Empty(statement.then.span), other=other)
        return replace(kept, qualifier="") if _lost_branch(statement, kept) else kept

    def _case(self, statement: Case) -> Case | None:
        items = tuple(replace(item, body=self.prune(item.body) or Empty(item.body.span)) for item in statement.items)
        if all(self._idle(item) for item in items):
            return None
        needed = tuple(_needed_items(statement, items, self._idle))
        whole = all(self._idle(item) == self._idle(old) for item, old in zip(items, statement.items, strict=True))
        if whole and len(needed) == len(items):
            return replace(statement, items=items)
        return replace(statement, items=needed, qualifier="", attributes=None, attribute_names=())

    def _idle(self, item: CaseItem) -> bool:
        return isinstance(item.body, Empty) and not self.stands(item.body)


def _lost_branch(old: Statement, new: Statement | None) -> bool:
    """Say whether an `if` chain has a branch that became empty or went."""
    if not isinstance(old, If) or not isinstance(new, If):
        return not isinstance(old, Empty) and (new is None or isinstance(new, Empty))
    emptied = isinstance(new.then, Empty) and not isinstance(old.then, Empty)
    return emptied or (old.other is not None and _lost_branch(old.other, new.other))


def _needed_items(case: Case, items: tuple[CaseItem, ...], idle: Callable[[CaseItem], bool]) -> Iterator[CaseItem]:
    """Drop empty items whose selection cannot be told from selecting nothing."""
    default_lives = any(item.is_default and not idle(item) for item in items)
    last = max(i for i, item in enumerate(items) if not idle(item))
    literal = case.keyword == "case" and not case.inside and _distinct_literals(items)
    for i, item in enumerate(items):
        empty = idle(item) and not item.is_default
        if empty and not default_lives and (i > last or literal):
            continue
        yield item


def _distinct_literals(items: tuple[CaseItem, ...]) -> bool:
    labels: list[Expr] = [label for item in items for label in item.labels]
    values = [label.constant for label in labels if isinstance(label, Constant) and label.constant is not None]
    if len(values) < len(labels):
        return False
    mask = (1 << min((label.width for label in labels), default=1)) - 1
    return len({value & mask for value in values}) == len(labels)


def ends_open(statement: Statement) -> bool:
    """Say whether a following `else` would bind to this statement's last `if`."""
    match statement:
        case If(other=None):
            return True
        case If(other=other) if other is not None:
            return ends_open(other)
        case Loop():
            return ends_open(statement.body)
        case _:
            return False


def check_separate(statement: Statement) -> Span | None:
    """Find a statement whose text overlaps its neighbour's (both from one macro use)."""
    for inner in statement.walk():
        end = inner.span.start
        for child in inner.children():
            if child.span.start < end or not inner.span.covers(child.span) or child.span.file != inner.span.file:
                return child.span
            end = child.span.end
    return None


def assigns(statement: Statement) -> Iterator[Assign]:
    """Yield the assignments of a tree."""
    return (inner for inner in statement.walk() if isinstance(inner, Assign))
