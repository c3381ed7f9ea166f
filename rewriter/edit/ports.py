"""Text edits that add one port to a definition and one connection to an instance."""

import re
from dataclasses import dataclass

from rewriter.edit.text import CODEC, COMMENT, LEXEMES, Page
from rewriter.model.design import ConnectionStyle, Definition, InstanceSyntax, PortStyle
from rewriter.model.rewrite import Edit
from rewriter.model.source import Span

PORT = "test-port"
CONNECTION = "test-connection"

_PORT_LINE = re.compile(
    r"(?P<indent>[ \t]*)(?P<direction>input|output|inout)(?P<gap>[ \t]+)"
    r"(?:(?P<type>\S.*?)(?P<space>[ \t]*))?(?P<name>(?<![\w$])[A-Za-z_][\w$]*)[ \t]*(?:\[[^\]]*\][ \t]*)*(?:[=,].*)?\Z",
    re.DOTALL,
)


@dataclass(frozen=True)
class NewPort:
    """An input to be added.

    Args:
        name: its name.
        first: it is the first of the list (directives stand in it), else the last.
        others: how many ports there were.
    """

    name: str
    first: bool
    others: int


def port_edits(page: Page, definition: Definition, port: NewPort) -> list[Edit]:
    """Add an input to a definition.

    Args:
        page: file of the definition's header.
        definition: gets the port.
        port: the input.
    """
    ports, name, first = definition.ports, port.name, port.first
    match ports.style:
        case PortStyle.NONE:
            return [_insert(page, ports.span.start, f" (input wire {name})", PORT)]
        case PortStyle.EMPTY:
            return [_insert(page, ports.span.start + 1, f"input wire {name}", PORT)]
        case PortStyle.ANSI:
            alone = f"input wire {name}"
            return [_first_port(page, definition, alone)] if first else _last_port(page, definition, name)
        case PortStyle.NON_ANSI:
            listed = [_first_port(page, definition, name)] if first else [_last_name(page, definition, name)]
            return [*listed, _declaration(page, definition, name)]


def _first_port(page: Page, definition: Definition, text: str) -> Edit:
    start = definition.ports.span.start + 1
    if page.rest_is_comment(start):
        indent = page.indent(definition.ports.first)
        return _insert(page, page.line_end(start), f"{page.newline}{indent}{text},", PORT)
    return _insert(page, start, f"{text}, ", PORT)


def _last_port(page: Page, definition: Definition, name: str) -> list[Edit]:
    end = definition.ports.last_end
    if not page.rest_is_comment(end) or page.line_end(end) >= definition.ports.span.end:
        return [_insert(page, end, f"{_comma(page, end)} input wire {name}", PORT)]
    line = page.data[page.line_start(end) : end]
    comma_first = line.lstrip(" \t").startswith(",")
    indent = page.indent(end)
    if comma_first:
        return [_insert(page, page.line_end(end), f"{page.newline}{indent}, input wire {name}", PORT)]
    port = _aligned(page, definition, name)
    if page.line_end(end) == end:
        return [_insert(page, end, f"{_comma(page, end)}{page.newline}{port}", PORT)]
    return [
        _insert(page, end, _comma(page, end), PORT),
        _insert(page, page.line_end(end), f"{page.newline}{port}", PORT),
    ]


def _aligned(page: Page, definition: Definition, name: str) -> str:
    """Write the port like the lines around it, when they stand in columns."""
    ports = definition.ports
    before = page.data[page.line_start(ports.last_end) : ports.last_end]
    found = _PORT_LINE.fullmatch(before)
    if not found:
        indent = page.indent(ports.last_end)
        if not before.strip(" \t()").startswith(("input", "output", "inout")) and page.opens_line(ports.first):
            indent = page.indent(ports.first)
        return f"{indent}input wire {name}" if indent or page.opens_line(ports.first) else f"    input wire {name}"
    indent, gap, space = found["indent"], found["gap"], found["space"] or " "
    if "\t" in gap + space:
        return f"{indent}input{gap}wire{space}{name}"
    head = indent + "input" + " " * max(1, len(found["direction"] + gap) - len("input"))
    if not found["type"]:
        head = f"{indent}input "
    return f"{head}wire{' ' * max(1, found.start('name') - len(head) - len('wire'))}{name}"


