"""Wake formulas as text: conditions copied from the source, brackets only where precedence asks for them."""

from rewriter.edit.text import LEXEMES, WIDTH, CannotEditError, Page, copied
from rewriter.model.expr import Call, Concatenation, Conditional, Constant, Expr, Operation, Reference, Select
from rewriter.model.source import SourceText
from rewriter.model.wake import Always, And, Atom, Formula, Never, Not, Or

# Operators that bind no tighter than && (IEEE 1800-2017 table 11-2), and those that take brackets inside ||: the
# looser ones, and && since lint tools ask for them there.
_BRACKETS_IN_AND = frozenset({"||", "->", "<->"})
_BRACKETS_IN_OR = frozenset({"&&", "->", "<->"})


class FormulaWriter:
    """Write formulas over the texts that were read."""

    def __init__(self, texts: dict[str, SourceText]) -> None:
        self._texts = texts

    def write(self, formula: Formula) -> str:
        """Give a formula on one line.

        Raises:
            CannotEditError: `not-copyable`, a condition begins or ends inside a macro, or holds a directive.
        """
        match formula:
            case Always():
                return "1'b1"
            case Never():
                return "1'b0"
            case Atom(expr):
                return self._true(expr)
            case Not(Not(inner)):
                return self.write(inner)
            case Not(Atom(expr)):
                return self._false(expr)
            case Not(inner):
                return f"!({self.write(inner)})"
            case And(operands):
                return " && ".join(self._operand(operand, _BRACKETS_IN_AND, Or) for operand in operands)
            case Or(operands):
                return " || ".join(self._operand(operand, _BRACKETS_IN_OR, And) for operand in operands)

    def alternative(self, formula: Formula) -> str:
        """Give a formula that can stand after `||`."""
        return self._operand(formula, _BRACKETS_IN_OR, And)

    def _operand(self, formula: Formula, operators: frozenset[str], other: type[And | Or]) -> str:
        text = self.write(formula)
        if isinstance(formula, other) and len(formula.operands) > 1:
            return f"({text})"
        if isinstance(formula, Atom) and formula.expr.width == 1 and _needs_brackets(formula.expr, operators):
            return bracketed(text)
        return text

    def _true(self, expr: Expr) -> str:
        expr = _bare(expr)
        text = self._copy(expr)
        if expr.width == 1:
            return text
        # `!= 0` would widen the operands of an expression; a reduction leaves them alone.
        return f"{text} != 0" if isinstance(expr, (Reference, Select)) else f"|{bracketed(text)}"

    def _false(self, expr: Expr) -> str:
        expr = _bare(expr)
        text = self._copy(expr)
        if expr.width != 1:
            return f"{text} == 0" if isinstance(expr, (Reference, Select)) else f"~|{bracketed(text)}"
        return f"!{text}" if _is_primary(expr) else f"!{bracketed(text)}"

    def _copy(self, expr: Expr) -> str:
        if not expr.copyable:
            raise CannotEditError("not-copyable", "a condition begins or ends inside a macro", expr.span)
        try:
            return copied(Page(self._texts[expr.span.file]).text(expr.span))
        except CannotEditError as error:
            raise CannotEditError(error.word, error.detail, expr.span) from None


def bracketed(text: str) -> str:
    """Put brackets around a text that has none of its own around the whole."""
    if not text.startswith("("):
        return f"({text})"
    depth = 0
    for position, character in enumerate(_masked(text)):
        depth += (character == "(") - (character == ")")
        if depth == 0:
            return text if position == len(text.rstrip()) - 1 else f"({text})"
    return f"({text})"


def wrapped(head: str, formula: str, step: str) -> list[str]:
    """Write `head formula;`, broken before its outermost operators where it is too long for one line."""
    whole = f"{head} {formula};"
    if len(whole) <= WIDTH:
        return [whole]
    terms = _outermost(formula, " || ")
    if len(terms) == 1:
        terms = _outermost(formula, " && ")
    lines = [f"{head} {terms[0]}"]
    for term in terms[1:]:
        if len(lines[-1]) + len(term) < WIDTH:
            lines[-1] += term
        else:
            lines.append(step + term.lstrip())
    lines[-1] += ";"
    return lines


def _outermost(text: str, operator: str) -> list[str]:
    """Split before every operator that stands outside brackets; the operator leads its term."""
    terms: list[str] = []
    depth = start = 0
    masked = _masked(text)
    for position, character in enumerate(masked):
        depth += (character in "([{") - (character in ")]}")
        if depth == 0 and position > start and masked.startswith(operator, position):
            terms.append(text[start:position])
            start = position
    return [*terms, text[start:]]


def _masked(text: str) -> str:
    """Blank out strings and escaped names, whose brackets do not count."""
    return LEXEMES.sub(lambda found: " " * len(found[0]), text)


def _bare(expr: Expr) -> Expr:
    """Look through implicit conversions, which have no text of their own."""
    while isinstance(expr, Operation) and expr.operator == "conversion" and len(expr.operands) == 1:
        if expr.operands[0].span != expr.span or expr.operands[0].width != expr.width:
            break
        expr = expr.operands[0]
    return expr


def _needs_brackets(expr: Expr, operators: frozenset[str]) -> bool:
    expr = _bare(expr)
    return isinstance(expr, Conditional) or (isinstance(expr, Operation) and expr.operator in operators)


def _is_primary(expr: Expr) -> bool:
    return isinstance(expr, (Reference, Select, Concatenation, Constant, Call))
