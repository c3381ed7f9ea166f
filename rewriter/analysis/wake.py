"""When a register may change: the wake condition of a group of assignments, read off the branches."""

import re
from collections.abc import Iterable
from dataclasses import dataclass

from rewriter.analysis import branches
from rewriter.analysis import formula as f
from rewriter.analysis.copyable import CannotCopyError, check_condition
from rewriter.analysis.registers import Group, plain_scope
from rewriter.analysis.temporaries import Temporaries, loop_names
from rewriter.model.design import ClockedBlock
from rewriter.model.expr import Conditional, Expr, Operation, Reference, Select
from rewriter.model.plan import Liveness
from rewriter.model.source import SourceText
from rewriter.model.statement import Assign, Block, Case, If, Loop, Statement, Target
from rewriter.model.wake import Formula, Leaf, Skeleton, WakeCondition

_COMMENT = re.compile(r"//[^\n]*|/\*.*?\*/", re.DOTALL)

# A reviewer reads this much at a glance; longer conditions become a copy of the branches.
_MOST_ATOMS = 8
_MOST_CHARACTERS = 200


class _NeedsSkeletonError(Exception):
    """The branches are more than one readable expression can say."""


@dataclass(frozen=True)
class Wake:
    """The wake condition of a group.

    Args:
        condition: when it may change.
        liveness: how often that is true under this body's parameters.
        temporaries: variables that a copy of the block for this group alone must compute itself.
    """

    condition: WakeCondition
    liveness: Liveness
    temporaries: frozenset[str]


def wake_of(block: ClockedBlock, group: Group, temporaries: Temporaries, source: SourceText) -> Wake:
    """Derive the wake condition of a group from the synchronous part of its block.

    Raises:
        CannotCopyError: when the condition cannot be written beside the block.
    """
    reader = _Reader(block, group, temporaries, source)
    return Wake(reader.condition(), reader.liveness_of_block(), reader.needed())


