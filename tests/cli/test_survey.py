"""`survey`, `explain` and how results and messages are kept apart."""

import json
import os
import re
import subprocess
import sys
from pathlib import Path

import pytest

from rewriter.model.reasons import PAGES
from tests.cli.running import TWO, Shell, lines, write

LONG = """\
module a_module_with_a_name_that_is_long (
    input  logic clk, a_condition_with_a_long_name, another_condition_with_a_long_name, one_more_condition,
    input  logic [31:0] d,
    output logic [31:0] a_register_with_a_name_that_is_very_long_indeed_so_long_that_it_is_cut
);
    always_ff @(posedge clk)
        if (a_condition_with_a_long_name && another_condition_with_a_long_name && one_more_condition)
            a_register_with_a_name_that_is_very_long_indeed_so_long_that_it_is_cut <= d;
endmodule
"""


def test_text(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})
    ended = shell("survey", "two.sv")
    assert (ended.status, ended.err) == (0, "")
    assert (
        ended.out
        == """\
two: 24 bits in registers
24 (100.0 %) hold at times; 16 (66.7 %) can stop, on 2 cells

Cells, by register bits (wake conditions unproved)
  bits  cell   wakes when  where
     8  two.q  load        two.sv:6
     8  two.r  save        two.sv:8

Refused: not shown to be sound
  bits  register  reason         where
     8  two.s     async-load: s  two.sv:10

Bits by method and reason
       16  enable
        8  async-load

Bits gated, by module
       16  of      24  two

16 gated + 0 left + 8 refused
"""
    )


@pytest.mark.parametrize("text", [TWO, LONG])
def test_no_line_is_wider_than_100_columns(shell: Shell, tmp_path: Path, text: str) -> None:
    write(tmp_path, {"some_folder/a_file_with_a_rather_long_name.sv": text})
    out = shell("survey", "some_folder/a_file_with_a_rather_long_name.sv").out
    assert max(map(len, out.splitlines())) <= 100


def test_json_holds_the_same(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})
    data = json.loads(shell("survey", "two.sv", "--format", "json").out)
    assert data["schema"] == "stillclock-survey/1"
    assert [(cell["bits"], cell["wake"], cell["evidence"]) for cell in data["cells"]] == [
        (8, "load", "unproved"),
        (8, "save", "unproved"),
    ]
    assert data["by_reason"] == {"async-load": 8}
    assert data["by_module"] == {"two": {"gated": 16, "flop_bits": 24}}
    assert data["totals"]["gated_bits"] + data["totals"]["left_bits"] + data["totals"]["refused_bits"] == 24


def test_no_colour_and_no_progress_where_there_is_no_terminal(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})
    ended = shell("survey", "two.sv")
    assert "\x1b" not in ended.out + ended.err


def on_a_terminal(folder: Path, **environment: str) -> bytes:
    """Run a survey whose stdout and stderr are a terminal."""
    main, side = os.openpty()
    command = [sys.executable, "-m", "rewriter", "survey", "two.sv"]
    variables = {name: value for name, value in os.environ.items() if name not in ("NO_COLOR", "FORCE_COLOR")}
    with subprocess.Popen(
        command,
        cwd=folder,
        stdin=subprocess.DEVNULL,
        stdout=side,
        stderr=side,
        env={**variables, "TERM": "xterm", **environment},
    ) as child:
        os.close(side)
        shown = b""
        while True:
            try:
                piece = os.read(main, 4096)
            except OSError:  # Linux says so at the end of a terminal
                break
            if not piece:
                break
            shown += piece
        assert child.wait() == 0
    os.close(main)
    return shown


def test_no_color_wins(tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})
    bold = b"\x1b[1mCells"
    assert bold in on_a_terminal(tmp_path)
    quiet = on_a_terminal(tmp_path, NO_COLOR="1")
    assert bold not in quiet
    assert not re.search(rb"\x1b\[[0-9;]*[1-9][0-9;]*m", quiet), "no colour, no bold; the cursor may move"


def test_a_reader_that_leaves_early_is_no_error(tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})
    command = [sys.executable, "-m", "rewriter", "survey", "two.sv", "--format", "json"]
    with subprocess.Popen(command, cwd=tmp_path, stdout=subprocess.PIPE, stderr=subprocess.PIPE) as child:
        assert child.stdout
        assert child.stderr
        child.stdout.close()
        assert child.stderr.read() == b""
        assert child.wait() in (0, 141)


def test_explain_lists_every_word(shell: Shell) -> None:
    ended = shell("explain")
    assert ended.status == 0
    for word in PAGES:
        assert f"\n  {word} " in ended.out
    assert max(map(len, ended.out.splitlines())) <= 100


@pytest.mark.parametrize("word", PAGES)
def test_explain_every_word(shell: Shell, word: str) -> None:
    ended = shell("explain", word)
    assert ended.status == 0
    assert lines(
        " ".join(ended.out.split()),
        [word, *PAGES[word].summary.split(), "What to do:", *PAGES[word].what_to_do.split()],
    )


def test_explain_takes_evidence_as_reports_spell_it(shell: Shell) -> None:
    assert shell("explain", "proved", "under", "top").out == shell("explain", "proved-under-top").out


def test_an_internal_fault_is_owned_up_to(shell: Shell, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def fail(*_: object) -> None:
        raise ValueError("something of ours")

    monkeypatch.setattr("rewriter.frontend.read", fail)
    ended = shell("survey", "a.sv")
    assert (ended.status, ended.out) == (3, "")
    assert ended.err.startswith("internal error: ValueError: something of ours\nhelp: this is a fault of stillclock;")
    monkeypatch.setenv("STILLCLOCK_DEBUG", str(tmp_path / "debug"))
    assert shell("survey", "a.sv").status == 3
    assert (tmp_path / "debug").read_text().startswith("Traceback")


@pytest.mark.parametrize("fault", [MemoryError, RecursionError])
def test_too_big_is_no_answer(shell: Shell, monkeypatch: pytest.MonkeyPatch, fault: type[Exception]) -> None:
    def fail(*_: object) -> None:
        raise fault

    monkeypatch.setattr("rewriter.frontend.read", fail)
    ended = shell("survey", "a.sv")
    assert ended.status == 3
    assert ended.err.startswith("error: ")


def test_help_and_version(shell: Shell) -> None:
    assert shell("--version").out.startswith("stillclock ")
    for command in ("survey", "rewrite", "prove", "explain", "demo"):
        ended = shell(command, "--help")
        assert ended.status == 0
        assert ended.out.startswith(f"Usage: stillclock {command} ")
        assert command in shell("--help").out
