"""Bit-level meaning of the engine's word-level cells, with unknown bits.

A word is two planes of literals, least bit first: the value, and whether it is unknown (x). Where a bit is
unknown its value plane means nothing. Operators treat x as IEEE 1800 does: logic is exact per bit, arithmetic
gives all x when any operand bit is x. A conditional with unknown select gives x where its branches differ.
"""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass

from rewriter.logic import arithmetic
from rewriter.logic.aig import FALSE, TRUE, Aig, Lit


@dataclass(frozen=True)
class Word:
    """Values and unknowns, least bit first."""

    value: tuple[Lit, ...]
    unknown: tuple[Lit, ...]

    def __len__(self) -> int:
        return len(self.value)

    @classmethod
    def known(cls, value: Sequence[Lit]) -> "Word":
        """Make a word without unknown bits."""
        return cls(tuple(value), (FALSE,) * len(value))

    @classmethod
    def x(cls, width: int) -> "Word":
        """Make a word of unknown bits."""
        return cls((FALSE,) * width, (TRUE,) * width)

    @property
    def surely_known(self) -> bool:
        """Tell whether no bit can be unknown."""
        return not any(self.unknown)


class UnsupportedCellError(Exception):
    """Report a cell type or form without a meaning here."""


Parameters = Mapping[str, int]
Bit = tuple[Lit, Lit]
"""One bit of a word: value and unknown."""


def bit_and(aig: Aig, a: Bit, b: Bit) -> Bit:
    """AND of two bits; a known 0 wins over x."""
    value = aig.both(a[0], b[0])
    if not a[1] | b[1]:
        return value, FALSE
    zero = aig.either(aig.both(a[0] ^ 1, a[1] ^ 1), aig.both(b[0] ^ 1, b[1] ^ 1))
    return value, aig.both(aig.either(a[1], b[1]), zero ^ 1)


def bit_or(aig: Aig, a: Bit, b: Bit) -> Bit:
    """OR of two bits; a known 1 wins over x."""
    value, unknown = bit_and(aig, (a[0] ^ 1, a[1]), (b[0] ^ 1, b[1]))
    return value ^ 1, unknown


def bit_xor(aig: Aig, a: Bit, b: Bit) -> Bit:
    """XOR of two bits."""
    return aig.differ(a[0], b[0]), aig.either(a[1], b[1])


def bit_mux(aig: Aig, select: Bit, one: Bit, zero: Bit) -> Bit:
    """Choose between two bits; an unknown select is harmless where both are known and equal."""
    value = aig.choose(select[0], one[0], zero[0])
    unknown = aig.choose(select[0], one[1], zero[1])
    if select[1] != FALSE:
        doubt = aig.any_of((one[1], zero[1], aig.differ(one[0], zero[0])))
        unknown = aig.choose(select[1], doubt, unknown)
    return value, unknown


def _bits(word: Word) -> list[Bit]:
    return list(zip(word.value, word.unknown, strict=True))


def _word(bits: Sequence[Bit]) -> Word:
    return Word(tuple(v for v, _ in bits), tuple(u for _, u in bits))


def extend(word: Word, width: int, *, signed: bool) -> Word:
    """Cut or extend to a width."""
    have = len(word)
    if width <= have:
        return Word(word.value[:width], word.unknown[:width])
    fill = (word.value[-1], word.unknown[-1]) if signed and have else (FALSE, FALSE)
    more = width - have
    return Word(word.value + (fill[0],) * more, word.unknown + (fill[1],) * more)


def _operands(p: Parameters, i: Mapping[str, Word], width: int) -> tuple[Word, Word]:
    signed = bool(p.get("A_SIGNED") and p.get("B_SIGNED"))
    return extend(i["A"], width, signed=signed), extend(i["B"], width, signed=signed)


def _fold(aig: Aig, op: Callable[[Aig, Bit, Bit], Bit], word: Word, empty: Lit) -> Bit:
    bits = _bits(word) or [(empty, FALSE)]
    while len(bits) > 1:
        odd = bits[-1:] if len(bits) % 2 else []
        bits = [op(aig, bits[k], bits[k + 1]) for k in range(0, len(bits) - 1, 2)] + odd
    return bits[0]


def _single(bit: Bit, width: int) -> Word:
    return extend(_word([bit]), width, signed=False)


def _not(bit: Bit) -> Bit:
    return bit[0] ^ 1, bit[1]


def _reduce(op: Callable[[Aig, Bit, Bit], Bit], empty: Lit, *, invert: bool = False) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        bit = _fold(aig, op, i["A"], empty)
        return _single(_not(bit) if invert else bit, p["Y_WIDTH"])

    return meaning


