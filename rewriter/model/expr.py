"""Expressions: a small closed tree, lowered from the front end; every node knows its text.

`key` is equal for two expressions of one module body exactly when they read the same: tokens
joined without spacing, every identifier resolved to its symbol. `constant` is the value in this
body (an int, or None when unknown, not constant or holding x/z); it may be used to decide, never
to write text.
"""

from collections.abc import Iterator
from dataclasses import dataclass

from rewriter.model.source import Span


@dataclass(frozen=True)
class Expr:
    """Base of every node.

    Args:
        span: bytes in the file where the text stands (macro uses count as written).
        key: canonical text, see the module's docstring.
        width: bits; 0 when the type is not integral (such a condition is refused).
        signed: of the self-determined type.
        constant: value in this module body, or None.
        copyable: the span is exactly this expression, so its text may be copied elsewhere in the
            same scope; False when it begins or ends inside a macro body.
    """

    span: Span
    key: str
    width: int
    signed: bool
    constant: int | None
    copyable: bool

    def children(self) -> tuple["Expr", ...]:
        """Give the operands, in source order."""
        return ()

    def walk(self) -> Iterator["Expr"]:
        """Yield this node and all below, outermost first."""
        yield self
        for child in self.children():
            yield from child.walk()

    def reads(self) -> frozenset[str]:
        """Give the paths of all variables and nets read (hidden reads of calls included)."""
        names: set[str] = set()
        for node in self.walk():
            if isinstance(node, Reference) and not node.is_parameter:
                names.add(node.name)
            elif isinstance(node, Call):
                names |= node.hidden_reads
        return frozenset(names)


@dataclass(frozen=True)
class Reference(Expr):
    """Name a variable, net, parameter or enum value.

    Args:
        name: path within the module body: `q`, `gen[2].q`, `blk.tmp`; a hierarchical reference
            out of the module keeps its text.
        is_parameter: a parameter, localparam, genvar or enum value.
        is_local: declared inside the clocked block itself (or a loop variable of it).
        is_hierarchical: reaches outside its module body.
    """

    name: str = ""
    is_parameter: bool = False
    is_local: bool = False
    is_hierarchical: bool = False


@dataclass(frozen=True)
class Constant(Expr):
    """Hold a literal; `has_x` when it has x or z bits."""

    has_x: bool = False


@dataclass(frozen=True)
class Select(Expr):
    """Select a bit, part, element or member of `value`.

    Args:
        indices: index expressions (none for a member).
        bits: (msb, lsb) offsets into the whole flattened variable (0 is its last bit), or None
            when an index is not constant.
    """

    value: Expr | None = None
    indices: tuple[Expr, ...] = ()
    bits: tuple[int, int] | None = None

    def children(self) -> tuple[Expr, ...]:
        """Give the value and the indices."""
        return (*((self.value,) if self.value else ()), *self.indices)


@dataclass(frozen=True)
class Concatenation(Expr):
    """Join parts; a replication carries its count in `count`."""

    parts: tuple[Expr, ...] = ()
    count: int = 1

    def children(self) -> tuple[Expr, ...]:
        """Give the parts."""
        return self.parts


@dataclass(frozen=True)
class Conditional(Expr):
    """Choose: `condition ? then : other`."""

    condition: Expr | None = None
    then: Expr | None = None
    other: Expr | None = None

    def children(self) -> tuple[Expr, ...]:
        """Give condition, then, other."""
        return tuple(e for e in (self.condition, self.then, self.other) if e)


@dataclass(frozen=True)
class Operation(Expr):
    """Apply an operator; `operator` is its IEEE 1800 token (`&&`, `!`, `+`, `==`, `inside`, `cast`, `conversion`)."""

    operator: str = ""
    operands: tuple[Expr, ...] = ()

    def children(self) -> tuple[Expr, ...]:
        """Give the operands."""
        return self.operands


@dataclass(frozen=True)
class Call(Expr):
    """Call a function; `hidden_reads` are variables read that are no argument, `pure` says it has no side effect."""

    function: str = ""
    arguments: tuple[Expr, ...] = ()
    hidden_reads: frozenset[str] = frozenset()
    pure: bool = True
    system: bool = False

    def children(self) -> tuple[Expr, ...]:
        """Give the arguments."""
        return self.arguments


@dataclass(frozen=True)
class Opaque(Expr):
    """Stand for anything else; it is never copied or decided on. `kind` names the syntax, `operands` what it reads."""

    kind: str = ""
    operands: tuple[Expr, ...] = ()

    def children(self) -> tuple[Expr, ...]:
        """Give what it reads."""
        return self.operands
