"""The cells under test: every shipped map, a map of ours that has a falling-edge cell, and planted bad cells."""

from pathlib import Path

from rewriter import resources
from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.model.cells import FILES
from rewriter.model.design import Edge

LIBRARIES = ("sky130hd", "sg13g2", "gf180", "asap7")
GATING = ("behavioural", "discrete", *LIBRARIES)

INVENTED_MAP = """\
format = "stillclock-cells/1"
description = "an invented library with both edges"
rising = {module = "tide_icg", clock = "CP", enable = "E", test = "T", output = "Z"}

[falling]
module = "tide_icgn"
clock = "CPN"
enable = "E"
test = "T"
output = "ZN"
area = 3
"""

INVENTED_MODELS = """\
module tide_icg (input wire CP, input wire E, input wire T, output wire Z);
    reg latch;
    always @* if (!CP) latch = E | T;
    assign Z = CP & latch;
endmodule
module tide_icgn (input wire CPN, input wire E, input wire T, output wire ZN);
    reg latch;
    always @* if (CPN) latch = E | T;
    assign ZN = CPN | ~latch;
endmodule
"""


def wrapper(name: str, edge: Edge) -> dict[str, str]:
    """Give the wrapper file of a shipped map."""
    file = FILES[edge]
    return {file: render_cells(load_cell_map(name), None)[file]}


def mapped(name: str) -> dict[str, str]:
    """Give the rising wrapper of a library and the functional model of its cell."""
    cell = load_cell_map(name).rising
    assert cell is not None
    model = resources.cell_model(cell.module)
    assert model is not None
    return wrapper(name, Edge.RISING) | {f"{cell.module}.v": model}


def invented(folder: Path) -> dict[str, str]:
    """Give both wrappers of the invented library and its models."""
    path = folder / "invented.toml"
    path.write_text(INVENTED_MAP, encoding="utf-8")
    return render_cells(load_cell_map(str(path)), None) | {"models.v": INVENTED_MODELS}


def _bad(module: str, body: str) -> str:
    ports = "input wire clk, input wire wake, input wire test, output wire gclk"
    return f"module {module} ({ports});\n{body}\nendmodule\n"


def _bad_pair(rising: str, falling: str) -> dict[Edge, str]:
    return {Edge.RISING: _bad("stillclock_icg", rising), Edge.FALLING: _bad("stillclock_icg_n", falling)}


_LATCH_LOW = "reg q; always @* if (!clk) q = wake | test;"
_LATCH_HIGH = "reg q; always @* if (clk) q = wake | test;"

BAD_CELLS = {
    "no latch": _bad_pair("assign gclk = clk & (wake | test);", "assign gclk = clk | ~(wake | test);"),
    "latch open in the wrong phase": _bad_pair(
        f"{_LATCH_HIGH} assign gclk = clk & q;", f"{_LATCH_LOW} assign gclk = clk | ~q;"
    ),
    "override ignored": _bad_pair(
        "reg q; always @* if (!clk) q = wake; assign gclk = clk & q;",
        "reg q; always @* if (clk) q = wake; assign gclk = clk | ~q;",
    ),
    "wake of the wrong polarity": _bad_pair(
        "reg q; always @* if (!clk) q = ~wake | test; assign gclk = clk & q;",
        "reg q; always @* if (clk) q = ~wake | test; assign gclk = clk | ~q;",
    ),
    "a flop for the latch": _bad_pair(
        "reg q; always @(negedge clk) q <= wake | test; assign gclk = clk & q;",
        "reg q; always @(posedge clk) q <= wake | test; assign gclk = clk | ~q;",
    ),
    "a flop of the bank's own edge": _bad_pair(
        "reg q; always @(posedge clk) q <= wake | test; assign gclk = clk & q;",
        "reg q; always @(negedge clk) q <= wake | test; assign gclk = clk | ~q;",
    ),
    "the cell of the other edge": _bad_pair(
        f"{_LATCH_HIGH} assign gclk = clk | ~q;", f"{_LATCH_LOW} assign gclk = clk & q;"
    ),
    "never stops": _bad_pair("assign gclk = clk;", "assign gclk = clk;"),
    "never runs": _bad_pair("assign gclk = 1'b0;", "assign gclk = 1'b1;"),
}
