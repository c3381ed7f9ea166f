"""Simplifying a formula never changes when it is true."""

import itertools

from hypothesis import given
from hypothesis import strategies as st

from rewriter.analysis import formula as f
from rewriter.model.expr import Reference
from rewriter.model.plan import Liveness
from rewriter.model.source import Span
from rewriter.model.wake import Always, And, Atom, Formula, Never, Not, Or

_NAMES = ("a", "b", "c", "d")


def atom(name: str, constant: int | None = None) -> Atom:
    return Atom(Reference(Span("t.sv", 0, 1), name, 1, signed=False, constant=constant, copyable=True, name=name))


def text(formula: Formula) -> str:
    return f.text(formula, lambda expr: expr.key)


def value(formula: Formula, bits: dict[str, bool]) -> bool:
    match formula:
        case Always():
            return True
        case Never():
            return False
        case Atom(expr):
            return bits[expr.key]
        case Not(operand):
            return not value(operand, bits)
        case And(operands):
            return all(value(o, bits) for o in operands)
        case Or(operands):
            return any(value(o, bits) for o in operands)


def assignments() -> list[dict[str, bool]]:
    return [dict(zip(_NAMES, row, strict=True)) for row in itertools.product((False, True), repeat=len(_NAMES))]


_formulas = st.recursive(
    st.one_of(st.sampled_from([atom(n) for n in _NAMES]), st.just(f.ALWAYS), st.just(f.NEVER)),
    lambda inner: st.one_of(
        st.builds(f.negate, inner),
        st.lists(inner, min_size=1, max_size=3).map(lambda terms: f.both(*terms)),
        st.lists(inner, min_size=1, max_size=3).map(lambda terms: f.either(*terms)),
    ),
    max_leaves=12,
)


@given(_formulas, _formulas)
def test_conjunction_and_disjunction_keep_their_meaning(left: Formula, right: Formula) -> None:
    for bits in assignments():
        assert value(f.both(left, right), bits) == (value(left, bits) and value(right, bits))
        assert value(f.either(left, right), bits) == (value(left, bits) or value(right, bits))
        assert value(f.negate(left), bits) is not value(left, bits)


@given(st.sampled_from(_NAMES), _formulas, _formulas)
def test_a_branch_is_true_when_the_taken_side_is(name: str, then: Formula, other: Formula) -> None:
    for bits in assignments():
        expected = value(then, bits) if bits[name] else value(other, bits)
        assert value(f.branch(atom(name), then, other), bits) == expected


def test_an_enable_behind_a_reset_reads_as_a_person_writes_it() -> None:
    rst, load = atom("rst"), atom("load")
    assert text(f.branch(rst, f.ALWAYS, f.branch(load, f.ALWAYS, f.NEVER))) == "rst || load"
    assert text(f.branch(rst, f.NEVER, f.branch(load, f.ALWAYS, f.NEVER))) == "!rst && load"


def test_repeated_and_absorbed_terms_go() -> None:
    a, b = atom("a"), atom("b")
    assert text(f.either(a, f.both(a, b))) == "a"
    assert text(f.either(a, a, b)) == "a || b"


def test_constants_decide_liveness_but_stay_in_the_text() -> None:
    on, off, en = atom("ON", 1), atom("OFF", 0), atom("en")
    assert f.liveness(f.both(on, en)) is Liveness.SOMETIMES
    assert f.liveness(f.either(on, en)) is Liveness.ALWAYS
    assert f.liveness(f.both(off, en)) is Liveness.NEVER
    assert text(f.both(on, en)) == "ON && en"
