"""Cell maps: read them, and write the wrapper modules they ask for."""

import difflib
import re
import tomllib
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import NoReturn, cast

from rewriter import resources
from rewriter.model.cells import FALLING, FILES, NEEDS_MAP, RISING, WRAPPERS, CellKind, CellMap, LibraryCell
from rewriter.model.design import Edge
from rewriter.model.errors import Place, UserError

FORMAT = "stillclock-cells/1"
DEFAULT = "behavioural"

_SIMPLE_NAME = re.compile(r"[A-Za-z_][A-Za-z0-9_$]*\Z")
_TOML_PLACE = re.compile(r" \(at (?:line (\d+), column (\d+)|end of document)\)$")
_PINS = ("clock", "enable", "test", "output")


def shipped_maps() -> tuple[str, ...]:
    """Give the names of the cell maps that ship with the program."""
    return tuple(sorted(item.name.removesuffix(".toml") for item in resources.templates().joinpath("maps").iterdir()))


def load_cell_map(name_or_path: str) -> CellMap:
    """Read a shipped cell map by name, or one of the user's by path.

    Raises:
        UserError: no such map, or something in it is wrong; it names the line.
    """
    if name_or_path in shipped_maps():
        text = resources.read(resources.templates(), "maps", f"{name_or_path}.toml")
        return _Reader(f"{name_or_path}.toml", text).cell_map(name_or_path)
    return _Reader(name_or_path, _read_file(name_or_path)).cell_map(name_or_path)


def render_cells(cell_map: CellMap, timescale: str | None) -> dict[str, str]:
    """Write the wrapper modules of a cell map.

    Args:
        cell_map: a map that lacks a falling-edge cell gives the rising wrapper alone.
        timescale: what stands after the directive, such as `1ns / 1ps`; given exactly when the design has one.

    Returns:
        Text by file name. Each file stands alone, and they can be joined into one.
    """
    return {FILES[edge]: _render(cell_map, edge, timescale) for edge in Edge if cell_map.supports(edge)}


def _render(cell_map: CellMap, edge: Edge, timescale: str | None) -> str:
    return resources.render(
        "cells/wrapper.v.j2",
        module=WRAPPERS[edge],
        edge=edge.value,
        kind=cell_map.kind.value,
        cell=cell_map.cell(edge),
        map_name="".join(c for c in Path(cell_map.name).name if c.isprintable()),  # it goes into a comment
        description=cell_map.description,
        needs_map=NEEDS_MAP,
        timescale=timescale,
    )


def _read_file(path: str) -> str:
    try:
        # An empty path would be the working folder.
        return Path(path).read_text(encoding="utf-8") if path else _unknown(path)
    except FileNotFoundError:
        _unknown(path)
    except UnicodeDecodeError:
        raise UserError(f"{path}: not a text file", help="a cell map is a TOML file in UTF-8") from None
    except OSError as error:
        raise UserError(f"{path}: {error.strerror}", help="give the path of a TOML file that can be read") from None


def _unknown(path: str) -> NoReturn:
    near = difflib.get_close_matches(path, shipped_maps(), 1)
    guess = f"did you mean `{near[0]}`? " if near else ""
    names = ", ".join(shipped_maps())
    raise UserError(
        f"there is no cell map `{path}`", help=f"{guess}give the path of a TOML file, or one of {names}"
    ) from None


