"""Formulas as text."""

from dataclasses import replace

import pytest

from rewriter.edit.formula import FormulaWriter, wrapped
from rewriter.edit.text import CannotEditError
from rewriter.model.expr import Conditional, Expr, Operation, Reference, Select
from rewriter.model.source import SourceText, Span
from rewriter.model.wake import Always, And, Atom, Formula, Never, Not, Or


class Texts:
    """Hand out expressions that stand one after another in one file."""

    def __init__(self) -> None:
        self.text = ""

    def span(self, text: str) -> Span:
        start = len(self.text)
        self.text += text + "\n"
        return Span("a.v", start, start + len(text.encode("latin-1")))

    def name(self, text: str, width: int = 1) -> Atom:
        return Atom(Reference(self.span(text), text, width, False, None, True, name=text))  # noqa: FBT003 (positional dataclass fields)

    def operation(self, text: str, operator: str, width: int = 1) -> Atom:
        return Atom(Operation(self.span(text), text, width, False, None, True, operator=operator))  # noqa: FBT003

    def select(self, text: str, width: int) -> Atom:
        return Atom(Select(self.span(text), text, width, False, None, True))  # noqa: FBT003

    def write(self, formula: Formula) -> str:
        return FormulaWriter({"a.v": SourceText("a.v", self.text.encode("latin-1"))}).write(formula)


def test_conditions_are_copied_and_joined() -> None:
    t = Texts()
    a, b, c = t.name("a"), t.name("b"), t.name("c")
    assert t.write(And((a, b, c))) == "a && b && c"
    assert t.write(Or((a, And((b, c))))) == "a || (b && c)"
    assert t.write(And((Or((a, b)), c))) == "(a || b) && c"
    assert t.write(Not(And((a, b)))) == "!(a && b)"
    assert t.write(And((Not(a), Not(Not(b))))) == "!a && b"
    assert t.write(Always()) == "1'b1"
    assert t.write(Never()) == "1'b0"


def test_brackets_stand_where_precedence_needs_them() -> None:
    # IEEE 1800-2017 table 11-2: && binds tighter than ||, both tighter than ?: and ->.
    t = Texts()
    either, both = t.operation("x || y", "||"), t.operation("x && y", "&&")
    implied, less = t.operation("x -> y", "->"), t.operation("x < y", "<")
    choice = Atom(Conditional(t.span("s ? x : y"), "", 1, False, None, True))  # noqa: FBT003
    a = t.name("a")
    assert t.write(And((a, either))) == "a && (x || y)"
    assert t.write(Or((a, either))) == "a || x || y"
    assert t.write(Or((a, both))) == "a || (x && y)"
    assert t.write(Or((a, implied))) == "a || (x -> y)"
    assert t.write(And((a, less))) == "a && x < y"
    assert t.write(Or((choice, a))) == "(s ? x : y) || a"
    assert t.write(choice) == "s ? x : y"
    assert t.write(Not(less)) == "!(x < y)"
    assert t.write(And((a, t.operation("(x) || (y)", "||")))) == "a && ((x) || (y))"
    assert t.write(And((a, t.operation("(x || y)", "||")))) == "a && (x || y)"
    assert t.write(And((a, t.operation('(s == "(") || (x == ")")', "||")))) == 'a && ((s == "(") || (x == ")"))'


def test_wide_conditions_are_reduced_and_never_widened() -> None:
    t = Texts()
    assert t.write(t.name("count", 4)) == "count != 0"
    assert t.write(t.select("count[3:1]", 3)) == "count[3:1] != 0"
    assert t.write(Not(t.name("count", 4))) == "count == 0"
    assert t.write(t.operation("a + b", "+", 4)) == "|(a + b)"
    assert t.write(Not(t.operation("a + b", "+", 4))) == "~|(a + b)"
    assert t.write(And((t.name("go"), t.operation("(a & b)", "&", 2)))) == "go && |(a & b)"


def test_conversions_without_text_are_looked_through() -> None:
    t = Texts()
    inner = t.name("count", 4).expr
    outer = Operation(inner.span, "", 4, False, None, True, operator="conversion", operands=(inner,))  # noqa: FBT003
    assert t.write(Atom(outer)) == "count != 0"


@pytest.mark.parametrize(
    "source, copy",
    [
        ("a  ==  b", "a  ==  b"),
        ("a &&\n        b", "a && b"),
        ("a && // why\r\n\tb /* twice\n over */ && c", "a && b && c"),
        ('s == "// no comment"', 's == "// no comment"'),
        ("\\odd+name ", "\\odd+name "),
        ("go && \\odd+name", "go && \\odd+name "),
    ],
)
def test_text_is_copied_without_comments_and_line_breaks(source: str, copy: str) -> None:
    t = Texts()
    assert t.write(t.operation(source, "&&")) == copy


def test_what_cannot_be_copied_is_refused() -> None:
    t = Texts()
    half: Expr = replace(t.name("a").expr, copyable=False)
    with pytest.raises(CannotEditError, match="not-copyable"):
        t.write(Atom(half))
    with pytest.raises(CannotEditError, match="directive"):
        t.write(t.operation("a\n`ifdef X\n && b\n`endif\n", "&&"))


def test_long_formulas_break_before_their_outermost_operators() -> None:
    terms = [f"(condition_{i} && other_{i})" for i in range(6)]
    lines = wrapped("wire wake =", " || ".join(terms), "    ")
    assert len(lines) == 2
    assert lines[1].startswith("    || (")
    assert " ".join(line.strip() for line in lines) == f"wire wake = {' || '.join(terms)};"
    assert max(len(line) for line in lines) <= 100
