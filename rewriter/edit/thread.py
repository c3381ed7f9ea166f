"""Thread the test override from every cell up to the top, through all source text."""

import difflib
from collections.abc import Iterator, Mapping
from dataclasses import dataclass

import networkx as nx

from rewriter.edit.names import KEYWORDS, common_free, is_plain
from rewriter.edit.options import EditOptions
from rewriter.edit.ports import connection_edits, port_edits
from rewriter.edit.text import Page
from rewriter.model.design import ConnectionStyle, Definition, Design, InstanceSyntax, PortStyle, Warning
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
    warnings: tuple[Warning, ...]


def thread(design: Design, holders: frozenset[str], options: EditOptions) -> Threads:
    """Decide which definitions get a port, and write the edits.

    Args:
        design: the original.
        holders: definitions that get cells.
        options: names and pins.

    Raises:
        UserError: a test pin or port name that cannot be.
    """
    return _Threader(design, options).run(holders)


@dataclass(frozen=True)
class _Link:
    """An instance, and the definition whose text it stands in."""

    parent: str
    instance: InstanceSyntax


class _Threader:
    """Walk up from the cells."""

    def __init__(self, design: Design, options: EditOptions) -> None:
        self.design = design
        self.options = options
        self.pins = {pin.definition: pin for pin in options.test_pins}
        _check(design, options)
        self.links: dict[str, list[_Link]] = {}
        for definition in design.definitions.values():
            for instance in definition.instances:
                if instance.target in design.definitions:
                    self.links.setdefault(instance.target, []).append(_Link(definition.name, instance))
        self.bound = frozenset(_bound_from_outside(design))

    def run(self, holders: frozenset[str]) -> Threads:
        blocked = self._blocked(holders)
        reached = self._reached(frozenset(holder for holder in holders if holder not in blocked))
        benches = frozenset(name for name in reached if self._is_bench(name))
        ported = sorted(reached - self.pins.keys() - benches)
        name = common_free(self.options.test_port, (self.design.definitions[d].identifiers for d in ported))
        expression = {definition: self._expression(definition, name, benches) for definition in reached}
        first = {d for d in ported if self._goes_first(d)}
        edits = [e for d in ported for e in self._port(d, name, first)]
        edits += [e for d in ported for link in self.links.get(d, ()) for e in self._connection(link, d, name, expression, first)]
        ports = {d: name for d in ported} | {d: self.pins[d].port for d in reached if d in self.pins}
        return Threads(expression, ports, tuple(edits), blocked, tuple(self._warnings(reached)))

    # who is reached

    def _reached(self, holders: frozenset[str]) -> frozenset[str]:
        """Give the holders and everything above them, up to definitions with a pin of their own."""
        seen: set[str] = set()
        todo = sorted(holders)
        while todo:
            name = todo.pop()
            if name in seen:
                continue
            seen.add(name)
            if name not in self.pins:
                todo += [link.parent for link in self.links.get(name, ()) if self._passes(link)]
        return frozenset(seen)

    def _passes(self, link: _Link) -> bool:
        """Say whether the override can come down a link; one that cannot matters only below the top."""
        return self._obstacle(link) is None

    def _is_bench(self, name: str) -> bool:
        """Say whether a definition is a bench beside the design: nothing above it, no ports, not under the top."""
        definition = self.design.definitions[name]
        without = definition.ports.style in (PortStyle.NONE, PortStyle.EMPTY)
        return without and not definition.in_hierarchy and not self.links.get(name) and name not in self.pins

    def _expression(self, name: str, port: str, benches: frozenset[str]) -> str:
        if name in benches:
            return OFF
        pin = self.pins.get(name)
        return port if pin is None else f"!{pin.port}" if pin.active_low else pin.port

    # who cannot be reached

    def _blocked(self, holders: frozenset[str]) -> dict[str, Reason]:
        """Give the holders that some instance under the top would leave without an override."""
        graph: nx.DiGraph[str] = nx.DiGraph()
        graph.add_nodes_from(self.design.definitions)
        for target, links in self.links.items():
            if target not in self.pins:
                graph.add_edges_from((link.parent, target) for link in links)
        above = holders.union(*(nx.ancestors(graph, holder) for holder in holders if holder in graph))
        blocked: dict[str, Reason] = {}
        for name in sorted(above):
            reason = self._own_obstacle(name)
            if reason:
                for below in {name, *nx.descendants(graph, name)} & holders:
                    blocked.setdefault(below, reason)
        return blocked

    def _own_obstacle(self, name: str) -> Reason | None:
        """Say why a definition cannot get its port under this top, if it needs one."""
        definition = self.design.definitions[name]
        if name in self.pins:
            return None
        if definition.in_hierarchy or not self.links.get(name):
            if reason := self._port_obstacle(definition):
                return reason if definition.in_hierarchy else None
        for link in self.links.get(name, ()):
            parent = self.design.definitions[link.parent]
            if parent.in_hierarchy and (reason := self._link_obstacle(link, definition)):
                return reason
        if name in self.bound:
            return Reason("bind", f"{name} is bound from outside", self._place(definition.span))
        return None

    def _obstacle(self, link: _Link) -> Reason | None:
        parent = self.design.definitions[link.parent]
        target = self.design.definitions[link.instance.target]
        return self._link_obstacle(link, target) or (
            self._port_obstacle(parent) if parent.name not in self.pins and not self._is_bench(parent.name) else None
        ) or (self._edit_obstacle(parent) if self._is_bench(parent.name) else None)

    def _link_obstacle(self, link: _Link, target: Definition) -> Reason | None:
        instance = link.instance
        place = self._place(instance.span)
        if instance.is_bind:
            return Reason("bind", f"{instance.name} is bound", place)
        if instance.in_macro:
            return Reason("no-test-path", f"the instance {instance.name} comes out of a macro", place)
        if instance.style is ConnectionStyle.EMPTY and instance.has_directives:
            return Reason("no-test-path", f"directives stand between the empty brackets of {instance.name}", place)
        parent = self.design.definitions[link.parent]
        if parent.trap and link.parent in self.pins:
            return Reason(parent.trap.reason, f"{parent.name}: {parent.trap.detail}".rstrip(": "), place)
        if not instance.span.file or parent.span.file != instance.span.file:
            return Reason("no-test-path", f"the instance {instance.name} stands in an included file", place)
        if instance.style is ConnectionStyle.ORDERED and ordered_short(self._page(instance.span), instance, target):
            return Reason("no-test-path", f"{instance.name} connects more ports than {target.name} has", place)
        return None

    def _edit_obstacle(self, definition: Definition) -> Reason | None:
        place = self._place(definition.span)
        if definition.trap:
            return Reason(definition.trap.reason, f"{definition.name} {definition.trap.detail}".rstrip(), place)
        if definition.is_interface:
            return Reason("no-test-path", f"{definition.name} is no module", place)
        return None

    def _port_obstacle(self, definition: Definition) -> Reason | None:
        if reason := self._edit_obstacle(definition):
            return reason
        ports = definition.ports
        place = self._place(ports.span)
        if ports.in_macro:
            return Reason("no-test-path", f"the ports of {definition.name} come out of a macro", place)
        if self._goes_first(definition.name):
            if not ports.names:
                return Reason("no-test-path", f"{definition.name} may have no port at all", place)
            if ports.style is PortStyle.ANSI and not ports.first_has_direction:
                return Reason("no-test-path", f"the first port of {definition.name} has no direction of its own", place)
        return None

    # edits

    def _goes_first(self, name: str) -> bool:
        """Say whether the new port must be the first: directives stand where the last one would go."""
        return self.design.definitions[name].ports.has_directives or any(
            link.instance.has_directives and link.instance.style is ConnectionStyle.ORDERED
            for link in self.links.get(name, ())
        )

    def _port(self, name: str, port: str, first: set[str]) -> list[Edit]:
        definition = self.design.definitions[name]
        return port_edits(self._page(definition.ports.span), definition, port, first=name in first)

    def _connection(
        self, link: _Link, target: str, port: str, expression: Mapping[str, str], first: set[str]
    ) -> list[Edit]:
        if link.parent not in expression or not self._passes(link):
            return []
        count = len(self.design.definitions[target].ports.names)
        page = self._page(link.instance.parentheses)
        value = expression[link.parent]
        return connection_edits(page, link.instance, port, value, ports=count, first=target in first)

    # words

    def _warnings(self, reached: frozenset[str]) -> Iterator[Warning]:
        for name in sorted(reached - self.pins.keys()):
            for link in self.links.get(name, ()):
                reason = self._obstacle(link)
                if reason:
                    yield Warning(
                        f"{link.parent} is not under the top and cannot pass the test override to "
                        f"{link.instance.name} ({reason.word})",
                        self._place(link.instance.span),
                        "connect it by hand where that module is used",
                    )
        for pin in self.options.test_pins:
            if pin.definition not in reached:
                yield Warning(f"the test pin {pin.definition}.{pin.port} is not needed: no cell stands below it")

    def _page(self, span: Span) -> Page:
        return Page(self.design.source.by_path[span.file])

    def _place(self, span: Span) -> str:
        source = self.design.source.by_path.get(span.file)
        if source is None:
            return span.file
        line, column = source.line_column(span.start)
        return f"{span.file}:{line}:{column}"


