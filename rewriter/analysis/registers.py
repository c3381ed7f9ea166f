"""Registers of a clocked block: the bits that are always written together."""

from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from functools import cached_property
from itertools import pairwise

import networkx as nx

from rewriter.model.design import ClockedBlock
from rewriter.model.plan import Part
from rewriter.model.source import SourceText, Span
from rewriter.model.statement import Assign, Index, Opaque, Target


@dataclass(frozen=True)
class Group:
    """Registers that one assignment or another ties together.

    Args:
        ranges: variable path -> (msb, lsb) pairs, disjoint and sorted.
        parts: the same in source form, for RegisterId.
        assigns: every non-blocking assignment to them, in source order, reset branches included.
        bits: width in this body.
        array: a word of an array is selected by a variable index.
    """

    ranges: tuple[tuple[str, tuple[int, int]], ...]
    parts: tuple[Part, ...]
    assigns: tuple[Assign, ...]
    bits: int
    array: bool

    @cached_property
    def spans(self) -> frozenset[Span]:
        """Give the places of the assignments."""
        return frozenset(a.span for a in self.assigns)

    @property
    def variables(self) -> frozenset[str]:
        """Give the paths of the variables."""
        return frozenset(name for name, _ in self.ranges)

    def writes(self, statement: Assign) -> bool:
        """Say whether the assignment writes this group."""
        return statement.span in self.spans and not statement.blocking


def source_form(path: str, scope: str) -> str:
    """Drop the generate indices of a path, for names that all copies of a block share.

    Only indices of the block's own generate scope and of its parents are dropped.
    """
    scopes = [scope[: i + 1] for i, c in enumerate(scope) if c == "."]
    for prefix in reversed(scopes):
        if path.startswith(prefix):
            return plain_scope(prefix) + path[len(prefix) :]
    return path


def plain_scope(scope: str) -> str:
    """Give a scope without generate indices: `gen[2].` becomes `gen.`."""
    return ".".join(piece.split("[", 1)[0] for piece in scope.split("."))


def groups(block: ClockedBlock, source: SourceText) -> tuple[Group, ...]:
    """Partition everything the block writes with `<=` into registers, in order of first writing."""
    assigns = [s for s in block.body.walk() if isinstance(s, Assign) and not s.blocking]
    graph: nx.Graph[tuple[str, tuple[int, int]]] = nx.Graph()
    for ranges in _tied(block, assigns):
        graph.add_nodes_from(ranges)
        graph.add_edges_from(pairwise(ranges))
    _tie_overlaps(graph)
    found = [_group(block, source, component, assigns) for component in nx.connected_components(graph)]
    return tuple(sorted(found, key=lambda g: g.assigns[0].span.start if g.assigns else block.span.end))


def _tied(block: ClockedBlock, assigns: Iterable[Assign]) -> Iterator[list[tuple[str, tuple[int, int]]]]:
    for statement in assigns:
        yield [(t.variable, t.bits) for t in statement.targets]
    for statement in block.body.walk():
        if isinstance(statement, Opaque):
            for target in statement.writes:
                yield [(target.variable, target.bits)]


def _tie_overlaps(graph: "nx.Graph[tuple[str, tuple[int, int]]]") -> None:
    """Connect ranges of one variable that overlap."""
    last: dict[str, tuple[str, tuple[int, int]]] = {}
    for node in sorted(graph.nodes, key=lambda n: (n[0], n[1][1], n[1][0])):
        name, (msb, lsb) = node
        previous = last.get(name)
        if previous and previous[1][0] >= lsb:
            graph.add_edge(previous, node)
        if not previous or msb > previous[1][0]:
            last[name] = node


def _group(
    block: ClockedBlock,
    source: SourceText,
    nodes: set[tuple[str, tuple[int, int]]],
    assigns: list[Assign],
) -> Group:
    ranges = tuple(sorted(_merged(nodes)))
    names = {name for name, _ in nodes}
    mine = tuple(a for a in assigns if any((t.variable, t.bits) in nodes for t in a.targets))
    written = [t for a in mine for t in a.targets if t.variable in names]
    order = {name: position for position, name in enumerate(dict.fromkeys(t.variable for t in written))}
    ordered = sorted(ranges, key=lambda r: (order.get(r[0], len(order)), r[0], -r[1][0]))
    parts = dict.fromkeys(
        p for name in dict.fromkeys(r[0] for r in ordered) for p in _parts(block, name, written, source)
    )
    return Group(
        ranges=tuple(ordered),
        parts=tuple(parts),
        assigns=mine,
        bits=sum(msb - lsb + 1 for _, (msb, lsb) in ranges),
        array=any(_variable_word(t) for t in written),
    )


def _variable_word(target: Target) -> bool:
    return target.unpacked and target.index is Index.VARIABLE


def _merged(nodes: Iterable[tuple[str, tuple[int, int]]]) -> list[tuple[str, tuple[int, int]]]:
    merged: list[tuple[str, tuple[int, int]]] = []
    for name, (msb, lsb) in sorted(nodes, key=lambda n: (n[0], n[1][1])):
        if merged and merged[-1][0] == name and merged[-1][1][0] >= lsb:
            merged[-1] = (name, (max(msb, merged[-1][1][0]), merged[-1][1][1]))
        else:
            merged.append((name, (msb, lsb)))
    return merged


def _parts(block: ClockedBlock, name: str, written: list[Target], source: SourceText) -> Iterator[Part]:
    """Name what is written of a variable as the source spells it, so that all copies of the block agree."""
    path = source_form(name, block.scope)
    targets = [t for t in written if t.variable == name]
    selects = [_select(t, source) for t in targets]
    if not targets or "" in selects or any(t.index is not Index.CONSTANT for t in targets):
        yield Part(path)
    else:
        yield from (Part(path, select) for select in dict.fromkeys(selects))


def _select(target: Target, source: SourceText) -> str:
    """Give what follows the variable in the text of a target, without spacing; empty for the whole, or in a macro."""
    text = "".join(source.slice(target.span).decode("latin-1").split())
    path = "".join(target.variable.split())
    while not text.startswith(path) and "." in path:
        path = path.split(".", 1)[1]  # a name is written as seen from its scope
    return text.removeprefix(path) if text.startswith(path) else ""
