"""Plant mutants into wake conditions: one text that holds them all, or one mutant as text of its own.

The text that holds them all reads a word `stillclock_mutant` that nothing drives: at value `k` it is mutant `k`, at 0
the rewrite as it is. So it is elaborated once, and a mutant is chosen afterwards, in the netlist or by the solver.
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from enum import Enum

from tests.mutants.places import Form, Place, Text

WORD = "stillclock_mutant"
BITS = 12
_DECLARATION = f" wire [{BITS - 1}:0] {WORD};".encode()


class Change(Enum):
    """What becomes of a place."""

    NOT = "negated"
    ZERO = "stuck at 0"
    ONE = "stuck at 1"
    GONE = "removed"


# An operand of `&&` that is dropped and one that is stuck at 1 are the same condition, and so are an operand of `||`
# that is dropped and one that is stuck at 0: each is planted once, as dropped.
KINDS: dict[Form, dict[Change, str]] = {
    Form.WAKE: {
        Change.NOT: "whole condition negated",
        Change.ZERO: "whole condition stuck at 0",
        Change.ONE: "whole condition stuck at 1",
    },
    Form.AND: {
        Change.ONE: "operand of && dropped (stuck at 1)",
        Change.ZERO: "operand of && stuck at 0",
        Change.NOT: "operand of && negated",
    },
    Form.OR: {
        Change.ZERO: "operand of || dropped (stuck at 0)",
        Change.ONE: "operand of || stuck at 1",
        Change.NOT: "operand of || negated",
    },
    Form.IF: {
        Change.NOT: "if condition negated",
        Change.ZERO: "if condition stuck at 0",
        Change.ONE: "if condition stuck at 1",
    },
    Form.TEST: {
        Change.ZERO: "case label removed",
        Change.NOT: "case label negated",
        Change.ONE: "case label stuck at 1",
    },
    Form.LABEL: {Change.GONE: "case label removed"},
    Form.LEAF: {Change.GONE: "leaf removed"},
}


@dataclass(frozen=True)
class Mutant:
    """One wrong place.

    Args:
        number: the value of the word that chooses it, 0 for one that is planted into the netlist.
        kind: of mutant, for the table.
        definition, cell: the gating cell it concerns; an instance of a module for a cut link.
        what: it is, for a person.
    """

    number: int
    kind: str
    definition: str
    cell: str
    what: str


@dataclass(frozen=True)
class Planted:
    """A mutant of a wake condition, and where it stands."""

    mutant: Mutant
    file: str
    place: Place
    change: Change


def plant(texts: dict[str, Text]) -> tuple[Planted, ...]:
    """Number every mutant of every place."""
    places = [(file, place) for file, text in texts.items() for place in text.places]
    todo = [(file, place, change) for file, place in places for change in KINDS[place.form]]
    assert len(todo) < 1 << BITS, "the word that chooses a mutant is too narrow"
    return tuple(
        Planted(
            Mutant(
                number,
                KINDS[place.form][change],
                place.definition,
                place.cell,
                f"`{' '.join(texts[file].data[place.start : place.end].decode().split())}` {change.value}",
            ),
            file,
            place,
            change,
        )
        for number, (file, place, change) in enumerate(todo, 1)
    )


def with_all(text: Text, planted: Sequence[Planted]) -> bytes:
    """Give the text that holds all mutants of its file."""
    by_place: dict[Place, dict[Change, int]] = {}
    for one in planted:
        by_place.setdefault(one.place, {})[one.change] = one.mutant.number
    inserted: list[tuple[int, int, str]] = [(end, 0, _DECLARATION.decode()) for end in text.headers]
    for place, numbers in by_place.items():
        inserted += _wrapped(place, numbers)
    data, last = bytearray(), 0
    for offset, _, words in sorted(inserted):
        data += text.data[last:offset] + words.encode()
        last = offset
    return bytes(data + text.data[last:])


def alone(text: Text, planted: Planted) -> bytes:
    """Give the text with one mutant, in plain words."""
    place = planted.place
    old = text.data[place.start : place.end].decode()
    new = {Change.NOT: f"!({old})", Change.ZERO: "1'b0", Change.ONE: "1'b1", Change.GONE: ""}[planted.change]
    if place.form is Form.LABEL:
        new = f"~({place.context})"  # a value that the selector never has
    return text.data[: place.start] + new.encode() + text.data[place.end :]


def _wrapped(place: Place, numbers: dict[Change, int]) -> Iterator[tuple[int, int, str]]:
    """Give the insertions around a place; inner places are wrapped inside outer ones."""
    size = place.end - place.start
    if place.form is Form.LEAF:
        # Where the leaf is removed, the wake net stays what it is.
        yield place.end - len("1'b1"), 0, f"{_on(numbers[Change.GONE])} ? {place.context} : "
        return
    if place.form is Form.LABEL:
        before, after = f"({_on(numbers[Change.GONE])} ? ~({place.context}) : (", "))"
    else:
        stuck = f"({_on(numbers[Change.ZERO])} ? 1'b0 : {_on(numbers[Change.ONE])} ? 1'b1 : "
        negated = _on(numbers[Change.NOT])
        # A label of case (1'b1) is compared as it is; everything else asks whether it is zero.
        before, after = f"{stuck}({negated}) {'^ (' if place.form is Form.TEST else '== !('}", "))"
    yield place.start, -size, before
    yield place.end, size, after


def _on(number: int) -> str:
    return f"{WORD} == {BITS}'d{number}"
