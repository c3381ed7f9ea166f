"""Wake conditions: a readable formula over source conditions, or a pruned copy of the block's branches."""

from dataclasses import dataclass

from rewriter.model.expr import Expr
from rewriter.model.source import Span


@dataclass(frozen=True)
class Always:
    """True in every cycle."""


@dataclass(frozen=True)
class Never:
    """False in every cycle."""


@dataclass(frozen=True)
class Atom:
    """A condition copied as source; true when it is not zero."""

    expr: Expr


@dataclass(frozen=True)
class Not:
    """Negation."""

    operand: "Formula"


@dataclass(frozen=True)
class And:
    """Conjunction, in source order."""

    operands: tuple["Formula", ...]


@dataclass(frozen=True)
class Or:
    """Disjunction, in source order."""

    operands: tuple["Formula", ...]


Formula = Always | Never | Atom | Not | And | Or


@dataclass(frozen=True)
class Leaf:
    """One assignment that wakes, in a copied skeleton; `condition` narrows it (`q <= en ? d : q`), None without."""

    statement: Span
    condition: Formula | None


@dataclass(frozen=True)
class Skeleton:
    """Wake by a pruned copy of the block's synchronous branches, each leaf turned into `wake = 1`.

    Args:
        leaves: assignments that wake.
        temporaries: variables assigned with `=` in the block whose values the copy needs.
    """

    leaves: tuple[Leaf, ...]
    temporaries: tuple[str, ...]


@dataclass(frozen=True)
class WakeCondition:
    """State when a register may change.

    Args:
        form: a formula, or a skeleton of the register's block.
        key: equal keys in one scope of one module body mean the same condition as written.
        reads: paths of variables read.
        text: one line for reports (source spelling; a skeleton is described by its branches).
    """

    form: Formula | Skeleton
    key: str
    reads: frozenset[str]
    text: str

    @property
    def always(self) -> bool:
        """Say whether it is true in every cycle."""
        return isinstance(self.form, Always)

    @property
    def never(self) -> bool:
        """Say whether it is false in every cycle."""
        return isinstance(self.form, Never)
