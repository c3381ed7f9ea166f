"""Plant faults into rewritten RTL: one wrong place each, of the kinds a rewriter could get wrong.

A fault is text against text, planted from a seed. What it breaks decides who can see it. Gated blocks keep their own
conditions, so a cell that runs too often changes no value, and an override that is cut off changes none either: no
testbench that looks at values can kill those; the proof has checks of their own for them.
"""

import random
import re
from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from enum import StrEnum
from itertools import pairwise

from tests.cores.conditions import alternatives, conjunctions
from tests.cores.fragments import PlacedCell, Span, find_cells, sees

_RESET = re.compile(r"\b\w*(?:rst|reset)\w*\b", re.IGNORECASE)


class Effect(StrEnum):
    """What a fault can do to the design."""

    VALUE = "value"  # a register may miss an update, or take one it should not
    WIDE = "wide"  # the cell runs when it need not: no value changes
    OVERRIDE = "override"  # the cell ignores the test pin: no value changes


@dataclass(frozen=True)
class Change:
    """One replaced range of the text."""

    span: Span
    text: str


@dataclass(frozen=True)
class Fault:
    """One planted fault.

    Attributes:
        id: stable for a given text (`kind:module.instance:number`).
        kind: one of `KINDS`.
        effect: who can see it.
        bank: instance of the cell it concerns, with its module.
        registers: what a checker must name.
        changes: the replaced text, in order.
        before: the text of the first change before the fault.
    """

    id: str
    kind: str
    effect: Effect
    bank: str
    registers: tuple[str, ...]
    changes: tuple[Change, ...]
    before: str

    def plant(self, text: str) -> str:
        """Give the text with the fault in it."""
        for change in sorted(self.changes, key=lambda change: change.span.start, reverse=True):
            text = text[: change.span.start] + change.text + text[change.span.end :]
        return text


@dataclass(frozen=True)
class _Site:
    """A cell and everything a kind may look at."""

    text: str
    cell: PlacedCell
    others: tuple[PlacedCell, ...]  # of the same module, visible where the cell stands

    def instead(self, span: Span, text: str) -> tuple[Change, ...]:
        return (Change(span, text),)

    def condition(self) -> str:
        assert self.cell.condition is not None, "this cell has no single condition"
        return self.cell.condition.of(self.text)

    def rewritten(self, condition: str) -> tuple[Change, ...]:
        assert self.cell.condition is not None, "this cell has no single condition"
        return self.instead(self.cell.condition, condition)


Planter = Callable[[_Site], Iterator[tuple[Change, ...]]]


