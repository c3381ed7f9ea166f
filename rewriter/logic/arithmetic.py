"""Arithmetic on words of literals, least bit first; the results are as wide as the operands unless said."""

from collections.abc import Sequence

from rewriter.logic.aig import FALSE, TRUE, Aig, Lit


def _full_add(aig: Aig, a: Lit, b: Lit, carry: Lit) -> tuple[Lit, Lit]:
    half = aig.differ(a, b)
    return aig.differ(half, carry), aig.either(aig.both(a, b), aig.both(half, carry))


def add(aig: Aig, a: Sequence[Lit], b: Sequence[Lit], carry: Lit = FALSE) -> list[Lit]:
    """Add words of one width, modulo that width."""
    result: list[Lit] = []
    for x, y in zip(a, b, strict=True):
        total, carry = _full_add(aig, x, y, carry)
        result.append(total)
    return result


def subtract(aig: Aig, a: Sequence[Lit], b: Sequence[Lit]) -> list[Lit]:
    """Subtract words of one width, modulo that width."""
    return add(aig, a, [y ^ 1 for y in b], TRUE)


def negate(aig: Aig, a: Sequence[Lit]) -> list[Lit]:
    """Give the two's complement."""
    return subtract(aig, [FALSE] * len(a), a)


def multiply(aig: Aig, a: Sequence[Lit], b: Sequence[Lit]) -> list[Lit]:
    """Multiply words of one width, modulo that width."""
    width = len(a)
    result = [FALSE] * width
    for place, y in enumerate(b):
        if y != FALSE:
            row = [aig.both(x, y) for x in a[: width - place]]
            result[place:] = add(aig, result[place:], row)
    return result


def power(aig: Aig, a: Sequence[Lit], exponent: Sequence[Lit]) -> list[Lit]:
    """Raise to an unsigned exponent, modulo the width of `a`."""
    result = [TRUE, *[FALSE] * (len(a) - 1)] if a else []
    for bit in reversed(exponent):
        result = multiply(aig, result, result)
        times = multiply(aig, result, a)
        result = [aig.choose(bit, one, zero) for one, zero in zip(times, result, strict=True)]
    return result


def less(aig: Aig, a: Sequence[Lit], b: Sequence[Lit], *, signed: bool) -> Lit:
    """Tell whether a < b."""
    if signed and a:
        a, b = [*a[:-1], a[-1] ^ 1], [*b[:-1], b[-1] ^ 1]
    borrow = FALSE
    for x, y in zip(a, b, strict=True):
        borrow = aig.choose(aig.differ(x, y), y, borrow)
    return borrow


def divide(aig: Aig, a: Sequence[Lit], b: Sequence[Lit], *, signed: bool, floor: bool) -> tuple[list[Lit], list[Lit]]:
    """Divide words of one width; nothing is promised for a divisor of 0.

    Args:
        aig: the graph.
        a: dividend.
        b: divisor.
        signed: both are signed.
        floor: round towards minus infinity instead of towards 0.

    Returns:
        Quotient and remainder.
    """
    if not signed or not a:
        return _divide_unsigned(aig, a, b)
    minus_a, minus_b = a[-1], b[-1]
    quotient, rest = _divide_unsigned(aig, _flip(aig, minus_a, a), _flip(aig, minus_b, b))
    opposite = aig.differ(minus_a, minus_b)
    quotient, rest = _flip(aig, opposite, quotient), _flip(aig, minus_a, rest)
    if floor:
        fix = aig.both(opposite, aig.any_of(rest))
        quotient = add(aig, quotient, [fix] * len(a))
        rest = add(aig, rest, [aig.both(fix, y) for y in b])
    return quotient, rest


def _flip(aig: Aig, sign: Lit, a: Sequence[Lit]) -> list[Lit]:
    return [aig.choose(sign, one, zero) for one, zero in zip(negate(aig, a), a, strict=True)]


def _divide_unsigned(aig: Aig, a: Sequence[Lit], b: Sequence[Lit]) -> tuple[list[Lit], list[Lit]]:
    divisor = [*b, FALSE]
    rest = [FALSE] * len(divisor)
    quotient = [FALSE] * len(a)
    for place in reversed(range(len(a))):
        rest = [a[place], *rest[:-1]]
        fits = less(aig, rest, divisor, signed=False) ^ 1
        quotient[place] = fits
        rest = [aig.choose(fits, d, r) for d, r in zip(subtract(aig, rest, divisor), rest, strict=True)]
    return quotient, rest[:-1]


def shift_right(aig: Aig, a: Sequence[Lit], by: Sequence[Lit], fill: Lit) -> list[Lit]:
    """Shift towards the least bit by an unsigned amount."""
    return _shift(aig, a, by, fill, up=False)


def shift_left(aig: Aig, a: Sequence[Lit], by: Sequence[Lit], fill: Lit) -> list[Lit]:
    """Shift towards the greatest bit by an unsigned amount."""
    return _shift(aig, a, by, fill, up=True)


def _shift(aig: Aig, a: Sequence[Lit], by: Sequence[Lit], fill: Lit, *, up: bool) -> list[Lit]:
    result = list(a)
    width = len(result)
    for place, bit in enumerate(by):
        step = min(1 << place, width) if place < width.bit_length() else width
        pad = [fill] * step
        moved = pad + result[: width - step] if up else result[step:] + pad
        result = [aig.choose(bit, one, zero) for one, zero in zip(moved, result, strict=True)]
    return result
