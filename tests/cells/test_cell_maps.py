"""Cell maps: what is read from them, and what a wrong one is told."""

from pathlib import Path

import pytest

from rewriter.edit.cells import load_cell_map, render_cells, shipped_maps
from rewriter.model.cells import FALLING, FILES, RISING, CellKind, LibraryCell
from rewriter.model.design import Edge
from rewriter.model.errors import UserError

GOOD = """\
format = "stillclock-cells/1"
description = "invented"

[rising]
module = "tide_icg"
clock = "CP"
enable = "E"
test = "T"
output = "Z"
"""


def refusal(folder: Path, text: str | bytes) -> str:
    path = folder / "my.toml"
    path.write_bytes(text if isinstance(text, bytes) else text.encode())
    with pytest.raises(UserError) as caught:
        load_cell_map(str(path))
    assert caught.value.status == 2
    return caught.value.render().replace(str(path), "my.toml")


def test_shipped_maps() -> None:
    assert shipped_maps() == ("asap7", "behavioural", "discrete", "gf180", "sg13g2", "sky130hd", "transparent")
    kinds = {name: load_cell_map(name).kind for name in shipped_maps()}
    assert [name for name, kind in kinds.items() if kind is not CellKind.LIBRARY] == [
        "behavioural",
        "discrete",
        "transparent",
    ]


def test_cells_of_the_open_libraries() -> None:
    """Names, pins and areas. Source: the libraries' Liberty files (`area`, `clock_gate_*_pin` of the cells)."""
    assert {name: load_cell_map(name).rising for name in ("sky130hd", "sg13g2", "gf180", "asap7")} == {
        "sky130hd": LibraryCell("sky130_fd_sc_hd__sdlclkp_1", "CLK", "GATE", "SCE", "GCLK", 18.77),
        "sg13g2": LibraryCell("sg13g2_slgcp_1", "CLK", "GATE", "SCE", "GCLK", 30.84),
        "gf180": LibraryCell("gf180mcu_fd_sc_mcu7t5v0__icgtp_1", "CLK", "E", "TE", "Q", 61.47),
        "asap7": LibraryCell("ICGx1_ASAP7_75t_R", "CLK", "ENA", "SE", "GCLK", 0.262),
    }


def test_library_without_a_falling_cell_supports_rising_banks_only() -> None:
    cell_map = load_cell_map("sky130hd")
    assert (cell_map.supports(Edge.RISING), cell_map.supports(Edge.FALLING)) == (True, False)
    assert list(render_cells(cell_map, None)) == [FILES[Edge.RISING]]
    assert list(render_cells(load_cell_map("behavioural"), None)) == [f"{RISING}.v", f"{FALLING}.v"]


def test_map_of_ones_own(tmp_path: Path) -> None:
    path = tmp_path / "my.toml"
    path.write_text(GOOD + "area = 3\n", encoding="utf-8")
    cell_map = load_cell_map(str(path))
    assert cell_map.rising == LibraryCell("tide_icg", "CP", "E", "T", "Z", 3.0)
    assert cell_map.kind is CellKind.LIBRARY
    text = render_cells(cell_map, None)[FILES[Edge.RISING]]
    assert "    tide_icg u_icg (.CP(clk), .E(wake), .T(test), .Z(gclk));\n" in text
    assert str(tmp_path) not in text


def test_name_of_the_file_cannot_leave_its_comment(tmp_path: Path) -> None:
    path = tmp_path / "my\nmodule evil; endmodule.toml"
    path.parent.mkdir(parents=True, exist_ok=True)
    path.write_text(GOOD, encoding="utf-8")
    lines = render_cells(load_cell_map(str(path)), None)[FILES[Edge.RISING]].split("\n")
    assert [line for line in lines if line.startswith("module")] == [
        "module stillclock_icg (input wire clk, input wire wake, input wire test, output wire gclk);"
    ]


