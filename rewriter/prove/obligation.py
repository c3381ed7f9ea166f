"""What must hold, and the question whether it does."""

from collections.abc import Iterable, Iterator
from dataclasses import dataclass

from rewriter.logic.aig import FALSE, Lit
from rewriter.logic.blast import Bit
from rewriter.logic.solver import Model
from rewriter.model.evidence import Counterexample
from rewriter.prove.pair import Shared

_SHOWN = 24
"""Most signals in a counterexample; beyond that a table says nothing."""


@dataclass(frozen=True)
class Obligation:
    """Something both texts must agree on.

    Args:
        variable: the word it belongs to (register, port, `instance.port`).
        place: bit, None when it is not a matter of one bit.
        kind: `next`, `reset`, `clock`, `output`, `input`, `latch`, `memory`.
        differs: literal that is 1 in a state where they do not agree.
        gold: what the original has, as far as a value can be shown.
        gate: what the rewrite has.
        awake: whether the gated clock passes, for `next`.
    """

    variable: str
    place: int | None
    kind: str
    differs: Lit
    gold: Bit = (FALSE, FALSE)
    gate: Bit = (FALSE, FALSE)
    awake: Bit = (FALSE, FALSE)

    @property
    def word(self) -> str:
        """Name what is reported: the variable, a memory together with its addresses."""
        return self.variable.removesuffix(".address")


@dataclass(frozen=True)
class Failure:
    """An obligation that does not hold (`decided`), or on which a limit was reached."""

    obligation: Obligation
    decided: bool
    reason: str
    counterexample: Counterexample | None


def unequal(shared: Shared, gold: Bit, gate: Bit) -> Lit:
    """Say when the rewrite's bit is not one that the original allows: an x of the original allows any."""
    aig = shared.aig
    return aig.both(gold[1] ^ 1, aig.either(gate[1], aig.differ(gold[0], gate[0])))


def discharge(shared: Shared, obligations: list[Obligation]) -> list[Failure]:
    """Ask about a group of obligations together, dropping the words that fail until the rest holds.

    Returns:
        The first failure of each word, and what a limit left open.
    """
    failures: list[Failure] = []
    left = [o for o in obligations if o.differs != FALSE]
    while left:
        answer = shared.solver.ask([shared.aig.any_of(o.differs for o in left)])
        if answer is False:
            break
        if not isinstance(answer, Model):
            failures += [Failure(o, decided=False, reason="undecided", counterexample=None) for o in left]
            break
        values = answer.values()
        broken = shared.aig.simulate([o.differs for o in left], values)
        failed: dict[str, Obligation] = {}
        for obligation, bad in zip(left, broken, strict=True):
            if bad:
                failed.setdefault(obligation.word, obligation)
        failures += [_failure(shared, o, obligations, values) for o in failed.values()]
        left = [o for o in left if o.word not in failed]
    return failures


def _failure(shared: Shared, broken: Obligation, group: list[Obligation], values: dict[int, int]) -> Failure:
    reason = "disproved"
    if broken.awake[1] != FALSE and shared.solver.ask([broken.differs, broken.awake[1] ^ 1]) is False:
        reason = "x-in-wake"
    kind = broken.kind
    if kind == "next":
        kind = "load" if shared.aig.simulate([broken.awake[0]], values)[0] else "hold"
    word = [o for o in group if o.variable == broken.variable and o.kind == broken.kind]
    example = Counterexample(
        f"{broken.variable}[{broken.place}]" if broken.place is not None else broken.variable,
        kind,
        tuple(signals(shared, [broken.differs], values)),
        _shown(shared, [(o.place, o.gold) for o in word], values),
        _shown(shared, [(o.place, o.gate) for o in word], values),
    )
    return Failure(broken, decided=True, reason=reason, counterexample=example)


def signals(shared: Shared, roots: Iterable[Lit], values: dict[int, int]) -> Iterator[tuple[str, str]]:
    """Give the words that some literals depend on, with their values in a state."""
    words: dict[str, int] = {}
    for node in shared.aig.support(roots):
        source = shared.sources[node]
        words[source.label] = words.get(source.label, 0) | values.get(node, 0) << source.place
    shown = sorted(words.items())
    for name, value in shown[:_SHOWN]:
        yield name, hex(value)
    if len(shown) > _SHOWN:
        yield "...", f"{len(shown) - _SHOWN} more"


def _shown(shared: Shared, bits: list[tuple[int | None, Bit]], values: dict[int, int]) -> str:
    places = [(place or 0, bit) for place, bit in bits]
    value = shared.aig.simulate([b[0] for _, b in places], values)
    unknown = shared.aig.simulate([b[1] for _, b in places], values)
    if any(unknown):
        width = max(place for place, _ in places) + 1
        digits = ["0"] * width
        for (place, _), v, u in zip(places, value, unknown, strict=True):
            digits[width - 1 - place] = "x" if u else str(v)
        return "0b" + "".join(digits)
    return hex(sum(v << place for (place, _), v in zip(places, value, strict=True)))
