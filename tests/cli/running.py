"""Run commands as a user does, in this process, and small designs to run them on."""

from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path

import pytest

from rewriter.cli.main import run

HOLD = """\
module hold (
    input  logic       clk,
    input  logic       load,
    input  logic [7:0] d,
    output logic [7:0] q
);
    always_ff @(posedge clk)
        if (load) q <= d;
endmodule
"""

TWO = """\
module two (
    input  logic       clk, clk2, load, save,
    input  logic [7:0] d,
    output logic [7:0] q, r, s
);
    always_ff @(posedge clk)
        if (load) q <= d;
    always_ff @(posedge clk)
        if (save) r <= d;
    always_ff @(posedge clk or posedge load)
        if (load) s <= d;          // loads what is not constant: refused
        else if (save) s <= q;
endmodule
"""

FREE = """\
module free (input logic clk, input logic [7:0] d, output logic [7:0] q);
    always_ff @(posedge clk) q <= d;
endmodule
"""


@dataclass(frozen=True)
class Ended:
    """What a command left behind."""

    status: int
    out: str
    err: str


class Shell:
    """Run commands and collect what they print."""

    def __init__(self, capture: pytest.CaptureFixture[str]) -> None:
        self._capture = capture

    def __call__(self, *arguments: str | Path) -> Ended:
        """Run `stillclock ARGUMENTS…`; a traceback fails the test at once."""
        self._capture.readouterr()
        status = run([str(argument) for argument in arguments])
        printed = self._capture.readouterr()
        assert "Traceback" not in printed.out + printed.err
        return Ended(status, printed.out, printed.err)


def write(folder: Path, texts: dict[str, str]) -> None:
    """Write files below a folder."""
    for name, text in texts.items():
        (folder / name).parent.mkdir(parents=True, exist_ok=True)
        (folder / name).write_text(text)


def tree(folder: Path) -> dict[str, bytes]:
    """Give every file below a folder with its bytes."""
    return {str(path.relative_to(folder)): path.read_bytes() for path in folder.rglob("*") if path.is_file()}


def lines(text: str, words: Sequence[str]) -> bool:
    """Say whether the words stand in the text in that order."""
    position = 0
    for word in words:
        position = text.find(word, position)
        if position < 0:
            return False
    return True