def _check(design: Design, options: EditOptions) -> None:
    if not is_plain(options.test_port) or options.test_port in KEYWORDS:
        raise UserError(f"`{options.test_port}` cannot name a port", help="use letters, digits and _")
    seen: dict[str, TestPin] = {}
    for pin in options.test_pins:
        definition = design.definitions.get(pin.definition)
        if definition is None:
            raise UserError(
                f"the test pin {pin.definition}.{pin.port}: there is no module `{pin.definition}`",
                help=_guess(pin.definition, sorted(design.definitions)),
            )
        if pin.port not in definition.ports.names:
            raise UserError(
                f"the test pin {pin.definition}.{pin.port}: `{pin.definition}` has no port `{pin.port}`",
                help=_guess(pin.port, list(definition.ports.names)),
            )
        if seen.setdefault(pin.definition, pin) != pin:
            raise UserError(f"two test pins are given for `{pin.definition}`", help="one pin per module")


def _guess(word: str, known: list[str]) -> str:
    near = difflib.get_close_matches(word, known, 1)
    listed = ", ".join(known[:12]) + (", …" if len(known) > 12 else "")  # noqa: PLR2004 (a line of names)
    return f"did you mean `{near[0]}`?" if near else f"known: {listed}" if known else "there is none"


def _bound_from_outside(design: Design) -> Iterator[str]:
    """Yield definitions with an instance that no text of its parent definition makes: a `bind` elsewhere."""
    at = {path: module.definition for module in design.modules for path in module.instances}
    written = {
        name: {(i.name, i.target) for i in definition.instances} for name, definition in design.definitions.items()
    }
    for path, name in at.items():
        parent = path
        while "." in parent:
            parent = parent.rsplit(".", 1)[0]
            if parent in at:
                own = path.rsplit(".", 1)[-1].split("[", 1)[0]
                if (own, name) not in written.get(at[parent], set()):
                    yield name
                break


def ordered_short(page: Page, instance: InstanceSyntax, target: Definition) -> bool:
    """Say whether an ordered list names more ports than there are."""
    from rewriter.edit.ports import ordered_count

    inside = page.data[instance.parentheses.start + 1 : instance.parentheses.end - 1]
    return ordered_count(inside) > max(1, len(target.ports.names))