def _term_dropped(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Drop one alternative of the condition: the bank misses the updates it stands for."""
    for group in _alternatives(site):
        for index, operand in enumerate(group):
            if not _RESET.search(operand.of(site.condition())):
                yield site.rewritten(_without(site.condition(), group, index))
    yield from (site.instead(place, "1'b0") for place in site.cell.wakes)


def _reset_dropped(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Drop the alternative that names the reset."""
    for group in _alternatives(site):
        for index, operand in enumerate(group):
            if _RESET.search(operand.of(site.condition())):
                yield site.rewritten(_without(site.condition(), group, index))


def _term_inverted(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Invert one alternative."""
    for group in _alternatives(site):
        for operand in group:
            yield site.rewritten(_swap(site.condition(), operand, f"!({operand.of(site.condition()).strip()})"))


def _and_for_or(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Demand two alternatives at once."""
    for group in _alternatives(site):
        for left, right in pairwise(group):
            yield site.rewritten(_swap(site.condition(), Span(left.end, right.start), " && "))


def _or_for_and(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Let one of two demands do: the cell runs too often."""
    for group in conjunctions(site.condition()) if _plain(site) else ():
        for left, right in pairwise(group):
            yield site.rewritten(_swap(site.condition(), Span(left.end, right.start), " || "))


def _inverted(site: _Site) -> Iterator[tuple[Change, ...]]:
    yield site.instead(site.cell.wake, f"!{site.cell.wake.of(site.text)}")


def _stuck_0(site: _Site) -> Iterator[tuple[Change, ...]]:
    yield site.instead(site.cell.wake, "1'b0")


def _stuck_1(site: _Site) -> Iterator[tuple[Change, ...]]:
    yield site.instead(site.cell.wake, "1'b1")


def _wrong_wake(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Connect another bank's wake net."""
    for other in site.others:
        yield site.instead(site.cell.wake, other.wake.of(site.text))


def _wrong_clock(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Feed the cell from another bank's gated clock, or from the clock inverted."""
    for other in site.others:
        yield site.instead(site.cell.clk, other.gclk.of(site.text))
    yield site.instead(site.cell.clk, f"~{site.cell.clk.of(site.text)}")


def _wrong_edge(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Clock a gated block on the other edge."""
    for edge in site.cell.edges:
        yield site.instead(edge, "negedge" if edge.of(site.text) == "posedge" else "posedge")


def _no_latch(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Put a plain gate in the place of the cell."""
    cell, text = site.cell, site.text
    run = f"({cell.wake.of(text)} | {cell.test.of(text)})"
    gate = f"{cell.clk.of(text)} | ~{run}" if cell.falling else f"{cell.clk.of(text)} & {run}"
    yield site.instead(cell.statement, f"assign {cell.gclk.of(text)} = {gate};")


def _override_tied(site: _Site) -> Iterator[tuple[Change, ...]]:
    yield site.instead(site.cell.test, "1'b0")


def _override_open(site: _Site) -> Iterator[tuple[Change, ...]]:
    yield site.instead(site.cell.test, "")


def _wrong_gclk(site: _Site) -> Iterator[tuple[Change, ...]]:
    """Clock a gated block from another bank's cell."""
    for other in site.others:
        for clock in site.cell.clocks:
            yield site.instead(clock, other.gclk.of(site.text))


KINDS: Mapping[str, tuple[Effect, Planter]] = {
    "term-dropped": (Effect.VALUE, _term_dropped),
    "reset-dropped": (Effect.VALUE, _reset_dropped),
    "term-inverted": (Effect.VALUE, _term_inverted),
    "and-for-or": (Effect.VALUE, _and_for_or),
    "or-for-and": (Effect.WIDE, _or_for_and),
    "wake-inverted": (Effect.VALUE, _inverted),
    "wake-stuck-0": (Effect.VALUE, _stuck_0),
    "wake-stuck-1": (Effect.WIDE, _stuck_1),
    "wrong-wake": (Effect.VALUE, _wrong_wake),
    "wrong-clock": (Effect.VALUE, _wrong_clock),
    "wrong-edge": (Effect.VALUE, _wrong_edge),
    "wrong-gclk": (Effect.VALUE, _wrong_gclk),
    "no-latch": (Effect.VALUE, _no_latch),
    "override-tied": (Effect.OVERRIDE, _override_tied),
    "override-open": (Effect.OVERRIDE, _override_open),
}


def all_faults(text: str, registers: Mapping[str, Sequence[str]]) -> tuple[Fault, ...]:
    """Give every fault that can be planted into a text.

    Args:
        text: one rewritten file.
        registers: by cell (`module.instance`), the registers behind it, for `Fault.registers`.
    """
    cells = find_cells(text)
    sites = [_Site(text, cell, tuple(other for other in cells if _confusable(text, cell, other))) for cell in cells]
    return tuple(fault for kind in KINDS for site in sites for fault in _faults(kind, site, registers))


def plant(
    text: str, registers: Mapping[str, Sequence[str]], *, count: int = 50, seed: int = 1, kinds: Iterable[str] = KINDS
) -> tuple[Fault, ...]:
    """Choose faults: the kinds take turns, and a seed chooses within a kind.

    Args:
        text: one rewritten file.
        registers: by cell (`module.instance`), the registers behind it.
        count: how many; fewer come back only when the text offers fewer.
        seed: the choice is the same for the same seed and text.
        kinds: what to choose from.
    """
    chooser = random.Random(seed)  # noqa: S311 - no secret is made here
    by_kind: dict[str, list[Fault]] = {kind: [] for kind in kinds}
    for fault in all_faults(text, registers):
        by_kind.get(fault.kind, []).append(fault)
    for faults in by_kind.values():
        chooser.shuffle(faults)
    rounds = max((len(faults) for faults in by_kind.values()), default=0)
    turns = (faults[turn] for turn in range(rounds) for faults in by_kind.values() if turn < len(faults))
    return tuple(fault for fault, _ in zip(turns, range(count), strict=False))


def _faults(kind: str, site: _Site, registers: Mapping[str, Sequence[str]]) -> Iterator[Fault]:
    effect, planter = KINDS[kind]
    bank = f"{site.cell.module}.{site.cell.instance}"
    for number, changes in enumerate(planter(site)):
        yield Fault(
            f"{kind}:{bank}:{number}",
            kind,
            effect,
            bank,
            tuple(registers.get(bank, ())),
            changes,
            changes[0].span.of(site.text),
        )


def _confusable(text: str, cell: PlacedCell, other: PlacedCell) -> bool:
    """Say whether the other cell's nets can be reached, and are driven by another condition."""
    same = cell.condition and other.condition and cell.condition.of(text).split() == other.condition.of(text).split()
    return not same and sees(text, cell, other)


def _plain(site: _Site) -> bool:
    return site.cell.condition is not None


def _alternatives(site: _Site) -> tuple[tuple[Span, ...], ...]:
    return alternatives(site.condition()) if _plain(site) else ()


def _swap(condition: str, span: Span, text: str) -> str:
    return f"{condition[: span.start]}{text}{condition[span.end :]}"


def _without(condition: str, group: tuple[Span, ...], index: int) -> str:
    """Leave one operand out, with one of the operators beside it."""
    cut = (
        Span(group[index].start, group[index + 1].start) if index == 0 else Span(group[index - 1].end, group[index].end)
    )
    return _swap(condition, cut, "")
