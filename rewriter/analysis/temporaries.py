"""Variables that a clocked block writes with `=`: temporaries, when every read comes after a write."""

from dataclasses import dataclass

from rewriter.model.design import ClockedBlock, Design, Module
from rewriter.model.expr import Expr
from rewriter.model.statement import Assign, Block, Case, If, Index, Loop, Opaque, Statement, Target


@dataclass(frozen=True)
class Temporaries:
    """What a block writes with blocking assignment.

    Args:
        names: all such variables, loop variables excluded.
        local: those declared inside the block.
        holding: those that may be read before they are written, so that they hold state.
    """

    names: frozenset[str]
    local: frozenset[str]
    holding: frozenset[str]


def find(block: ClockedBlock, module: Module) -> Temporaries:
    """Classify the variables that the block writes with blocking assignment."""
    loop_variables = loop_names(block.body)
    targets = [
        target
        for statement, _ in block.body.family
        if isinstance(statement, Assign) and statement.blocking
        for target in statement.targets
        if target.variable not in loop_variables
    ]
    names = frozenset(target.variable for target in targets)
    local = frozenset(target.variable for target in targets if target.is_local)
    walker = _Walker(names, module)
    walker.statement(block.body, frozenset())
    return Temporaries(names, local, frozenset(walker.holding))


def loop_names(statement: Statement) -> frozenset[str]:
    """Give every loop variable of the statement, wherever it is declared."""
    return frozenset(
        name
        for inner, _ in statement.family
        if isinstance(inner, Loop)
        for name in (*inner.variables, *inner.outer_variables)
    )


class _Walker:
    """Follow the branches in order and note temporaries that are read before a whole write."""

    def __init__(self, names: frozenset[str], module: Module) -> None:
        self.names = names
        self.module = module
        self.holding: set[str] = set()

    def read(self, names: frozenset[str], written: frozenset[str]) -> None:
        self.holding |= (names & self.names) - written

    def statement(self, statement: Statement, written: frozenset[str]) -> frozenset[str]:
        """Give the temporaries that are certainly written after the statement."""
        match statement:
            case Assign():
                return self.assign(statement, written)
            case Block():
                for inner in statement.body:
                    written = self.statement(inner, written)
                return written
            case If():
                self.read(statement.condition.reads(), written)
                then = self.statement(statement.then, written)
                other = self.statement(statement.other, written) if statement.other else written
                return then & other
            case Case():
                return self.case(statement, written)
            case Loop():
                self.read(statement.reads, written)
                self.statement(statement.body, written)  # it may run no time at all
                return written
            case Opaque():
                self.read(statement.reads, written)
                return written
            case _:
                return written

    def assign(self, statement: Assign, written: frozenset[str]) -> frozenset[str]:
        self.read(statement.rhs.reads(), written)
        for target in statement.targets:
            self.read(_index_reads(target), written)
        if not statement.blocking:
            return written
        whole = frozenset(t.variable for t in statement.targets if self.covers(t))
        # A write of a part reads the rest, as far as later reads of the whole are concerned.
        parts = frozenset(t.variable for t in statement.targets) & self.names - whole
        self.read(parts, written)
        return written | (whole & self.names)

    def covers(self, target: Target) -> bool:
        variable = self.module.variables.get(target.variable)
        if target.index is not Index.CONSTANT or target.unpacked:
            return False
        if variable is None:
            return not target.indices and target.bits[1] == 0
        return target.bits == (variable.width - 1, 0)

    def case(self, statement: Case, written: frozenset[str]) -> frozenset[str]:
        labels: list[Expr] = [label for item in statement.items for label in item.labels]
        self.read(frozenset[str]().union(statement.selector.reads(), *(e.reads() for e in labels)), written)
        after = [self.statement(item.body, written) for item in statement.items]
        if not any(item.is_default for item in statement.items):
            after.append(written)
        return after[0].intersection(*after[1:]) if after else written


def _index_reads(target: Target) -> frozenset[str]:
    return frozenset[str]().union(*(index.reads() for index in target.indices))


def all_of(design: Design) -> frozenset[tuple[str, str]]:
    """Give definition and plain name of everything that clocked blocks write with `=`, loop variables included."""
    return frozenset(
        (module.definition, name.rpartition(".")[2])
        for module in design.modules
        for block in module.blocks
        for name in find(block, module).names | loop_names(block.body)
    )
