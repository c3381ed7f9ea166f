"""Find what a rewrite inserted, in its text: the cells, their wake conditions, and the blocks they clock.

Only the inserted text is read, by the shape it is written in (a cell instance with named ports); names
are taken from the instance, so a name chosen to avoid a collision is found all the same.
"""

import re
from dataclasses import dataclass

_CELL = re.compile(
    r"\bstillclock_icg(?P<falling>_n)?\s+(?P<instance>\w+)\s*\(\s*"
    r"\.clk\s*\((?P<clk>[^()]*)\)\s*,\s*\.wake\s*\((?P<wake>[^()]*)\)\s*,\s*"
    r"\.test\s*\((?P<test>[^()]*)\)\s*,\s*\.gclk\s*\((?P<gclk>[^()]*)\)\s*\)\s*;"
)
_MODULE = re.compile(r"\bmodule\s+(?:automatic\s+|static\s+)?(\w+)|\bendmodule\b")
_COMMENT = re.compile(r'//[^\n]*|/\*.*?\*/|"(?:\\.|[^"\\\n])*"', re.DOTALL)
_WORD = re.compile(r"\b(?:begin|end)\b")


@dataclass(frozen=True)
class Span:
    """A half-open range of characters of one text."""

    start: int
    end: int

    def of(self, text: str) -> str:
        """Give the characters."""
        return text[self.start : self.end]


@dataclass(frozen=True)
class PlacedCell:
    """One cell as the text holds it.

    Attributes:
        module: the module it stands in.
        falling: whether it is the falling-edge cell.
        statement, clk, wake, test, gclk: the instance and its connections.
        condition: the expression behind a wake net that is one expression; None for a copied control skeleton.
        wakes: the places of a control skeleton that set the wake net to 1.
        sleeps: the place of a control skeleton that sets it to 0 first.
        clocks: the names of the gated clock in the event controls of the blocks, with their edge words.
    """

    module: str
    instance: str
    falling: bool
    statement: Span
    clk: Span
    wake: Span
    test: Span
    gclk: Span
    condition: Span | None
    wakes: tuple[Span, ...]
    sleeps: Span | None
    edges: tuple[Span, ...]
    clocks: tuple[Span, ...]


def find_cells(text: str) -> tuple[PlacedCell, ...]:
    """Give the cells of a text in its order."""
    code = blank_comments(text)
    modules = _modules(code)
    return tuple(_placed(code, modules, match) for match in _CELL.finditer(code))


def blank_comments(text: str) -> str:
    """Blank comments and strings, keeping every offset."""
    return _COMMENT.sub(lambda match: re.sub(r"[^\n]", " ", match[0]), text)


def sees(text: str, user: PlacedCell, used: PlacedCell) -> bool:
    """Say whether the nets of `used` are declared where `user` stands: earlier, same module, scope not closed."""
    if used.module != user.module or used.statement.end > user.statement.start:
        return False
    depth = 0
    for word in _WORD.findall(blank_comments(text)[used.statement.end : user.statement.start]):
        depth += 1 if word == "begin" else -1
        if depth < 0:
            return False
    return True


def _modules(code: str) -> tuple[tuple[Span, str], ...]:
    found: list[tuple[Span, str]] = []
    start, name = 0, ""
    for match in _MODULE.finditer(code):
        if match[1]:
            start, name = match.start(), match[1]
        else:
            found.append((Span(start, match.end()), name))
    return tuple(found)


def _placed(code: str, modules: tuple[tuple[Span, str], ...], match: re.Match[str]) -> PlacedCell:
    around, module = next(entry for entry in modules if entry[0].start <= match.start() < entry[0].end)
    ports = {name: _stripped(match, name) for name in ("clk", "wake", "test", "gclk")}
    wake = ports["wake"].of(code)
    condition = _condition(code, around, wake)
    skeleton = None if condition and not _is_call(code, condition, wake) else _skeleton_name(code, around, wake)
    events = tuple(
        re.compile(rf"\b(posedge|negedge)\s+({re.escape(ports['gclk'].of(code))})\b").finditer(
            code, around.start, around.end
        )
    )
    return PlacedCell(
        module=module,
        instance=match["instance"],
        falling=match["falling"] is not None,
        statement=Span(match.start(), match.end()),
        **ports,
        condition=condition,
        wakes=_settings(code, around, skeleton, 1) if skeleton else (),
        sleeps=next(iter(_settings(code, around, skeleton, 0)), None) if skeleton else None,
        edges=tuple(Span(*event.span(1)) for event in events),
        clocks=tuple(Span(*event.span(2)) for event in events),
    )


def _stripped(match: re.Match[str], name: str) -> Span:
    start, end = match.span(name)
    text = match[name]
    return Span(start + len(text) - len(text.lstrip()), end - len(text) + len(text.rstrip()))


def _condition(code: str, around: Span, wake: str) -> Span | None:
    """Find the right side of `wire wake = …;` or `assign wake = …;`."""
    head = re.compile(rf"\b(?:wire|logic|assign)\s+{re.escape(wake)}\s*=\s*").search(code, around.start, around.end)
    return None if head is None else Span(head.end(), code.index(";", head.end()))


def _is_call(code: str, condition: Span, wake: str) -> bool:
    return condition.of(code).startswith(f"{wake}_f")


def _skeleton_name(code: str, around: Span, wake: str) -> str:
    """Give the name the copied branches assign: the function's in Verilog, the net's in SystemVerilog."""
    function = f"{wake}_f"
    return function if re.compile(rf"\b{re.escape(function)}\b").search(code, around.start, around.end) else wake


def _settings(code: str, around: Span, name: str, level: int) -> tuple[Span, ...]:
    pattern = re.compile(rf"(?<![\w.]){re.escape(name)}\s*=\s*(1'b{level})\s*;")
    return tuple(Span(*match.span(1)) for match in pattern.finditer(code, around.start, around.end))
