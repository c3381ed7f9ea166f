"""Copies of a block's branches that compute when its registers wake."""

import re
from dataclasses import dataclass, replace
from functools import cached_property

from rewriter.edit.branches import Printer, repeated_leaves
from rewriter.edit.formula import FormulaWriter, wrapped
from rewriter.edit.names import Names, is_plain
from rewriter.edit.prune import Pruner, check_separate
from rewriter.edit.text import WIDTH, CannotEditError, Page, copied, indented, renamed, words
from rewriter.model.design import ClockedBlock, Language, Module, Variable
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Block, Case, If, LocalDeclaration, Loop, Statement
from rewriter.model.wake import Always, And, Atom, Formula, Leaf, Skeleton, WakeCondition

_INTEGRAL = re.compile(
    r"(?:(?:input|output|inout)\s+)?(?:wire|reg|logic|bit|tri)?\s*(?P<sign>signed|unsigned)?\s*(?P<dims>(?:\[.*\])?)\s*\Z",
    re.DOTALL,
)


@dataclass(frozen=True)
class SkeletonWriter:
    """Write the wake signal of one cell from the branches of one block.

    Args:
        page: file of the block.
        module, block: a body that holds the block.
        formulas: writes the conditions of leaves.
        name: stem of inserted names; the signal is `wake_NAME`.
        names: of the definition.
        step: one step of indentation.
    """

    page: Page
    module: Module
    block: ClockedBlock
    formulas: FormulaWriter
    wake: WakeCondition
    skeleton: Skeleton
    name: str
    names: Names
    step: str

    @property
    def signal(self) -> str:
        """Give the wake signal's name."""
        return f"wake_{self.name}"

    def lines(self, language: Language) -> list[str]:
        """Give the lines that declare and compute the wake signal, without indentation of the place.

        Raises:
            CannotEditError: `not-copyable`, `inside-macro`.
        """
        if (formula := self._as_formula(self._tree)) is not None:
            return wrapped(f"wire {self.signal} =", self.formulas.write(formula), self.step)
        return self._function() if language is Language.VERILOG else self._always_comb()

    @property
    def is_formula(self) -> bool:
        """Say whether so little is left of the branches that one expression says it."""
        return self._as_formula(self._tree) is not None

    def _as_formula(self, statement: Statement) -> Formula | None:
        """Read a formula off nested `if`s without `else` around one leaf."""
        if statement.span in self._leaves:
            return self._leaves[statement.span].condition or Always()
        if not isinstance(statement, If) or statement.other:
            return None
        inner = self._as_formula(statement.then)
        outer = Atom(statement.condition)
        return inner and (outer if isinstance(inner, Always) else And((outer, inner)))

    def _always_comb(self) -> list[str]:
        branches = self._branches(self.signal)
        locals_ = self._own_names(branches, [], "_t")
        declared = self._declared(branches)
        named = f" : {self.signal}_branches" if declared else ""
        body = [renamed(line, locals_) for line in (*declared, f"{self.signal} = 1'b0;", *branches)]
        return [f"logic {self.signal};", f"always_comb begin{named}", *indented(body, self.step), "end"]

    def _function(self) -> list[str]:
        function = f"{self.signal}_f"
        branches = self._branches(function)
        arguments = self._arguments(branches)
        inputs = self._own_names(branches, [a.name for a in arguments], "_i")
        declared = self._declared(branches)
        body = ["begin", *indented([f"{function} = 1'b0;", *branches], self.step), "end"]
        inside = [renamed(line, inputs) for line in (*declared, *body)]
        kinds = [(inputs.get(a.name, a.name), a.kind) for a in arguments]
        head = _broken(f"function {function} (", _grouped(kinds), ");", self.step)
        call = _broken(f"wire {self.signal} = {function}(", [a.passed for a in arguments], ");", self.step)
        return [*head, *indented(inside, self.step), "endfunction", *call]

    def _own_names(self, branches: list[str], passed: list[str], suffix: str) -> dict[str, str]:
        """Give the copy's variables names of their own; text of macros names the original's, so it forbids that."""
        if any("`" in line for line in branches):
            return {}
        lent = (_simple(path) for declaration in self._lent(branches) for path in declaration.names)
        return self.names.suffixed([*passed, *lent, *self._written(branches)], suffix)

    def _branches(self, target: str) -> list[str]:
        def label(block: Block) -> str:
            return f"{self.signal}_{block.span.start - self.block.span.start}"

        repeated = repeated_leaves(self._tree, self._leaves)
        printer = Printer(self.page, self._leaves, repeated, self.formulas, target, label, self.step)
        # The outermost block lends its declarations to the copy, so that its begin and end can go.
        opened = isinstance(self._tree, Block) and self._tree.span == self._synchronous.span
        parts = self._tree.children() if opened else (self._tree,)
        return [line for part in parts for line in printer.lines(part)]

    @property
    def _synchronous(self) -> Statement:
        if self.block.synchronous is None:
            raise CannotEditError("not-copyable", "the block has no synchronous part", self.block.span)
        return self.block.synchronous

    @cached_property
    def _tree(self) -> Statement:
        """Give the synchronous branches that lead to leaves or feed their conditions."""
        body = self._synchronous
        if overlap := check_separate(body):
            raise CannotEditError("inside-macro", "one macro makes several statements", overlap)
        pruned = Pruner(lambda s: s.span in self._leaves or self._feeds(s)).prune(body)
        if pruned is None:
            raise CannotEditError("not-copyable", "no branch of the block is left", self.block.span)
        return self._shortened(pruned)

    @cached_property
    def _leaves(self) -> dict[Span, Leaf]:
        return {leaf.statement: leaf for leaf in self.skeleton.leaves}

    def _feeds(self, statement: Statement) -> bool:
        return (
            isinstance(statement, Assign)
            and statement.blocking
            and any(target.variable in self.skeleton.temporaries for target in statement.targets)
        )

    def _wakes(self, statement: Statement) -> bool:
        """Say whether this statement wakes without a condition of its own."""
        return statement.span in self._leaves and self._leaves[statement.span].condition is None

    def _shortened(self, statement: Statement) -> Statement:
        """Leave out what no longer matters once the wake signal is 1 for sure, and brackets around one statement."""
        match statement:
            case Block():
                body = tuple(self._shortened(inner) for inner in statement.body)
                sure = next((inner for inner in body if self._wakes(inner)), None)
                if sure:
                    return sure
                alone = len(body) == 1 and not statement.declarations
                return body[0] if alone else replace(statement, body=body)
            case If():
                then = self._shortened(statement.then)
                other = self._shortened(statement.other) if statement.other else None
                return (
                    then
                    if other and self._wakes(then) and self._wakes(other)
                    else replace(statement, then=then, other=other)
                )
            case Case():
                items = tuple(replace(item, body=self._shortened(item.body)) for item in statement.items)
                return replace(statement, items=items)
            case Loop():
                return replace(statement, body=self._shortened(statement.body))
            case _:
                return statement

    def _lent(self, branches: list[str]) -> list[LocalDeclaration]:
        """Give the declarations of the outermost block, and of those around it, that the copy needs."""
        place, used = self._synchronous.span, words("\n".join(branches))
        around = (b for b in self.block.body.walk() if isinstance(b, Block) and b.span.covers(place))
        return [d for b in around for d in b.declarations if used & {_simple(path) for path in d.names}]

    def _declared(self, branches: list[str]) -> list[str]:
        """Declare what the outermost block declared, and the module's temporaries that the copy writes."""
        lent = [re.sub(r"\Aautomatic\s+(?!.*=)", "", copied(self.page.text(d.span))) for d in self._lent(branches)]
        return lent + self._temporaries(branches)

    def _temporaries(self, branches: list[str]) -> list[str]:
        """Declare the module's temporaries and loop variables that the copy writes."""
        return [local_declaration(self.module.variables.get(path), path) for path in self._written(branches).values()]

    def _written(self, branches: list[str]) -> dict[str, str]:
        """Give the variables of the module that the copy writes, by name."""
        used = words("\n".join(branches))
        blocks = (inner for inner in self.block.body.walk() if isinstance(inner, Block))
        local = {name for inner in blocks for declaration in inner.declarations for name in declaration.names}
        loops = (n for inner in self._tree.walk() if isinstance(inner, Loop) for n in inner.outer_variables)
        paths = {path for path in (*self.skeleton.temporaries, *loops) if _simple(path) in used and path not in local}
        found = {_simple(path): path for path in sorted(paths)}
        if len(found) < len(paths):
            raise CannotEditError("not-copyable", "two temporaries of one name are written", self.block.span)
        return found

    def _declared_at(self, path: str) -> tuple[str, int, str]:
        """Order variables as the text declares them."""
        variable = self.module.variables.get(path)
        return (variable.span.file, variable.span.start, path) if variable else ("", 0, path)

    def _arguments(self, branches: list[str]) -> list["_Argument"]:
        """Give an argument for every variable that the function reads."""
        used = words("\n".join(branches))
        found = {_simple(path): path for path in sorted(self.wake.reads)}
        if len(found) < len(self.wake.reads):
            raise CannotEditError("not-copyable", "two variables of one name are read", self.block.span)
        names = sorted(found, key=lambda name: self._declared_at(found[name]))
        macros = any("`" in line for line in branches)
        arguments = [
            _narrowed(name, _input(self.module.variables.get(found[name]), name), branches)
            for name in names
            if macros or name in used
        ]
        if not arguments:
            raise CannotEditError("not-copyable", "the branches read no variable", self.block.span)
        return arguments


