"""What may stand as text beside the block it was written in."""

from collections.abc import Iterator

from rewriter.model.expr import Call, Constant, Expr, Opaque, Operation, Reference

# Functions of IEEE 1800 clause 20 that depend on nothing but their arguments.
_PURE_SYSTEM_FUNCTIONS = frozenset(
    (
        "$signed",
        "$unsigned",
        "$clog2",
        "$bits",
        "$countones",
        "$countbits",
        "$onehot",
        "$onehot0",
        "$size",
        "$left",
        "$right",
        "$high",
        "$low",
    )
)

# Operators that write their operand (IEEE 1800-2017, 11.4.1 and 11.4.2).
ASSIGNING = frozenset(("=", "+=", "-=", "*=", "/=", "%=", "&=", "|=", "^=", "<<=", ">>=", "<<<=", ">>>=", "++", "--"))


class CannotCopyError(Exception):
    """A condition cannot stand as text elsewhere; `word` is the reason, `expr` the condition (or None)."""

    def __init__(self, word: str, expr: Expr | None = None) -> None:
        super().__init__(word)
        self.word = word
        self.expr = expr


def check_condition(expr: Expr, *, wildcards: bool = False) -> None:
    """Refuse a condition whose text must not be copied beside the block.

    Args:
        expr: a condition, case selector or case label.
        wildcards: x and z are wildcards here (labels of casez, casex and `inside`).

    Raises:
        CannotCopyError: `not-copyable`, `x-in-wake`, `hierarchical-name`, `impure-call`, `hidden-read`.
    """
    if not expr.copyable or (expr.width == 0 and not wildcards):
        raise CannotCopyError("not-copyable", expr)
    patterns = {constant.span for node in expr.walk() for constant in _patterns(node)}
    for node in expr.walk():
        word = _obstacle(node, wildcards=wildcards or node.span in patterns)
        if word:
            raise CannotCopyError(word, expr)


def _patterns(node: Expr) -> Iterator[Expr]:
    """Yield the constants in which x and z are wildcards (IEEE 1800-2017, 11.4.6 and 11.4.13)."""
    if isinstance(node, Operation) and node.operator in ("inside", "==?", "!=?"):
        for operand in node.operands[1:]:
            yield from (inner for inner in operand.walk() if isinstance(inner, Constant))


def _obstacle(node: Expr, *, wildcards: bool) -> str:
    match node:
        case Opaque():
            return "not-copyable"
        case Constant(has_x=True):
            return "" if wildcards else "x-in-wake"
        case Reference(is_hierarchical=True):
            return "hierarchical-name"
        case Operation(operator=operator) if operator in ASSIGNING:
            return "impure-call"
        case Call(system=True):
            return "" if node.function in _PURE_SYSTEM_FUNCTIONS else "impure-call"
        case Call(pure=False):
            return "impure-call"
        case Call():
            return "hidden-read" if node.hidden_reads else ""
        case _:
            return ""