class _Reader:
    """Read one group's assignments in one block."""

    def __init__(self, block: ClockedBlock, group: Group, temporaries: Temporaries, source: SourceText) -> None:
        self.block = block
        self.group = group
        self.temporaries = temporaries
        self.source = source
        self.loops = loop_names(block.body)
        # Only these statements matter to the group; big blocks hold few of them.
        self.mine = frozenset(id(s) for s in branches.around(block.body, group.writes))
        self.gate = block.clock.condition if block.clock else None  # `iff`

    def condition(self) -> WakeCondition:
        """Make the wake condition: a formula if a person can read it, else a skeleton."""
        body = self.block.synchronous
        if body is None:
            return self._as_formula(f.NEVER)
        try:
            form = self.formula(body)
            if self.gate is not None:
                form = f.both(self.atom(self.gate), form)
            _check_readable(form)
        except _NeedsSkeletonError:
            return self._as_skeleton(body)
        return self._as_formula(form)

    # formulas

    def formula(self, statement: Statement) -> Formula:
        """Read the condition off `if` trees; anything else asks for a skeleton."""
        if id(statement) not in self.mine:
            return f.NEVER
        match statement:
            case Assign():
                return self.written(statement)
            case Block():
                return f.either(*(self.formula(inner) for inner in statement.body))
            case If():
                then = self.formula(statement.then)
                other = self.formula(statement.other) if statement.other else f.NEVER
                return then if then == other else f.branch(self.atom(statement.condition), then, other)
            case Case() if self.wakes(statement):
                if self.always(statement):
                    return f.ALWAYS
                raise _NeedsSkeletonError
            case Loop() if self.wakes(statement):
                inner = self.formula(statement.body)
                if any(expr.reads() & self.loops for expr in f.atoms(inner)):
                    raise _NeedsSkeletonError
                return inner
            case _:
                return f.NEVER

    def atom(self, expr: Expr) -> Formula:
        """Make a condition, or say why it cannot be copied; values that move within the block need a skeleton."""
        if expr.reads() & self.temporaries.names or self.unseen_locals(expr):
            raise _NeedsSkeletonError
        check_condition(expr)
        return f.condition(expr)

    def unseen_locals(self, expr: Expr) -> bool:
        """Say whether an expression reads a variable of the block that only the block can see (loops apart)."""
        names = {node.name for node in expr.walk() if isinstance(node, Reference) and node.is_local}
        return bool(names - self.loops)

    def written(self, statement: Assign) -> Formula:
        """Say when an assignment writes something else than the register's own value; nothing is checked yet."""
        if len(statement.targets) != 1:
            return f.ALWAYS
        form = _changed(statement.rhs, statement.targets[0])
        if any(expr.reads() & self.temporaries.names for expr in f.atoms(form)):
            return f.ALWAYS  # the choice hangs on a temporary: waking on every write is sound
        return form

    def always(self, statement: Statement) -> bool:
        """Say whether every branch writes, whatever the values are."""
        match statement:
            case Assign():
                return self.group.writes(statement) and self.written(statement) == f.ALWAYS
            case Block():
                return any(self.always(inner) for inner in statement.body)
            case If():
                return statement.other is not None and self.always(statement.then) and self.always(statement.other)
            case Case():
                complete = any(item.is_default for item in statement.items)
                return complete and all(self.always(item.body) for item in statement.items)
            case _:
                return False

    def wakes(self, statement: Statement) -> bool:
        """Say whether some assignment below wakes the group."""
        if id(statement) not in self.mine:
            return False
        if isinstance(statement, Assign):
            return self.is_leaf(statement)
        return any(self.wakes(child) for child in statement.children())

    def is_leaf(self, statement: Assign) -> bool:
        """Say whether this assignment wakes the group."""
        return self.group.writes(statement) and self.written(statement) != f.NEVER

    def _as_formula(self, form: Formula) -> WakeCondition:
        for expr in f.atoms(form):
            check_condition(expr)
        reads = frozenset[str]().union(*(expr.reads() for expr in f.atoms(form)))
        key = f.key(form)
        for prefix in _scopes(self.block.scope):
            key = key.replace(prefix, plain_scope(prefix))
        return WakeCondition(form, key, reads, f.text(form, self.spell))

    def spell(self, expr: Expr) -> str:
        """Give the source text of a condition, on one line."""
        return " ".join(_COMMENT.sub(" ", self.source.slice(expr.span).decode("latin-1")).split())

    # skeletons

    def _as_skeleton(self, body: Statement) -> WakeCondition:
        if self.gate is not None:
            raise CannotCopyError("not-copyable", self.gate)
        kept = branches.around(body, self.is_leaf)
        leaves = tuple(self._leaf(s) for s in kept if isinstance(s, Assign))
        reads = branches.control_reads(kept)
        for leaf in leaves:
            reads |= frozenset[str]().union(*(e.reads() for e in f.atoms(leaf.condition or f.ALWAYS)))
        needed = branches.with_sources(body, reads, self.temporaries.names)
        if needed & self.temporaries.holding:
            raise CannotCopyError("temporary-holds")
        copied = branches.around(body, lambda a: self.is_leaf(a) or _writes_any(a, needed))
        self.check_branches(copied)
        return self._skeleton_condition(leaves, copied, needed)

    def check_branches(self, copied: tuple[Statement, ...]) -> None:
        """Refuse branches whose text cannot stand beside the block."""
        for expr in branches.conditions(copied):
            check_condition(expr)
        for expr, wildcards in branches.labels(copied):
            check_condition(expr, wildcards=wildcards)
        for statement in copied:
            if isinstance(statement, Assign) and statement.blocking:
                check_condition(statement.rhs)
        hidden = branches.local_reads(copied) - self.temporaries.names - self.loops
        if hidden:
            raise CannotCopyError("temporary-holds")

    def _leaf(self, statement: Assign) -> Leaf:
        changed = self.written(statement)
        for expr in f.atoms(changed):
            check_condition(expr)
        return Leaf(statement.span, None if changed == f.ALWAYS else changed)

    def _skeleton_condition(
        self, leaves: tuple[Leaf, ...], copied: tuple[Statement, ...], needed: frozenset[str]
    ) -> WakeCondition:
        reads = branches.control_reads(copied)
        for leaf in leaves:
            reads |= frozenset[str]().union(*(e.reads() for e in f.atoms(leaf.condition or f.ALWAYS)))
        for statement in copied:
            if isinstance(statement, Assign) and _writes_any(statement, needed):
                reads |= branches.value_reads(statement)
        declared = needed | branches.outer_loop_variables(copied)
        start = self.block.span
        places = ",".join(str(leaf.statement.start - start.start) for leaf in leaves)
        return WakeCondition(
            form=Skeleton(leaves, tuple(sorted(declared))),
            key=f"branches@{start.file}:{start.start}:{places}",
            reads=reads - self.loops - self.temporaries.names,
            text=f"in {len(leaves)} branches of its block" if len(leaves) != 1 else "in one branch of its block",
        )

    # what a split copy of the block needs

    def needed(self) -> frozenset[str]:
        """Give the temporaries and outer loop variables that a copy of the block for this group needs.

        Raises:
            CannotCopyError: `temporary-holds`.
        """
        kept = branches.around(self.block.body, self.group.writes)
        reads = branches.control_reads(kept)
        for statement in kept:
            if isinstance(statement, Assign):
                reads |= branches.value_reads(statement)
        needed = branches.with_sources(self.block.body, reads, self.temporaries.names)
        if needed & self.temporaries.holding:
            raise CannotCopyError("temporary-holds")
        copied = branches.around(self.block.body, lambda a: self.group.writes(a) or _writes_any(a, needed))
        return needed | branches.outer_loop_variables(copied)

    # how often

    def liveness_of_block(self) -> Liveness:
        """Say how often the group is written at the clock edge."""
        body = self.block.synchronous
        live = self.liveness(body) if body else Liveness.NEVER
        if self.gate is None or self.gate.constant:
            return live
        return Liveness.NEVER if self.gate.constant == 0 else _together([live, Liveness.NEVER])

    def liveness(self, statement: Statement) -> Liveness:
        """Say how often the group is written, as far as constants of this body tell."""
        if id(statement) not in self.mine:
            return Liveness.NEVER
        match statement:
            case Assign():
                return f.liveness(self.written(statement))
            case Block():
                return _in_sequence(self.liveness(inner) for inner in statement.body)
            case If():
                then = self.liveness(statement.then)
                other = self.liveness(statement.other) if statement.other else Liveness.NEVER
                if statement.condition.constant is not None:
                    return then if statement.condition.constant else other
                return _together([then, other])
            case Case():
                arms = [self.liveness(item.body) for item in statement.items]
                complete = any(item.is_default for item in statement.items)
                return _together(arms if complete else [*arms, Liveness.NEVER])
            case Loop():
                return self.liveness(statement.body)
            case _:
                return Liveness.NEVER