@dataclass(frozen=True)
class _Reader:
    """One cell map being read; every complaint names its line."""

    path: str
    text: str

    def cell_map(self, name: str) -> CellMap:
        data = self._parse()
        self._known(data, "", ("format", "description", "kind", "rising", "falling"))
        if (found := self._string(data, "", "format")) != FORMAT:
            self._fail("format", f"cell map format `{found}` is not known", f'this version reads format = "{FORMAT}"')
        kind = self._kind(data)
        cells = {key: self._cell(data, key) for key in ("rising", "falling") if key in data}
        if kind is not CellKind.LIBRARY and cells:
            self._fail(
                next(iter(cells)), f"a {kind.value} map names no cells", 'write kind = "library", or drop the table'
            )
        if kind is CellKind.LIBRARY and not cells:
            self._fail("kind", "a library map needs a cell", "add a table [rising], [falling] or both")
        return CellMap(
            name=name,
            description=self._comment(data),
            kind=kind,
            rising=cells.get("rising"),
            falling=cells.get("falling"),
        )

    def _parse(self) -> Mapping[str, object]:
        try:
            return tomllib.loads(self.text)
        except tomllib.TOMLDecodeError as error:
            said = str(error)
            found = _TOML_PLACE.search(said)
            line, column = (int(found[1]), int(found[2])) if found and found[1] else (self.text.count("\n") + 1, 1)
            message = said[: found.start()] if found else said
            raise UserError(
                f"not TOML: {message}", place=self._place(line, column), help="a cell map is a TOML file"
            ) from None

    def _kind(self, data: Mapping[str, object]) -> CellKind:
        word = self._string(data, "", "kind") if "kind" in data else CellKind.LIBRARY.value
        kinds = [kind.value for kind in CellKind]
        if word not in kinds:
            self._fail("kind", f"there is no kind of cell map called `{word}`", f"one of {', '.join(kinds)}")
        return CellKind(word)

    def _comment(self, data: Mapping[str, object]) -> str:
        text = self._string(data, "", "description") if "description" in data else "no description"
        if not text.isprintable() or text.endswith("\\"):
            self._fail("description", "the description must be one line of text", "it becomes a comment in the wrapper")
        return text

    def _cell(self, data: Mapping[str, object], key: str) -> LibraryCell:
        table = data[key]
        if not isinstance(table, dict):
            self._fail(key, f"`{key}` must be a table", f"write [{key}], then module, clock, enable, test and output")
        values = cast("Mapping[str, object]", table)
        self._known(values, key, ("module", *_PINS, "area"))
        module = self._name(values, key, "module")
        if module in (RISING, FALLING):
            self._fail(f"{key}.module", f"`{module}` is the wrapper itself", "name the cell of the library")
        pins = [self._name(values, key, pin) for pin in _PINS]
        for index, pin in enumerate(pins):
            if pin in pins[:index]:
                twice = _PINS[pins.index(pin)]
                self._fail(f"{key}.{_PINS[index]}", f"pin `{pin}` is named twice, first as `{twice}`", "one pin each")
        return LibraryCell(module, *pins, area=self._area(values, key))

    def _area(self, table: Mapping[str, object], key: str) -> float | None:
        area = table.get("area")
        if area is None:
            return None
        if isinstance(area, bool) or not isinstance(area, int | float) or not 0 < area < float("inf"):
            self._fail(
                f"{key}.area", "`area` must be a positive number", "in square micrometres; leave it out if unknown"
            )
        return float(area)

    def _name(self, table: Mapping[str, object], key: str, name: str) -> str:
        value = self._string(table, key, name)
        if not _SIMPLE_NAME.match(value):
            self._fail(f"{key}.{name}", f"`{value}` is not a plain Verilog name", "letters, digits, _ and $ only")
        return value

    def _string(self, table: Mapping[str, object], key: str, name: str) -> str:
        where = f"{key}.{name}" if key else name
        if name not in table:
            self._fail(key, f"`{name}` is missing", f'add {name} = "..."' + (f" to [{key}]" if key else ""))
        value = table[name]
        if not isinstance(value, str) or not value:
            self._fail(where, f"`{name}` must be a text in quotes", f'write {name} = "..."')
        return value

    def _known(self, table: Mapping[str, object], key: str, names: tuple[str, ...]) -> None:
        for name in table:
            if name not in names:
                near = difflib.get_close_matches(name, names, 1)
                guess = f"did you mean `{near[0]}`? " if near else ""
                self._fail(
                    f"{key}.{name}" if key else name, f"`{name}` is not known here", f"{guess}known: {', '.join(names)}"
                )

    def _fail(self, where: str, message: str, way_out: str) -> NoReturn:
        """Complain about a key, given as `table.key`, `key`, `table`, or nothing for the whole file."""
        raise UserError(message, place=self._place(*self._find(where)), help=way_out)

    def _find(self, where: str) -> tuple[int, int]:
        """Find the line and column of a key; TOML's parser does not say, so look for it as people write it."""
        table, _, name = where.rpartition(".")
        current = ""
        for number, line in enumerate(self.text.split("\n"), 1):
            if header := re.match(r"\s*\[\s*([\w-]+)\s*\]", line):
                current = header[1]
                if where == current:
                    return number, header.start(1) + 1
            elif current == table and (found := re.match(rf"\s*\"?({re.escape(name)})\"?\s*[=.]", line)):
                return number, found.start(1) + 1
            elif table and (inline := re.match(rf"\s*{re.escape(table)}\s*=.*?\b({re.escape(name)})\b\s*=", line)):
                return number, inline.start(1) + 1
        return self._find(table) if table else (1, 1)

    def _place(self, line: int, column: int) -> Place:
        lines = self.text.split("\n")
        return Place(self.path, line, column, lines[line - 1].rstrip("\r") if line <= len(lines) else "")