def _last_name(page: Page, definition: Definition, name: str) -> Edit:
    end = definition.ports.last_end
    line = page.data[page.line_start(end) : end]
    one_per_line = page.rest_is_comment(end) and re.fullmatch(r"[ \t]*,?[ \t]*[\w$\\]\S*", line)
    if not one_per_line:
        return _insert(page, end, f"{_comma(page, end)} {name}", PORT)
    if line.lstrip(" \t").startswith(","):
        return _insert(page, end, f"{page.newline}{page.indent(end)}, {name}", PORT)
    return _insert(page, end, f"{_comma(page, end)}{page.newline}{page.indent(end)}{name}", PORT)


def _declaration(page: Page, definition: Definition, name: str) -> Edit:
    """Declare the port right after the header."""
    end = definition.ports.header_end
    declared = f"input wire {name};"
    if not page.rest_is_comment(end):
        return _insert(page, end, f" {declared}", PORT)
    following = page.data[page.line_end(end) : definition.span.end].split("\n")[1:]
    inner = next((line[: len(line) - len(line.lstrip(" \t"))] for line in following if line.strip()), "")
    outer = page.indent(definition.span.start)
    indent = inner if len(inner) > len(outer) else outer + "    "
    return _insert(page, page.line_end(end), f"{page.newline}{indent}{declared}", PORT)


def connection_edits(page: Page, instance: InstanceSyntax, port: NewPort, value: str) -> list[Edit]:
    """Connect a new port of an instance.

    Args:
        page: file of the instance.
        instance: as it stands.
        port: the new port.
        value: what it is connected to.
    """
    match instance.style:
        case ConnectionStyle.ORDERED:
            return [_ordered(page, instance, port, value)]
        case ConnectionStyle.EMPTY:
            return [_insert(page, instance.parentheses.start + 1, f".{port.name}({value})", CONNECTION)]
        case ConnectionStyle.WILDCARD if value == port.name:
            return []  # `.*` finds a name of the same spelling by itself
        case ConnectionStyle.WILDCARD | ConnectionStyle.NAMED:
            return [_named(page, instance, port.name, value)]


def _named(page: Page, instance: InstanceSyntax, port: str, value: str) -> Edit:
    text = f".{port}({value}),"
    opening = instance.parentheses.start + 1
    if instance.has_directives:
        return _insert(page, opening, f"{text} ", CONNECTION)
    if not page.opens_line(instance.first):
        return _insert(page, instance.first, f"{text} ", CONNECTION)
    line = page.data[instance.first : page.line_end(instance.first)]
    neighbour = re.match(r"\.[\w$]+([ \t]*)\(", line)
    width = neighbour.end() - 1 if neighbour and neighbour[1] else 0
    aligned = f".{port}".ljust(width) + f"({value}),"
    return _insert(page, instance.first, f"{aligned}{page.newline}{page.indent(instance.first)}", CONNECTION)


def _ordered(page: Page, instance: InstanceSyntax, port: NewPort, value: str) -> Edit:
    start, end = instance.parentheses.start + 1, instance.parentheses.end - 1
    if port.first:
        return _insert(page, start, f"{value}, ", CONNECTION)
    missing = port.others - ordered_count(page.data[start:end])
    blank_last = "," in COMMENT.sub("", page.data[instance.last_end : end])
    at = end if blank_last else instance.last_end
    return _insert(page, at, f"{_comma(page, at)}{' ,' * missing} {value}", CONNECTION)


def ordered_count(inside: str) -> int:
    """Count ordered connections by the commas outside brackets."""
    plain = LEXEMES.sub(lambda found: " " * len(found[0]), inside)
    depth = 0
    count = 1
    for character in plain:
        depth += (character in "([{") - (character in ")]}")
        count += depth == 0 and character == ","
    return count


def _comma(page: Page, offset: int) -> str:
    """Give a comma; a name that starts with a backslash ends only at white space."""
    line = page.data[page.line_start(offset) : offset]
    return " ," if re.search(r"\\\S+\Z", line) else ","


def _insert(page: Page, offset: int, text: str, why: str) -> Edit:
    return Edit(Span(page.path, offset, offset), text.encode(CODEC), (), why)