WRONG = {
    "unknown name": (
        GOOD.replace("enable =", "enabel ="),
        [
            "my.toml:7:1: error: `enabel` is not known here",
            'enabel = "E"',
            "^",
            "help: did you mean `enable`? known: module, clock, enable, test, output, area",
        ],
    ),
    "unknown table": (
        GOOD + '\n[both]\nmodule = "x"\n',
        [
            "my.toml:11:2: error: `both` is not known here",
            "[both]",
            " ^",
            "help: known: format, description, kind, rising, falling",
        ],
    ),
    "missing pin": (
        GOOD.replace('test = "T"\n', ""),
        [
            "my.toml:4:2: error: `test` is missing",
            "[rising]",
            " ^",
            'help: add test = "..." to [rising]',
        ],
    ),
    "pin twice": (
        GOOD.replace('"T"', '"E"'),
        [
            "my.toml:8:1: error: pin `E` is named twice, first as `enable`",
            'test = "E"',
            "^",
            "help: one pin each",
        ],
    ),
    "no name": (
        GOOD.replace('"tide_icg"', '"tide icg"'),
        [
            "my.toml:5:1: error: `tide icg` is not a plain Verilog name",
            'module = "tide icg"',
            "^",
            "help: letters, digits, _ and $ only",
        ],
    ),
    "wrong type": (
        GOOD.replace('"CP"', "7"),
        [
            "my.toml:6:1: error: `clock` must be a text in quotes",
            "clock = 7",
            "^",
            'help: write clock = "..."',
        ],
    ),
    "itself": (
        GOOD.replace("tide_icg", "stillclock_icg"),
        [
            "my.toml:5:1: error: `stillclock_icg` is the wrapper itself",
            'module = "stillclock_icg"',
            "^",
            "help: name the cell of the library",
        ],
    ),
    "area": (
        GOOD + "area = -1\n",
        [
            "my.toml:10:1: error: `area` must be a positive number",
            "area = -1",
            "^",
            "help: in square micrometres; leave it out if unknown",
        ],
    ),
    "no table": (
        'format = "stillclock-cells/1"\nrising = "tide_icg"\n',
        [
            "my.toml:2:1: error: `rising` must be a table",
            'rising = "tide_icg"',
            "^",
            "help: write [rising], then module, clock, enable, test and output",
        ],
    ),
    "inline table": (
        'format = "stillclock-cells/1"\nrising = {module = "m", clock = 3}\n',
        [
            "my.toml:2:25: error: `clock` must be a text in quotes",
            'rising = {module = "m", clock = 3}',
            "                        ^",
            'help: write clock = "..."',
        ],
    ),
    "format": (
        GOOD.replace("cells/1", "cells/9"),
        [
            "my.toml:1:1: error: cell map format `stillclock-cells/9` is not known",
            'format = "stillclock-cells/9"',
            "^",
            'help: this version reads format = "stillclock-cells/1"',
        ],
    ),
    "no format": (
        "",
        [
            "my.toml:1:1: error: `format` is missing",
            'help: add format = "..."',
        ],
    ),
    "kind": (
        'format = "stillclock-cells/1"\nkind = "magic"\n',
        [
            "my.toml:2:1: error: there is no kind of cell map called `magic`",
            'kind = "magic"',
            "^",
            "help: one of library, discrete, transparent, behavioural",
        ],
    ),
    "no cells": (
        'format = "stillclock-cells/1"\nkind = "library"\n',
        [
            "my.toml:2:1: error: a library map needs a cell",
            'kind = "library"',
            "^",
            "help: add a table [rising], [falling] or both",
        ],
    ),
    "cells of a discrete map": (
        GOOD.replace('description = "invented"', 'kind = "discrete"'),
        [
            "my.toml:4:2: error: a discrete map names no cells",
            "[rising]",
            " ^",
            'help: write kind = "library", or drop the table',
        ],
    ),
    "comment": (
        GOOD.replace('"invented"', '"two\\nlines"'),
        [
            "my.toml:2:1: error: the description must be one line of text",
            'description = "two\\nlines"',
            "^",
            "help: it becomes a comment in the wrapper",
        ],
    ),
}


@pytest.mark.parametrize("case", WRONG)
def test_wrong_map_is_told_where_and_what(tmp_path: Path, case: str) -> None:
    text, message = WRONG[case]
    assert refusal(tmp_path, text).splitlines() == message


def test_text_that_is_no_toml(tmp_path: Path) -> None:
    message = refusal(tmp_path, GOOD + "area = \n").splitlines()
    assert message[0] == "my.toml:10:8: error: not TOML: Invalid value"
    assert message[1:] == ["area = ", "       ^", "help: a cell map is a TOML file"]
    assert refusal(tmp_path, "[rising\n").startswith("my.toml:1:8: error: not TOML: ")
    assert refusal(tmp_path, 'format = """').startswith("my.toml:1:1: error: not TOML: ")


def test_binary_and_missing_files(tmp_path: Path) -> None:
    assert (
        refusal(tmp_path, b"\xff\xfe\x00")
        == "error: my.toml: not a text file\nhelp: a cell map is a TOML file in UTF-8"
    )
    with pytest.raises(UserError, match="there is no cell map `sky130`") as caught:
        load_cell_map("sky130")
    assert caught.value.help.startswith("did you mean `sky130hd`? ")
    with pytest.raises(UserError, match="Is a directory"):
        load_cell_map(str(tmp_path))
    with pytest.raises(UserError, match="there is no cell map ``"):
        load_cell_map("")
