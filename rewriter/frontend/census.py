"""Census: bits that clocked blocks write, over all instances."""

from collections import defaultdict

from rewriter.model.design import Module
from rewriter.model.statement import Assign, Index


def count(module: Module) -> tuple[int, int]:
    """Count one body's bits: (registers, arrays written by a variable index).

    A variable that a block only writes with `=` is a temporary, and does not count.
    """
    flops: defaultdict[str, set[int]] = defaultdict(set)
    arrays: dict[str, int] = {}
    for block in module.blocks:
        for statement in block.body.walk():
            if not isinstance(statement, Assign) or statement.blocking:
                continue
            for target in statement.targets:
                msb, lsb = target.bits
                if target.index is Index.VARIABLE and target.unpacked:
                    arrays[target.variable] = module.variables[target.variable].width
                flops[target.variable].update(range(lsb, msb + 1))
    registers = sum(len(bits) for variable, bits in flops.items() if variable not in arrays)
    return registers, sum(arrays.values())
