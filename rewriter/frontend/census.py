"""Census: bits that clocked blocks write, over all instances."""

from collections import defaultdict
from collections.abc import Iterator

from rewriter.frontend.exposed import read_before_written
from rewriter.model.design import ClockedBlock, Module
from rewriter.model.statement import Assign, If, Index, Opaque, Statement, Target


def count(module: Module, read_outside: frozenset[str]) -> tuple[int, int]:
    """Count one body's bits: (registers, arrays written by a variable index).

    Temporaries do not count, nor do bits that only branches write which these parameters never take.

    Args:
        module: the body.
        read_outside: variables written with `=` that something besides their block reads.
    """
    flops: defaultdict[str, set[int]] = defaultdict(set)
    arrays: dict[str, int] = {}
    for block in module.blocks:
        temporaries = blocking_only(block) - read_outside - read_before_written(block.body)
        for target in _written(block.body):
            variable = target.variable
            if variable in temporaries or target.is_local or variable not in module.variables:
                continue
            msb, lsb = target.bits
            if target.index is Index.VARIABLE and target.unpacked:
                arrays[variable] = module.variables[variable].width
            flops[variable].update(range(lsb, msb + 1))
    registers = sum(len(bits) for variable, bits in flops.items() if variable not in arrays)
    return registers, sum(arrays.values())


def blocking_only(block: ClockedBlock) -> frozenset[str]:
    """Give the variables that a block writes with `=` alone; loop variables are among them."""
    written: defaultdict[str, set[bool]] = defaultdict(set)
    for statement in block.body.walk():
        if isinstance(statement, Assign):
            for target in statement.targets:
                written[target.variable].add(statement.blocking)
    return frozenset(variable for variable, kinds in written.items() if kinds == {True})


def _written(body: Statement) -> Iterator[Target]:
    for statement in _live(body):
        if isinstance(statement, Assign):
            yield from statement.targets
        elif isinstance(statement, Opaque):
            yield from statement.writes


def _live(statement: Statement) -> Iterator[Statement]:
    yield statement
    taken: tuple[Statement | None, ...] = statement.children()
    if isinstance(statement, If) and statement.condition.constant is not None:
        taken = (statement.then if statement.condition.constant else statement.other,)
    for inner in taken:
        if inner is not None:
            yield from _live(inner)
