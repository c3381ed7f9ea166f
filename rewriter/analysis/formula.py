"""Boolean formulas over source conditions: building, simplifying, folding with constants."""

import re
from collections.abc import Callable, Iterator

from rewriter.model.expr import Expr, Operation
from rewriter.model.plan import Liveness
from rewriter.model.wake import Always, And, Atom, Formula, Never, Not, Or

_NAME = re.compile(r"\w+(\[\w+\])*")

ALWAYS = Always()
NEVER = Never()


def both(*operands: Formula) -> Formula:
    """Conjoin, without repeats and neutral terms."""
    flat = _flatten(And, operands)
    if any(isinstance(term, Never) for term in flat):
        return NEVER
    terms = _distinct(term for term in flat if not isinstance(term, Always))
    if not terms:
        return ALWAYS
    return terms[0] if len(terms) == 1 else And(terms)


def either(*operands: Formula) -> Formula:
    """Disjoin, without repeats, neutral terms and what another term absorbs (`a || !a && b` is `a || b`)."""
    flat = _flatten(Or, operands)
    if any(isinstance(term, Always) for term in flat):
        return ALWAYS
    terms = _distinct(term for term in flat if not isinstance(term, Never))
    slim = _distinct(_without_absorbed(term, [t for t in terms if t is not term]) for term in terms)
    slim = tuple(term for term in slim if not isinstance(term, Never))
    if any(isinstance(term, Always) for term in slim):
        return ALWAYS
    if not slim:
        return NEVER
    return slim[0] if len(slim) == 1 else Or(slim)


def negate(operand: Formula) -> Formula:
    """Negate; double negations cancel."""
    match operand:
        case Always():
            return NEVER
        case Never():
            return ALWAYS
        case Not(inner):
            return inner
        case _:
            return Not(operand)


def condition(expr: Expr) -> Formula:
    """Make the formula of a source condition; a leading `!` becomes a negation, so that two of them cancel."""
    match expr:
        case Operation(operator="!", operands=(operand,)) if expr.copyable and operand.copyable and operand.width:
            return negate(condition(operand))
        case _:
            return Atom(expr)


def branch(condition: Formula, then: Formula, other: Formula) -> Formula:
    """Say when `if (condition) then else other` does its work, in the form a person would write."""
    if then == other:
        return then
    if isinstance(then, Always):
        return either(condition, other)
    if isinstance(other, Always):
        return either(negate(condition), then)
    return either(both(condition, then), both(negate(condition), other))


def fold(formula: Formula) -> Formula:
    """Replace conditions that are constant in this module body by their values."""
    match formula:
        case Atom(expr):
            return formula if expr.constant is None else (ALWAYS if expr.constant else NEVER)
        case Not(operand):
            return negate(fold(operand))
        case And(operands):
            return both(*(fold(o) for o in operands))
        case Or(operands):
            return either(*(fold(o) for o in operands))
        case _:
            return formula


def liveness(formula: Formula) -> Liveness:
    """Say how often a formula is true, as far as the constants of this module body tell."""
    match fold(formula):
        case Always():
            return Liveness.ALWAYS
        case Never():
            return Liveness.NEVER
        case _:
            return Liveness.SOMETIMES


def atoms(formula: Formula) -> Iterator[Expr]:
    """Yield the source conditions of a formula, left to right."""
    match formula:
        case Atom(expr):
            yield expr
        case Not(operand):
            yield from atoms(operand)
        case And(operands) | Or(operands):
            for operand in operands:
                yield from atoms(operand)
        case _:
            return


def key(formula: Formula) -> str:
    """Give the canonical text of a formula: equal texts mean equal conditions as written."""
    match formula:
        case Atom(expr):
            return f"({expr.key})"
        case Not(operand):
            return f"!{key(operand)}"
        case And(operands):
            return "(" + "&&".join(key(o) for o in operands) + ")"
        case Or(operands):
            return "(" + "||".join(key(o) for o in operands) + ")"
        case Always():
            return "1"
        case Never():
            return "0"


def text(formula: Formula, spell: Callable[[Expr], str]) -> str:
    """Format a formula for one line of a report; `spell` gives the text of a condition."""
    match formula:
        case Atom(expr):
            return spell(expr)
        case Not(operand):
            inner = text(operand, spell)
            return f"!{inner}" if _NAME.fullmatch(inner) else f"!({inner})"
        case And(operands):
            return " && ".join(_grouped(o, Or, text(o, spell)) for o in operands)
        case Or(operands):
            return " || ".join(_grouped(o, And, text(o, spell)) for o in operands)
        case Always():
            return "always"
        case Never():
            return "never"


def _grouped(operand: Formula, kind: type[And] | type[Or], text: str) -> str:
    """Put an operand of the other connective in parentheses."""
    loose = isinstance(operand, Atom) and any(mark in text for mark in ("&&", "||", "?"))
    return f"({text})" if isinstance(operand, kind) or loose else text


def _flatten(kind: type[And] | type[Or], operands: tuple[Formula, ...]) -> list[Formula]:
    flat: list[Formula] = []
    for operand in operands:
        if isinstance(operand, kind):
            flat.extend(operand.operands)
        else:
            flat.append(operand)
    return flat


def _distinct(terms: Iterator[Formula] | list[Formula]) -> tuple[Formula, ...]:
    seen: dict[str, Formula] = {}
    for term in terms:
        seen.setdefault(key(term), term)
    return tuple(seen.values())


def _without_absorbed(term: Formula, others: list[Formula]) -> Formula:
    """Drop from a conjunction each factor whose negation is another term of the same disjunction."""
    if not isinstance(term, And):
        return term
    negated = {key(negate(other)) for other in others}
    other_keys = {key(other) for other in others}
    if any(key(factor) in other_keys for factor in term.operands):
        return NEVER  # a || a && b
    return both(*(factor for factor in term.operands if key(factor) not in negated))
