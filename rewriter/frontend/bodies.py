"""Canonical bodies: one for each definition and set of parameters, with every instance that shares it."""

from collections import defaultdict
from collections.abc import Iterable
from dataclasses import dataclass, field

from pyslang.ast import (
    ExpressionKind,
    GenerateBlockSymbol,
    HierarchicalValueExpression,
    InstanceBodySymbol,
    InstanceSymbol,
    ProceduralBlockSymbol,
    SymbolKind,
    UninstantiatedDefSymbol,
    VisitAction,
)

from rewriter.frontend.elaboration import body_of


@dataclass
class Body:
    """Hold one canonical body and what stands in it, in source order.

    Args:
        key: hierarchical path.
        symbol: slang's body.
        procedures: procedural blocks of branches that are taken.
        children: instances, with their path relative to this body.
        unknown: instances without a definition.
        hierarchical: references by hierarchical name.
        instances: paths of all instances that share this body.
    """

    key: str
    symbol: InstanceBodySymbol
    procedures: list[ProceduralBlockSymbol] = field(default_factory=list[ProceduralBlockSymbol])
    children: list[tuple[str, InstanceSymbol]] = field(default_factory=list[tuple[str, InstanceSymbol]])
    unknown: list[UninstantiatedDefSymbol] = field(default_factory=list[UninstantiatedDefSymbol])
    hierarchical: list[HierarchicalValueExpression] = field(default_factory=list[HierarchicalValueExpression])
    instances: list[str] = field(default_factory=list[str])


def collect(tops: Iterable[InstanceSymbol]) -> dict[str, Body]:
    """Walk the hierarchy, each canonical body once.

    Args:
        tops: the top instances.

    Returns:
        Bodies by key; parents before children.
    """
    bodies: dict[str, Body] = {}
    waiting = [body_of(top) for top in tops]
    for top in waiting:
        bodies[top.hierarchicalPath] = Body(top.hierarchicalPath, top)
    for symbol in waiting:  # grows while it is walked
        body = bodies[symbol.hierarchicalPath]
        _fill(body)
        for _, child in body.children:
            inner = body_of(child)
            key = inner.hierarchicalPath
            if key not in bodies:
                bodies[key] = Body(key, inner)
                waiting.append(inner)
    for top in tops:
        _spread(top.hierarchicalPath, body_of(top).hierarchicalPath, bodies)
    return bodies


def _fill(body: Body) -> None:
    prefix = len(body.key)

    def instance(symbol: InstanceSymbol) -> VisitAction:
        body.children.append((symbol.hierarchicalPath[prefix:], symbol))
        return VisitAction.Skip

    def branch(symbol: GenerateBlockSymbol) -> VisitAction:
        return VisitAction.Skip if symbol.isUninstantiated else VisitAction.Advance

    body.symbol.visit(
        lookup_table={
            SymbolKind.Instance: instance,
            SymbolKind.GenerateBlock: branch,
            SymbolKind.ProceduralBlock: body.procedures.append,
            SymbolKind.UninstantiatedDef: body.unknown.append,
            ExpressionKind.HierarchicalValue: body.hierarchical.append,
        }
    )
    body.procedures.sort(key=_place)


def _place(block: ProceduralBlockSymbol) -> tuple[int, int, str]:
    return block.location.buffer.id, block.location.offset, block.hierarchicalPath


def _spread(path: str, key: str, bodies: dict[str, Body]) -> None:
    """Note an instance's path with its body, and those of everything below it."""
    body = bodies[key]
    body.instances.append(path)
    for relative, child in body.children:
        _spread(path + relative, body_of(child).hierarchicalPath, bodies)


def by_definition(bodies: dict[str, Body]) -> dict[str, list[Body]]:
    """Group bodies by the name of their definition."""
    groups: defaultdict[str, list[Body]] = defaultdict(list)
    for body in bodies.values():
        groups[body.symbol.definition.name].append(body)
    return groups
