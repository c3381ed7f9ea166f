"""The graph and the solver, against plain evaluation."""

import random
import time

import pytest

from rewriter.logic import arithmetic
from rewriter.logic.aig import FALSE, TRUE, Aig
from rewriter.logic.solver import Model, Solver


def solver(aig: Aig, seconds: float = 10.0) -> Solver:
    return Solver(aig, seconds, time.monotonic() + 60)


def random_graph(source: random.Random, aig: Aig, inputs: list[int], steps: int) -> list[int]:
    lits = [*inputs, FALSE, TRUE]
    for _ in range(steps):
        a, b, c = (source.choice(lits) ^ source.getrandbits(1) for _ in range(3))
        lits.append(source.choice((aig.both(a, b), aig.differ(a, b), aig.choose(a, b, c))))
    return lits


def test_simplified_nodes_keep_their_truth_table() -> None:
    """Every operator, simplified or not, against Python's own on all 16 patterns of four variables."""
    source = random.Random(1)  # noqa: S311 (stimulus, no secrets)
    for _ in range(200):
        aig = Aig()
        inputs = [aig.variable() for _ in range(4)]
        mask = (1 << 16) - 1
        patterns = [sum(((row >> place) & 1) << row for row in range(16)) for place in range(4)]
        values = {lit >> 1: pattern for lit, pattern in zip(inputs, patterns, strict=True)}
        table = {FALSE: 0, TRUE: mask} | dict(zip(inputs, patterns, strict=True))
        table |= {lit ^ 1: p ^ mask for lit, p in list(table.items())}
        for _ in range(30):
            a, b, c = (source.choice(list(table)) for _ in range(3))
            expected = {
                aig.both(a, b): table[a] & table[b],
                aig.either(a, b): table[a] | table[b],
                aig.differ(a, b): table[a] ^ table[b],
                aig.choose(a, b, c): table[a] & table[b] | (table[a] ^ mask) & table[c],
                aig.all_of((a, b, c)): table[a] & table[b] & table[c],
                aig.any_of((a, b, c)): table[a] | table[b] | table[c],
            }
            for lit, truth in expected.items():
                assert aig.simulate([lit], values, mask) == [truth]
                table[lit], table[lit ^ 1] = truth, truth ^ mask


def test_solver_agrees_with_exhaustive_evaluation() -> None:
    source = random.Random(2)  # noqa: S311 (stimulus, no secrets)
    for _ in range(60):
        aig = Aig()
        inputs = [aig.variable() for _ in range(6)]
        lits = random_graph(source, aig, inputs, 25)
        asked = [source.choice(lits) ^ source.getrandbits(1) for _ in range(2)]
        rows = 1 << 6
        patterns = {
            lit >> 1: sum(((row >> place) & 1) << row for row in range(rows)) for place, lit in enumerate(inputs)
        }
        truth = aig.simulate(asked, patterns, (1 << rows) - 1)
        answer = solver(aig).ask(asked)
        assert bool(answer) == bool(truth[0] & truth[1])
        if isinstance(answer, Model):
            assert aig.simulate(asked, answer.values()) == [1, 1]


def test_structure_is_shared() -> None:
    aig = Aig()
    a, b = aig.variable(), aig.variable()
    assert aig.both(a, b) == aig.both(b, a)
    assert aig.differ(a, b) == aig.differ(a ^ 1, b ^ 1) == aig.differ(a ^ 1, b) ^ 1
    assert aig.both(a, aig.both(a, b)) == aig.both(a, b)
    assert aig.choose(a, b, b) == b


def test_clauses_that_are_required_hold_in_every_answer() -> None:
    aig = Aig()
    a, b = aig.variable(), aig.variable()
    one = solver(aig)
    one.require((a ^ 1, b))
    assert one.ask([a, b ^ 1]) is False
    assert isinstance(one.ask([a, b]), Model)


def test_limit_gives_no_answer() -> None:
    """Commuted 16-bit products are a known hard question for SAT (common practice, no source)."""
    aig = Aig()
    a, b = ([aig.variable() for _ in range(16)] for _ in range(2))
    ab, ba = arithmetic.multiply(aig, a, b), arithmetic.multiply(aig, b, a)
    differs = aig.any_of(aig.differ(x, y) for x, y in zip(ab, ba, strict=True))
    start = time.monotonic()
    assert solver(aig, 0.5).ask([differs]) is None
    assert time.monotonic() - start < 20


@pytest.mark.parametrize("signed", [False, True])
def test_arithmetic_against_python(signed: bool) -> None:  # noqa: FBT001 (a parameter of the test)
    width = 5
    aig = Aig()
    a, b = ([aig.variable() for _ in range(width)] for _ in range(2))
    outcomes = {
        "add": arithmetic.add(aig, a, b),
        "subtract": arithmetic.subtract(aig, a, b),
        "multiply": arithmetic.multiply(aig, a, b),
        "less": [arithmetic.less(aig, a, b, signed=signed)],
    }
    for floor in (False, True):
        quotient, rest = arithmetic.divide(aig, a, b, signed=signed, floor=floor)
        outcomes |= {f"quotient{floor}": quotient, f"rest{floor}": rest}
    mask = (1 << width) - 1

    def number(raw: int) -> int:
        return raw - (1 << width) if signed and raw >> (width - 1) else raw

    for x in range(1 << width):
        for y in range(1, 1 << width):
            state = {lit >> 1: x >> i & 1 for i, lit in enumerate(a)} | {
                lit >> 1: y >> i & 1 for i, lit in enumerate(b)
            }
            m, n = number(x), number(y)
            truncated = abs(m) // abs(n) * (1 if (m < 0) == (n < 0) else -1)
            expected = {
                "add": m + n, "subtract": m - n, "multiply": m * n, "less": m < n,
                "quotientFalse": truncated, "restFalse": m - truncated * n, "quotientTrue": m // n, "restTrue": m % n,
            }  # fmt: skip
            for name, lits in outcomes.items():
                value = sum(v << i for i, v in enumerate(aig.simulate(lits, state)))
                assert value == expected[name] & (1 if name == "less" else mask), (name, m, n)