def local_declaration(variable: Variable | None, path: str) -> str:
    """Declare a local variable like one of the module.

    Raises:
        CannotEditError: `not-copyable`, its type is not known.
    """
    name = _simple(path)
    if variable is None or variable.declaration is None:
        raise CannotEditError("not-copyable", f"the type of {name} is not known")
    kind = re.sub(r"\A(?:input|output|inout)\s+", "", copied(variable.declaration).strip())
    kind = re.sub(r"\A(?:var|wire)\b\s*", "", kind)
    if not kind or kind.startswith(("[", "signed", "unsigned")):
        kind = f"reg {kind}".rstrip()
    return f"{kind} {name}{' ' if variable.unpacked else ''}{variable.unpacked};"


def _simple(path: str) -> str:
    name = path.rsplit(".", 1)[-1]
    if not is_plain(name):
        raise CannotEditError("not-copyable", f"`{name}` has no plain name")
    return name


def _input(variable: Variable | None, name: str) -> str:
    """Give the type of a function's argument that stands for a variable: `` or `signed [7:0]` or `integer`."""
    if variable is None or variable.declaration is None or variable.unpacked:
        raise CannotEditError("not-copyable", f"{name} cannot be an argument of a function")
    text = copied(variable.declaration).strip()
    if text in ("integer", "time"):
        return text
    found = _INTEGRAL.match(text)
    if not found:
        raise CannotEditError("not-copyable", f"{name} cannot be an argument of a Verilog function: {text}")
    sign = "signed" if found["sign"] == "signed" else ""
    return " ".join(part for part in (sign, found["dims"].strip()) if part)


