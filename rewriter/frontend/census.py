"""Census: bits that clocked blocks write, over all instances."""

from collections import defaultdict
from collections.abc import Iterator

from rewriter.model.design import Module
from rewriter.model.statement import Assign, If, Index, Statement


def count(module: Module) -> tuple[int, int]:
    """Count one body's bits: (registers, arrays written by a variable index).

    A variable that a block only writes with `=` is a temporary, and does not count; nor do bits
    that only branches write which these parameters never take.
    """
    flops: defaultdict[str, set[int]] = defaultdict(set)
    arrays: dict[str, int] = {}
    for block in module.blocks:
        for statement in _live(block.body):
            if not isinstance(statement, Assign) or statement.blocking:
                continue
            for target in statement.targets:
                msb, lsb = target.bits
                if target.index is Index.VARIABLE and target.unpacked:
                    arrays[target.variable] = module.variables[target.variable].width
                flops[target.variable].update(range(lsb, msb + 1))
    registers = sum(len(bits) for variable, bits in flops.items() if variable not in arrays)
    return registers, sum(arrays.values())


def _live(statement: Statement) -> Iterator[Statement]:
    yield statement
    taken: tuple[Statement | None, ...] = statement.children()
    if isinstance(statement, If) and statement.condition.constant is not None:
        taken = (statement.then if statement.condition.constant else statement.other,)
    for inner in taken:
        if inner is not None:
            yield from _live(inner)
