"""Thread the test override from every cell up to the top, through all source text."""

import difflib
from collections.abc import Callable, Iterable, Iterator, Mapping
from dataclasses import dataclass

from rewriter.edit.names import KEYWORDS, common_free, is_plain
from rewriter.edit.obstacles import Link, Obstacles, bound_from_outside, links_of
from rewriter.edit.options import EditOptions
from rewriter.edit.ports import NewPort, connection_edits, port_edits
from rewriter.edit.text import Page
from rewriter.model.design import Design, Note
from rewriter.model.errors import UserError
from rewriter.model.reasons import Reason
from rewriter.model.rewrite import Edit, TestPin
from rewriter.model.source import Span

OFF = "1'b0"
"""What a bench without ports connects: no test."""


@dataclass(frozen=True)
class Threads:
    """How the override reaches the cells.

    Args:
        expression: definition -> what carries the override in it.
        ports: definition -> name of the input that carries it.
        edits: new ports and connections.
        blocked: definitions that no override can reach, with the reason.
        warnings: links that are left out without harm to the design under the top.
    """

    expression: Mapping[str, str]
    ports: Mapping[str, str]
    edits: tuple[Edit, ...]
    blocked: Mapping[str, Reason]
    warnings: tuple[Note, ...]


def thread(design: Design, holders: Iterable[str], options: EditOptions) -> Threads:
    """Decide which definitions get a port, and write the edits.

    Args:
        design: the original.
        holders: definitions that get cells.
        options: names and pins.

    Raises:
        UserError: a test pin or port name that cannot be.
    """
    _check(design, options)
    return _Threader(design, options).run(frozenset(holders))


class _Threader:
    """Walk up from the cells."""

    def __init__(self, design: Design, options: EditOptions) -> None:
        self.design = design
        self.options = options
        self.pins = {pin.definition: pin for pin in options.test_pins}
        self.links = links_of(design)
        self.obstacles = Obstacles(design, self.pins, self.links, frozenset(bound_from_outside(design)))

    def run(self, holders: frozenset[str]) -> Threads:
        """Thread to all holders that can be reached."""
        blocked = {holder: reason for holder in sorted(holders) if (reason := self._blocked(holder))}
        reached = self._climb(holders - blocked.keys(), lambda link: self.obstacles.passing(link) is None)
        benches = frozenset(n for n in reached - self.pins.keys() if self._is_bench(n) and n not in holders)
        ported = sorted(reached - self.pins.keys() - benches)
        wanted = common_free(self.options.test_port, (self.design.definitions[d].identifiers for d in ported))
        expression = {definition: self._expression(definition, wanted, benches) for definition in reached}
        edits: list[Edit] = []
        for name in ported:
            port = NewPort(wanted, self.obstacles.goes_first(name), len(self.design.definitions[name].ports.names))
            edits += self._port_and_connections(name, port, expression)
        ports = dict.fromkeys(ported, wanted) | {d: self.pins[d].port for d in reached if d in self.pins}
        return Threads(expression, ports, tuple(edits), blocked, tuple(self._warnings(reached)))

    def _blocked(self, holder: str) -> Reason | None:
        """Say why some instance of a holder under the top would stay without the override."""
        above = self._climb({holder}, lambda link: self.design.definitions[link.parent].in_hierarchy)
        return next((reason for name in sorted(above) if (reason := self.obstacles.at(name))), None)

    def _climb(self, start: Iterable[str], follow: Callable[[Link], bool]) -> frozenset[str]:
        """Give definitions and everything above them, up to those with a pin of their own."""
        seen: set[str] = set()
        todo = sorted(start)
        while todo:
            name = todo.pop()
            if name not in seen:
                seen.add(name)
                links = () if name in self.pins else self.links.get(name, ())
                todo += [link.parent for link in links if follow(link)]
        return frozenset(seen)

    def _is_bench(self, name: str) -> bool:
        return self.obstacles.is_bench(self.design.definitions[name])

    def _expression(self, name: str, port: str, benches: frozenset[str]) -> str:
        if name in benches:
            return OFF
        pin = self.pins.get(name)
        return port if pin is None else f"!{pin.port}" if pin.active_low else pin.port

    def _port_and_connections(self, name: str, port: NewPort, expression: Mapping[str, str]) -> Iterator[Edit]:
        definition = self.design.definitions[name]
        yield from port_edits(self._page(definition.ports.span), definition, port)
        for link in self.links.get(name, ()):
            if self.obstacles.passing(link) is None:
                page = self._page(link.instance.parentheses)
                yield from connection_edits(page, link.instance, port, expression[link.parent])

    def _warnings(self, reached: frozenset[str]) -> Iterator[Note]:
        for name in sorted(reached - self.pins.keys()):
            for link in self.links.get(name, ()):
                if reason := self.obstacles.passing(link):
                    yield Note(
                        f"{link.parent} is not under the top and cannot pass the test override to "
                        f"{link.instance.name} ({reason.word})",
                        self.obstacles.place(link.instance.span),
                        "connect it by hand where that module is used",
                    )
        for pin in self.options.test_pins:
            if pin.definition not in reached:
                yield Note(f"the test pin {pin.definition}.{pin.port} is not needed: no cell stands below it")

    def _page(self, span: Span) -> Page:
        return Page(self.design.source.by_path[span.file])


def _check(design: Design, options: EditOptions) -> None:
    if not is_plain(options.test_port) or options.test_port in KEYWORDS:
        raise UserError(f"`{options.test_port}` cannot name a port", help="use letters, digits and _, and no keyword")
    seen: dict[str, TestPin] = {}
    for pin in options.test_pins:
        _check_pin(design, pin)
        if seen.setdefault(pin.definition, pin) != pin:
            raise UserError(f"two test pins are given for `{pin.definition}`", help="give one pin per module")


def _check_pin(design: Design, pin: TestPin) -> None:
    definition = design.definitions.get(pin.definition)
    if definition is None:
        raise UserError(
            f"test pin {pin.definition}.{pin.port}: there is no module `{pin.definition}`",
            help=_guess(pin.definition, sorted(design.definitions)),
        )
    if pin.port not in definition.ports.names:
        raise UserError(
            f"test pin {pin.definition}.{pin.port}: `{pin.definition}` has no port `{pin.port}`",
            help=_guess(pin.port, list(definition.ports.names)),
        )


def _guess(word: str, known: list[str]) -> str:
    most = 12  # names that fit on a line
    near = difflib.get_close_matches(word, known, 1)
    listed = ", ".join(known[:most]) + (", …" if len(known) > most else "")
    return f"did you mean `{near[0]}`?" if near else f"known: {listed}" if known else "there is none"