@dataclass(frozen=True)
class _Argument:
    """An argument of a function: its name, its type, and what is passed."""

    name: str
    kind: str
    passed: str


def _narrowed(name: str, kind: str, branches: list[str]) -> _Argument:
    """Pass only the bits that are read, under their own indices: lint tools complain about the others."""
    code = "\n".join(branches)
    uses = len(re.findall(rf"(?<![\w$`]){name}\b", code))
    selects = re.findall(rf"(?<![\w$`]){name}\s*\[\s*(\d+)\s*(?::\s*(\d+)\s*)?\]", code)
    if "`" in code or not re.fullmatch(r"(?:signed )?\[[^\[\]]*:\s*0\s*\]", kind) or not uses or len(selects) < uses:
        return _Argument(name, kind, name)
    bits = [int(index) for pair in selects for index in pair if index]
    part = f"[{max(bits)}:{min(bits)}]"
    return _Argument(name, kind, name) if kind == part else _Argument(name, part, f"{name}{part}")


def _grouped(arguments: list[tuple[str, str]]) -> list[str]:
    """Write arguments, neighbours of one type in one group: `input rst, arm`, `input [1:0] mode`."""
    texts: list[str] = []
    last: str | None = None
    for name, kind in arguments:
        texts.append(name if kind == last else " ".join(part for part in ("input", kind, name) if part))
        last = kind
    return texts


def _broken(head: str, items: list[str], tail: str, step: str) -> list[str]:
    """Write a list between brackets, on several lines if it is long."""
    lines = [head]
    for i, item in enumerate(items):
        text = item + (", " if i < len(items) - 1 else tail)
        if len(lines[-1]) + len(text) > WIDTH and lines[-1].strip():
            lines[-1] = lines[-1].rstrip()
            lines.append(step)
        lines[-1] += text
    return [line.rstrip() for line in lines]
