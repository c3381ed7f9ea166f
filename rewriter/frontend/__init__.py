"""Front end: RTL arguments in, the model's Design out; the only user of pyslang."""

import gc
import os
from collections import defaultdict
from collections.abc import Generator, Sequence
from contextlib import contextmanager

from rewriter.frontend.bodies import Body, by_definition, collect
from rewriter.frontend.boxes import black_boxes
from rewriter.frontend.clocking import EventPorts
from rewriter.frontend.declarations import Declarations
from rewriter.frontend.definitions import Definitions
from rewriter.frontend.drivers import LazyDrivers
from rewriter.frontend.elaboration import Elaboration, Parsed, parse
from rewriter.frontend.modules import Lowering
from rewriter.model.design import Design, Note
from rewriter.model.source import RtlSource

__all__ = ["elaborate", "open_up", "read"]


def read(arguments: Sequence[str], cwd: str | None = None) -> Design:
    """Read RTL as every flow names it: parse, elaborate, lower.

    Args:
        arguments: files and options of slang's driver.
        cwd: where relative paths start; the working folder by default.

    Raises:
        CompileError: the RTL does not compile; slang's own text.
        UserError: an argument is wrong.
    """
    return _lower(Elaboration(parse(arguments, os.path.abspath(cwd or os.curdir))))  # noqa: PTH100 (no links resolved)


def open_up(arguments: Sequence[str], cwd: str | None = None) -> RtlSource:
    """Open RTL arguments up: lists expanded, paths absolute, every file read; nothing is elaborated."""
    return parse(arguments, os.path.abspath(cwd or os.curdir)).source  # noqa: PTH100 (no links resolved)


def elaborate(source: RtlSource) -> Design:
    """Elaborate opened-up RTL; its texts count, not what stands on the disk."""
    return _lower(Elaboration(Parsed(source)))


@contextmanager
def _no_collection() -> Generator[None]:
    """Pause the collector: lowering makes many objects and no garbage, and each pass would walk them all."""
    enabled = gc.isenabled()
    gc.disable()
    try:
        yield
    finally:
        if enabled:
            gc.enable()


@_no_collection()
def _lower(elaboration: Elaboration) -> Design:
    source = elaboration.parsed.source
    texts = {text.path: text.data for text in source.texts}
    bodies = collect(elaboration.tops)
    lowering = Lowering(
        elaboration,
        texts,
        EventPorts(bodies),
        Declarations(elaboration.compilation, elaboration.locator, texts),
        LazyDrivers(elaboration, elaboration.analysis, elaboration.locator),
        _outside_references(bodies),
    )
    modules = tuple(lowering.module(body) for body in bodies.values())
    unknown = {box.definitionName: box for body in bodies.values() for box in body.unknown}
    boxes = black_boxes(bodies.values(), lowering.drivers, elaboration.analysis) if unknown else ()
    warnings = tuple(
        Note(
            f"module {name} is unknown and stays a black box",
            elaboration.place(box.location),
            "give its source, or a stub, if it matters",
        )
        for name, box in unknown.items()
    )
    tops = tuple(top.name for top in elaboration.tops)
    return Design(
        source=elaboration.with_tops(tops),
        top=",".join(tops),
        modules=modules,
        definitions=Definitions(elaboration, texts, by_definition(bodies)).all(),
        black_boxes=boxes,
        drivers=lowering.drivers,
        warnings=elaboration.warnings + warnings,
        flop_bits=lowering.flop_bits,
        array_bits=lowering.array_bits,
    )


def _outside_references(bodies: dict[str, Body]) -> dict[str, frozenset[str]]:
    """Collect, for every body, the names that other bodies reach by hierarchical path."""
    keys = {path: body.key for body in bodies.values() for path in body.instances}
    found: defaultdict[str, set[str]] = defaultdict(set)
    for body in bodies.values():
        for expression in body.hierarchical:
            path = expression.symbol.hierarchicalPath
            owner = _longest(path, keys)
            if owner and keys[owner] != body.key:
                found[keys[owner]].add(path[len(owner) + 1 :])
    return {key: frozenset(names) for key, names in found.items()}


def _longest(path: str, keys: dict[str, str]) -> str:
    """Give the longest instance path that a hierarchical name starts with."""
    while path and path not in keys:
        path = path.rpartition(".")[0]
    return path