def _logic(op: Callable[[Aig, Bit, Bit], Bit]) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        a, b = (_fold(aig, bit_or, i[k], FALSE) for k in "AB")
        return _single(op(aig, a, b), p["Y_WIDTH"])

    return meaning


def _strict(aig: Aig, words: Sequence[Word], width: int, value: Sequence[Lit]) -> Word:
    """Make every bit of a result unknown where any operand bit is."""
    doubt = aig.any_of(u for word in words for u in word.unknown)
    return Word(tuple(value), (doubt,) * width)


def _arithmetic(function: Callable[[Aig, Sequence[Lit], Sequence[Lit]], Sequence[Lit]]) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        width = p["Y_WIDTH"]
        a, b = _operands(p, i, width)
        # The operands are cut to the result, but an x above it makes the whole result x all the same.
        return _strict(aig, (i["A"], i["B"]), width, function(aig, a.value, b.value))

    return meaning


def _negate(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
    width = p["Y_WIDTH"]
    a = extend(i["A"], width, signed=bool(p["A_SIGNED"]))
    return _strict(aig, (i["A"],), width, arithmetic.negate(aig, a.value))


def _divide(*, remainder: bool, floor: bool) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        width = max(p["A_WIDTH"], p["B_WIDTH"], p["Y_WIDTH"])
        a, b = _operands(p, i, width)
        signed = bool(p["A_SIGNED"] and p["B_SIGNED"])
        quotient, rest = arithmetic.divide(aig, a.value, b.value, signed=signed, floor=floor)
        word = _strict(aig, (i["A"], i["B"]), p["Y_WIDTH"], (rest if remainder else quotient)[: p["Y_WIDTH"]])
        by_zero = aig.any_of(b.value) ^ 1
        return Word(word.value, tuple(aig.either(u, by_zero) for u in word.unknown))

    return meaning


def _power(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
    if p["B_SIGNED"] and i["B"].value[-1] != FALSE:
        raise UnsupportedCellError("a power with a signed exponent")
    width = p["Y_WIDTH"]
    a = extend(i["A"], width, signed=bool(p["A_SIGNED"]))
    return _strict(aig, (i["A"], i["B"]), width, arithmetic.power(aig, a.value, i["B"].value))


def _compare(*, orequal: bool, swap: bool) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        a, b = _operands(p, i, max(p["A_WIDTH"], p["B_WIDTH"]))
        x, y = (b.value, a.value) if swap else (a.value, b.value)
        signed = bool(p["A_SIGNED"] and p["B_SIGNED"])
        result = arithmetic.less(aig, y, x, signed=signed) ^ 1 if orequal else arithmetic.less(aig, x, y, signed=signed)
        doubt = aig.any_of(a.unknown + b.unknown)
        return _single((result, doubt), p["Y_WIDTH"])

    return meaning


def _equal(*, invert: bool) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        a, b = _operands(p, i, max(p["A_WIDTH"], p["B_WIDTH"]))
        same = _word([_not(bit_xor(aig, u, v)) for u, v in zip(_bits(a), _bits(b), strict=True)])
        bit = _fold(aig, bit_and, same, TRUE)  # a known difference wins over x
        return _single(_not(bit) if invert else bit, p["Y_WIDTH"])

    return meaning


def _case_equal(*, invert: bool) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        a, b = _operands(p, i, max(p["A_WIDTH"], p["B_WIDTH"]))
        same = aig.all_of(
            aig.both(aig.differ(ua, ub) ^ 1, aig.either(ua, aig.differ(va, vb) ^ 1))
            for (va, ua), (vb, ub) in zip(_bits(a), _bits(b), strict=True)
        )
        return _single((same ^ invert, FALSE), p["Y_WIDTH"])

    return meaning


def _shift(*, left: bool, arithmetic_right: bool = False) -> "Meaning":
    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        width, signed = p["Y_WIDTH"], bool(p["A_SIGNED"])
        a = extend(i["A"], max(width, len(i["A"])) if not left else width, signed=signed)
        fill = (a.value[-1], a.unknown[-1]) if arithmetic_right and signed and len(a) else (FALSE, FALSE)
        by = i["B"]
        move = arithmetic.shift_left if left else arithmetic.shift_right
        value = move(aig, a.value, by.value, fill[0])[:width]
        doubt = aig.any_of(by.unknown)
        unknown = (FALSE,) * len(a) if a.surely_known else move(aig, a.unknown, by.value, fill[1])
        return Word(tuple(value), tuple(aig.either(u, doubt) for u in unknown[:width]))

    return meaning


def _shift_either(*, outside: Lit) -> "Meaning":
    """$shift (outside reads 0) and $shiftx (outside reads x); a negative amount goes left."""

    def meaning(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
        width = p["Y_WIDTH"]
        a = extend(i["A"], max(width, len(i["A"])), signed=bool(p["A_SIGNED"]) and not outside)
        unknown = a.unknown[: len(i["A"])] + (TRUE,) * (len(a) - len(i["A"])) if outside else a.unknown
        by = i["B"].value
        planes = ((a.value, FALSE), (unknown, outside))
        moved = [arithmetic.shift_right(aig, plane, by, fill) for plane, fill in planes]
        if p["B_SIGNED"] and by:
            back = arithmetic.negate(aig, by)
            left = [arithmetic.shift_left(aig, plane, back, fill) for plane, fill in planes]
            moved = [
                [aig.choose(by[-1], one, zero) for one, zero in zip(up, down, strict=True)]
                for up, down in zip(left, moved, strict=True)
            ]
        doubt = aig.any_of(i["B"].unknown)
        return Word(tuple(moved[0][:width]), tuple(aig.either(u, doubt) for u in moved[1][:width]))

    return meaning


def _table(aig: Aig, p: Parameters, i: Mapping[str, Word]) -> Word:
    """$bmux: word S of the concatenation A."""
    width = p["WIDTH"]
    bits = _bits(i["A"])
    for select in _bits(i["S"]):
        chunks = [bits[k : k + width] for k in range(0, len(bits), width)]
        bits = [
            bit_mux(aig, select, one, zero)
            for pair in range(0, len(chunks), 2)
            for zero, one in zip(chunks[pair], chunks[pair + 1], strict=True)
        ]
    return _word(bits)


def _spread(aig: Aig, _: Parameters, i: Mapping[str, Word]) -> Word:
    """$demux: A at place S, 0 elsewhere."""
    places: list[Bit] = [(TRUE, FALSE)]
    for select in _bits(i["S"]):
        places = [bit_and(aig, place, _not(select)) for place in places] + [
            bit_and(aig, place, select) for place in places
        ]
    return _word([bit_and(aig, place, a) for place in places for a in _bits(i["A"])])


Meaning = Callable[[Aig, Parameters, Mapping[str, Word]], Word]

WHOLE: dict[str, Meaning] = {
    "$neg": _negate,
    "$reduce_and": _reduce(bit_and, TRUE),
    "$reduce_or": _reduce(bit_or, FALSE),
    "$reduce_bool": _reduce(bit_or, FALSE),
    "$reduce_xor": _reduce(bit_xor, FALSE),
    "$reduce_xnor": _reduce(bit_xor, FALSE, invert=True),
    "$logic_not": _reduce(bit_or, FALSE, invert=True),
    "$logic_and": _logic(bit_and),
    "$logic_or": _logic(bit_or),
    "$add": _arithmetic(arithmetic.add),
    "$sub": _arithmetic(arithmetic.subtract),
    "$mul": _arithmetic(arithmetic.multiply),
    "$div": _divide(remainder=False, floor=False),
    "$mod": _divide(remainder=True, floor=False),
    "$divfloor": _divide(remainder=False, floor=True),
    "$modfloor": _divide(remainder=True, floor=True),
    "$pow": _power,
    "$lt": _compare(orequal=False, swap=False),
    "$le": _compare(orequal=True, swap=False),
    "$gt": _compare(orequal=False, swap=True),
    "$ge": _compare(orequal=True, swap=True),
    "$eq": _equal(invert=False),
    "$ne": _equal(invert=True),
    "$eqx": _case_equal(invert=False),
    "$nex": _case_equal(invert=True),
    "$shl": _shift(left=True),
    "$sshl": _shift(left=True),
    "$shr": _shift(left=False),
    "$sshr": _shift(left=False, arithmetic_right=True),
    "$shift": _shift_either(outside=FALSE),
    "$shiftx": _shift_either(outside=TRUE),
    "$bmux": _table,
    "$demux": _spread,
}
"""Cells whose every output bit may depend on every input bit."""

LANES = frozenset(("$not", "$pos", "$buf", "$and", "$or", "$xor", "$xnor", "$mux", "$pmux", "$bwmux"))
"""Cells whose output bit depends on the same bit of the operands; evaluated bit by bit, so that words that feed
other bits of themselves are no loops."""