def _check_readable(form: Formula) -> None:
    exprs = list(f.atoms(form))
    if len(exprs) > _MOST_ATOMS or sum(len(e.key) for e in exprs) > _MOST_CHARACTERS:
        raise _NeedsSkeletonError


def _changed(rhs: Expr, target: Target) -> Formula:
    """Say when `rhs` is not just the target's own value."""
    if _is_itself(rhs, target):
        return f.NEVER
    if not isinstance(rhs, Conditional) or rhs.condition is None or rhs.then is None or rhs.other is None:
        return f.ALWAYS
    then, other = _changed(rhs.then, target), _changed(rhs.other, target)
    return then if then == other else f.branch(f.condition(rhs.condition), then, other)


def _is_itself(rhs: Expr, target: Target) -> bool:
    """Say whether an expression reads exactly what the target writes."""
    match rhs:
        case Reference(name=name):
            whole = rhs.width == target.bits[0] - target.bits[1] + 1
            return name == target.variable and whole and not target.indices
        case Select(bits=bits):
            return bits is not None and bits == target.bits and _root(rhs) == target.variable
        case Operation(operator="conversion", operands=(inner,)):
            return inner.width == rhs.width and _is_itself(inner, target)
        case _:
            return False


def _root(expr: Expr) -> str:
    while isinstance(expr, Select) and expr.value is not None:
        expr = expr.value
    return expr.name if isinstance(expr, Reference) else ""


def _writes_any(statement: Assign, names: frozenset[str]) -> bool:
    return statement.blocking and any(target.variable in names for target in statement.targets)


def _scopes(scope: str) -> list[str]:
    """Give a generate scope and its parents, innermost first: `a[1].b[2].`, `a[1].`."""
    return [scope[: i + 1] for i, c in reversed(list(enumerate(scope))) if c == "."]


def _in_sequence(values: Iterable[Liveness]) -> Liveness:
    found = set(values)
    if Liveness.ALWAYS in found:
        return Liveness.ALWAYS
    return Liveness.SOMETIMES if Liveness.SOMETIMES in found else Liveness.NEVER


def _together(values: list[Liveness]) -> Liveness:
    return values[0] if len(set(values)) == 1 else Liveness.SOMETIMES
