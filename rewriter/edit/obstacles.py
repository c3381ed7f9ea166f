"""Why a definition cannot get a port, or an instance a connection."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass

from rewriter.edit.ports import ordered_count
from rewriter.edit.text import Page
from rewriter.model.design import ConnectionStyle, Definition, Design, InstanceSyntax, PortStyle
from rewriter.model.reasons import Reason
from rewriter.model.rewrite import TestPin
from rewriter.model.source import Span


@dataclass(frozen=True)
class Link:
    """An instance, and the definition whose text it stands in."""

    parent: str
    instance: InstanceSyntax


@dataclass(frozen=True)
class Obstacles:
    """Judge definitions and links.

    Args:
        design: the original.
        pins: definition -> existing pin.
        links: definition -> all its instances in source text.
        bound: definitions with instances that no text of their parent makes.
    """

    design: Design
    pins: Mapping[str, TestPin]
    links: Mapping[str, tuple[Link, ...]]
    bound: frozenset[str]

    def at(self, name: str) -> Reason | None:
        """Say why the override cannot enter a definition everywhere under this top."""
        definition = self.design.definitions[name]
        if name in self.pins:
            return None
        if reason := self.port(definition):
            return reason
        for link in self.links.get(name, ()):
            if self.design.definitions[link.parent].in_hierarchy and (reason := self.connection(link)):
                return reason
        if name in self.bound:
            return Reason("bind", f"{name} is bound from outside its parent", self.place(definition.span))
        return None

    def passing(self, link: Link) -> Reason | None:
        """Say why the override cannot come down a link: the instance, or the definition above it."""
        parent = self.design.definitions[link.parent]
        from_above = None if link.parent in self.pins or self.is_bench(parent) else self.port(parent)
        return self.connection(link) or from_above

    def port(self, definition: Definition) -> Reason | None:
        """Say why a definition cannot get a port."""
        if reason := self.text(definition):
            return reason
        why = self._port_list(definition)
        return Reason("no-test-path", why, self.place(definition.ports.span)) if why else None

    def connection(self, link: Link) -> Reason | None:
        """Say why an instance cannot get a connection."""
        instance = link.instance
        if instance.is_bind:
            return Reason("bind", f"{instance.name} is bound", self.place(instance.span))
        if reason := self.text(self.design.definitions[link.parent]):
            return reason
        why = self._connection_list(link)
        return Reason("no-test-path", why, self.place(instance.span)) if why else None

    def text(self, definition: Definition) -> Reason | None:
        """Say why the text of a definition must not be edited."""
        if definition.trap:
            detail = f"{definition.name} {definition.trap.detail}".rstrip()
            return Reason(definition.trap.reason, detail, self.place(definition.span))
        if definition.is_interface:
            return Reason("no-test-path", f"{definition.name} is no module", self.place(definition.span))
        return None

    def goes_first(self, name: str) -> bool:
        """Say whether the new port must be the first: directives stand where the last one would go."""
        return self.design.definitions[name].ports.has_directives or any(
            link.instance.has_directives and link.instance.style is ConnectionStyle.ORDERED
            for link in self.links.get(name, ())
        )

    def is_bench(self, definition: Definition) -> bool:
        """Say whether a definition is a bench beside the design: nothing above it, no ports, not under the top."""
        without = definition.ports.style in (PortStyle.NONE, PortStyle.EMPTY)
        return without and not definition.in_hierarchy and not self.links.get(definition.name)

    def place(self, span: Span) -> str:
        """Format a span as `file:line:col`."""
        source = self.design.source.by_path.get(span.file)
        if source is None:
            return span.file
        line, column = source.line_column(span.start)
        return f"{span.file}:{line}:{column}"

    def _port_list(self, definition: Definition) -> str:
        ports = definition.ports
        if ports.in_macro:
            return f"the ports of {definition.name} come out of a macro"
        if not self.goes_first(definition.name):
            return ""
        if not ports.names:
            return f"{definition.name} may have no port at all"
        if ports.style is PortStyle.ANSI and not ports.first_has_direction:
            return f"the first port of {definition.name} has no direction of its own"
        return ""

    def _connection_list(self, link: Link) -> str:
        instance = link.instance
        if instance.in_macro:
            return f"the instance {instance.name} comes out of a macro"
        if instance.style is ConnectionStyle.EMPTY and instance.has_directives:
            return f"directives stand between the empty brackets of {instance.name}"
        if instance.style is ConnectionStyle.ORDERED and not instance.has_directives:
            page = Page(self.design.source.by_path[instance.parentheses.file])
            inside = page.data[instance.parentheses.start + 1 : instance.parentheses.end - 1]
            if ordered_count(inside) > max(1, len(self.design.definitions[instance.target].ports.names)):
                return f"{instance.name} connects more ports than {instance.target} has"
        return ""


def links_of(design: Design) -> dict[str, tuple[Link, ...]]:
    """Collect the instances of every definition, in all source text."""
    found: dict[str, list[Link]] = {}
    for definition in design.definitions.values():
        for instance in definition.instances:
            if instance.target in design.definitions:
                found.setdefault(instance.target, []).append(Link(definition.name, instance))
    return {name: tuple(links) for name, links in found.items()}


def bound_from_outside(design: Design) -> Iterator[str]:
    """Yield definitions with an instance that no text of its parent definition makes: a `bind` elsewhere."""
    at = {path: module.definition for module in design.modules for path in module.instances}
    written = {
        name: {i.target for i in definition.instances if not i.is_bind}
        for name, definition in design.definitions.items()
    }
    for path, name in at.items():
        parent = path.rpartition(".")[0]
        while parent and parent not in at:
            parent = parent.rpartition(".")[0]
        if parent and name not in written.get(at[parent], set()):
            yield name
