"""Find every place of a wake condition in rewritten text: operands, conditions, case labels, leaves.

The text is parsed by slang, so a place is what the language says it is; names come from the rewrite.
"""

# ruff: noqa: ANN401 - nodes of slang's syntax tree are of many types; which one says `kind`

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from enum import Enum
from typing import Any

from pyslang.syntax import SyntaxNode, SyntaxTree

from rewriter.model.rewrite import PlacedCell

_LOGICAL = {
    "LogicalAndExpression": "&&",
    "LogicalOrExpression": "||",
}


class Form(Enum):
    """What stands in a place, which decides how it can be wrong."""

    WAKE = "wake"  # the whole condition, at the pin of the cell
    AND = "operand of &&"
    OR = "operand of ||"
    IF = "condition of an if"
    TEST = "label of a case (1'b1)"  # a condition too
    LABEL = "case label"
    LEAF = "leaf"


@dataclass(frozen=True)
class Place:
    """One place of one wake condition.

    Args:
        definition: module it stands in.
        cell: instance of the gating cell, as written.
        form: what it is.
        start, end: bytes.
        context: the selector of a case label, the assigned name of a leaf.
    """

    definition: str
    cell: str
    form: Form
    start: int
    end: int
    context: str = ""


@dataclass(frozen=True)
class Text:
    """One rewritten file: its bytes, the places, and where each module's own declarations may begin."""

    data: bytes
    places: tuple[Place, ...]
    headers: tuple[int, ...]


def read_places(data: bytes, cells: Sequence[PlacedCell]) -> Text:
    """Find the places in one file.

    Args:
        data: the file.
        cells: the cells of the rewrite; those of other files are not met.
    """
    tree = SyntaxTree.fromText(data.decode("utf-8"))
    found: list[Place] = []
    headers: list[int] = []
    for module in _all(tree.root, "ModuleDeclaration"):
        name = module.header.name.valueText
        mine = [cell for cell in cells if cell.definition == name]
        if mine:
            headers.append(module.header.sourceRange.end.offset)
            found += _Module(data, module, mine).places()
    return Text(data, tuple(sorted(found, key=lambda place: (place.start, -place.end))), tuple(headers))


class _Module:
    def __init__(self, data: bytes, module: Any, cells: Sequence[PlacedCell]) -> None:
        self.data = data
        self.module = module
        self.cells = cells

    def places(self) -> Iterator[Place]:
        """Give all places of all cells."""
        for cell in self.cells:
            yield self._pin(cell)
            formulas, skeletons = self._formulas(cell), self._skeletons(cell)
            assert formulas or skeletons, f"no wake condition of {cell.instance} in the text"
            for formula in formulas:
                yield from self._operands(cell, formula)
            for name, skeleton in skeletons:
                yield from self._skeleton(cell, name, skeleton)

    def _pin(self, cell: PlacedCell) -> Place:
        for instance in _all(self.module, "HierarchicalInstance"):
            if instance.decl is not None and instance.decl.name.valueText == cell.instance:
                pins = {c.name.valueText: c.expr for c in instance.connections if hasattr(c, "expr")}
                return self._place(cell, Form.WAKE, pins["wake"])
        raise AssertionError(f"no cell {cell.instance} in the text")

    def _formulas(self, cell: PlacedCell) -> list[Any]:
        """Give the right sides of `wire wake = …`, calls of a skeleton function aside."""
        values = [
            declarator.initializer.expr
            for declarator in _all(self.module, "Declarator")
            if declarator.name.valueText == cell.wake and declarator.initializer is not None
        ]
        return [value for value in values if _kind(value) != "InvocationExpression"]

    def _skeletons(self, cell: PlacedCell) -> list[tuple[str, Any]]:
        function = f"{cell.wake}_f"
        found = [
            (function, item)
            for item in _all(self.module, "FunctionDeclaration")
            if str(item.prototype.name).strip() == function
        ]
        blocks = _all(self.module, "AlwaysCombBlock")
        return found + [(cell.wake, block) for block in blocks if self._leaves(cell.wake, block)]

    def _leaves(self, name: str, block: Any) -> list[Any]:
        return [
            assignment
            for assignment in _all(block, "AssignmentExpression")
            if str(assignment.left).strip() == name and str(assignment.right).strip() == "1'b1"
        ]

    def _skeleton(self, cell: PlacedCell, name: str, block: Any) -> Iterator[Place]:
        for leaf in self._leaves(name, block):
            yield self._place(cell, Form.LEAF, leaf, name)
        for statement in _all(block, "ConditionalStatement"):
            (condition,) = (part for part in statement.predicate.conditions if hasattr(part, "expr"))
            yield self._place(cell, Form.IF, condition.expr)
            yield from self._operands(cell, condition.expr)
        for statement in _all(block, "CaseStatement"):
            yield from self._labels(cell, statement)

    def _labels(self, cell: PlacedCell, statement: Any) -> Iterator[Place]:
        assert str(statement.caseKeyword).strip() == "case", "wild cards in labels: wrap them otherwise"
        assert not str(statement.uniqueOrPriority).strip(), "a promise of the case: wrap its labels otherwise"
        selector = self._text(statement.expr)
        form = Form.TEST if selector == "1'b1" else Form.LABEL
        for item in _nodes(statement.items):
            for label in _nodes(item.expressions) if _kind(item) == "StandardCaseItem" else ():
                yield self._place(cell, form, label, selector)
                if form is Form.TEST:
                    yield from self._operands(cell, label)

    def _operands(self, cell: PlacedCell, expression: Any) -> Iterator[Place]:
        """Give the operands of all `&&` and `||`; what stands below a `!` or in parentheses is met on the way."""
        operator = _LOGICAL.get(_kind(expression))
        if operator:
            for operand in (expression.left, expression.right):
                # `a && b && c` is three operands, not an operand `a && b` beside two.
                if _kind(operand) != _kind(expression):
                    yield self._place(cell, Form.AND if operator == "&&" else Form.OR, operand)
                yield from self._operands(cell, operand)
        elif _kind(expression) == "ParenthesizedExpression":
            yield from self._operands(cell, expression.expression)
        elif _kind(expression) == "UnaryLogicalNotExpression":
            yield from self._operands(cell, expression.operand)

    def _place(self, cell: PlacedCell, form: Form, node: Any, context: str = "") -> Place:
        where = node.sourceRange
        return Place(cell.definition, cell.instance, form, where.start.offset, where.end.offset, context)

    def _text(self, node: Any) -> str:
        return self.data[node.sourceRange.start.offset : node.sourceRange.end.offset].decode("utf-8")


def _nodes(parent: Any) -> Iterator[Any]:
    """Give the children that are nodes; tokens are left out."""
    for index in range(len(parent)):
        child = parent[index]
        if isinstance(child, SyntaxNode):
            yield child


def _kind(node: Any) -> str:
    return str(node.kind.name)


def _all(root: Any, kind: str) -> Iterator[Any]:
    """Give the nodes of a kind at any depth, the root included, in the order of the text."""
    if _kind(root) == kind:
        yield root
    for child in _nodes(root):
        yield from _all(child, kind)
