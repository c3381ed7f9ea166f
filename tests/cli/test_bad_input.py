"""Bad input: a clear message, exit status 2, no traceback, nothing written."""

import os
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

import pytest

from tests.cli.running import FREE, HOLD, TWO, Shell, tree, write


@dataclass(frozen=True)
class Case:
    """Arguments, what must be read in the messages, and files to begin with."""

    arguments: tuple[str, ...]
    says: tuple[str, ...]
    files: dict[str, str]


def case(arguments: str, *says: str, **files: str) -> Case:
    """Make a case; `a_sv` stands for the file name `a.sv`."""
    return Case(
        tuple(arguments.split()),
        says,
        {name.replace("__", "/").replace("_", "."): text for name, text in files.items()},
    )


BROKEN = "module broken (input logic clk;\nendmodule\n"
CASES = {
    "syntax error": case("a.sv", "a.sv:1:31: error: ", "module broken (input logic clk;", "^", a_sv=BROKEN),
    "missing file": case("none.sv", "error: ", "none.sv"),
    "missing include": case("a.sv", "a.sv:1:10: error: ", "nowhere.svh", a_sv='`include "nowhere.svh"\n' + HOLD),
    "unknown top": case("a.sv --top nothing", "error: ", "nothing", a_sv=HOLD),
    "directory as a file": case("dir", "error: ", "dir", dir__a_sv=HOLD),
    "no file at all": case("", "error: no RTL file is given\nhelp: "),
    "list without files": case("-f l.f", "error: no RTL file is given", l_f="// nothing\n+define+X\n"),
    "missing list": case("-f none.f", "error: ", "none.f"),
    "recursive list": case("-f l.f", "l.f:1:", "error: ", "itself", l_f="-f l.f\n"),
    "unknown parameter": case("a.sv -GNOTHING=1", "error: ", "NOTHING", a_sv=HOLD),
    "several tops": case("a.sv b.sv", "error: ", "--top", a_sv=HOLD, b_sv=FREE),
    "no module": case("a.sv", "error: ", a_sv="// nothing here\n"),
    "type error": case(
        "a.sv", "a.sv:2:", "error: ", a_sv="module a (input logic clk);\n  assign nowhere.x = 1;\nendmodule\n"
    ),
    "duplicate module": case("a.sv b.sv", "error: ", "hold", a_sv=HOLD, b_sv=HOLD),
    "misspelt own option": case(
        "a.sv --fromat json", "error: ", "help: `--fromat` is no option of slang; did you mean `--format`?", a_sv=HOLD
    ),
    "unknown slang option": case("a.sv --no-such-thing", "error: ", "--no-such-thing", a_sv=HOLD),
    "bad value of an own option": case(
        "a.sv --min-bits none", "error: ", "'--min-bits': 'none' is not a valid integer", a_sv=HOLD
    ),
    "no bits": case("a.sv --min-bits 0", "error: ", "0 is not in the range", a_sv=HOLD),
    "bad format": case("a.sv --format xml", "error: ", "'xml' is not one of", a_sv=HOLD),
    "bad test pin": case(
        "a.sv --test-pin hold.te=scan", "error: ", "MODULE.PORT=scan-enable|test-mode[,active-low]", a_sv=HOLD
    ),
    "test pin of no module": case("a.sv --test-pin none.te=test-mode", "error: ", "none", a_sv=HOLD),
    "test pin that is no port": case("a.sv --test-pin hold.te=test-mode", "error: ", "te", a_sv=HOLD),
    "bad test port": case("a.sv --test-port 9x", "error: ", "`9x` is not a plain Verilog name", a_sv=HOLD),
    "unknown cell map": case(
        "a.sv --cell-map sky130", "error: there is no cell map `sky130`", "did you mean `sky130hd`?", a_sv=HOLD
    ),
    "bad cell map": case(
        "a.sv --cell-map m.toml", "m.toml:1:9: error: not TOML", "format =", a_sv=HOLD, m_toml="format =\n"
    ),
    "bad key in a cell map": case(
        "a.sv --cell-map m.toml",
        "m.toml:2:1: error: `kid` is not known here",
        a_sv=HOLD,
        m_toml='format = "stillclock-cells/1"\nkid = 1\n',
    ),
    "bad settings": case(
        "a.sv",
        "stillclock.toml:2:1: error: there is no setting `min-bit`",
        "did you mean `min-bits`?",
        a_sv=HOLD,
        stillclock_toml="\nmin-bit = 1\n",
    ),
    "named settings missing": case("a.sv --settings none.toml", "error: none.toml: No such file", a_sv=HOLD),
    "switched off what is not there": case(
        "a.sv --off hold.p", "error: --off hold.p: ", "did you mean `hold.q`", a_sv=HOLD
    ),
}


@pytest.mark.parametrize("command", ["survey", "rewrite --out out"])
@pytest.mark.parametrize("name", CASES)
def test_bad_input(shell: Shell, tmp_path: Path, name: str, command: str) -> None:
    found = CASES[name]
    if name.startswith("test pin") and command == "survey":
        command = "rewrite --check"  # a survey edits nothing, so it needs no pin
    write(tmp_path, found.files)
    before = tree(tmp_path)
    ended = shell(*command.split(), *found.arguments)
    assert (ended.status, ended.out) == (2, ""), ended.err
    position = 0
    for words in found.says:
        assert words in ended.err[position:], ended.err
        position = ended.err.index(words, position)
    assert tree(tmp_path) == before


def test_no_clocked_block_is_nothing_to_do(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"a.sv": "module a (input logic x, output logic y); assign y = x; endmodule\n"})
    assert shell("rewrite", "a.sv", "--check").status == 0
    assert shell("survey", "a.sv").status == 0


@pytest.mark.parametrize("data", [bytes(range(256)) * 8, b"\0" * 64, b"\x7fELF\x02\x01\x01" + b"\0\xff" * 300])
def test_binary_junk(shell: Shell, tmp_path: Path, data: bytes) -> None:
    (tmp_path / "a.sv").write_bytes(data)
    ended = shell("rewrite", "a.sv", "--out", "out")
    assert ended.status == 2
    assert "error: " in ended.err
    assert set(tree(tmp_path)) == {"a.sv"}


def test_an_unreadable_file(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"a.sv": HOLD})
    (tmp_path / "a.sv").chmod(0)
    if os.geteuid() == 0:  # root reads everything; a link to nothing cannot be read by anybody
        (tmp_path / "a.sv").unlink()
        (tmp_path / "a.sv").symlink_to("gone.sv")
    ended = shell("survey", "a.sv")
    assert ended.status == 2
    assert ("gone.sv" if os.geteuid() == 0 else "a.sv") in ended.err


DESTINATIONS = {
    "a folder of something else": ("--out dir", "dir: exists, and is not an output folder of stillclock"),
    "the sources' own folder": ("--out .", ".: exists, and is not an output folder"),
    "a file": ("--out dir/mine", "dir/mine: exists, and is not an output folder"),
    "below a file": ("--out dir/mine/out", "is not a folder"),
    "no permission": ("--out /proc/out", "cannot be written: "),
    "two destinations": ("--out out --in-place", "--out and --in-place are two destinations"),
    "check with a destination": ("--check --out out", "--check takes no destination"),
    "in place without a cell file": ("--in-place", "--in-place needs --cell-file PATH"),
    "a cell file alone": ("--cell-file c.v", "--cell-file goes with --in-place"),
    "a cell file nowhere": ("--in-place --cell-file none/c.v", "none/c.v: its folder does not exist"),
    "a cell file over a source": ("--in-place --cell-file a.sv", "a.sv: exists, and is no cell file of stillclock"),
    "a cell file over something": (
        "--in-place --cell-file dir/mine",
        "dir/mine: exists, and is no cell file of stillclock",
    ),
    "unproved without a word": ("--no-prove --out out", "--no-prove writes nothing unless --allow-unproved"),
    "an option without its value": ("--out --check", "--out needs a value, but `--check` follows"),
    "an option at the end": ("--out", "Option '--out' requires an argument"),
}


@pytest.mark.parametrize("name", DESTINATIONS)
def test_bad_destination(shell: Shell, tmp_path: Path, prover: Callable[..., object], name: str) -> None:
    arguments, message = DESTINATIONS[name]
    prover({})
    write(tmp_path, {"a.sv": HOLD, "dir/mine": "something\n"})
    before = tree(tmp_path)
    allow = () if "--no-prove" in arguments else ("--allow-unproved",)
    ended = shell("rewrite", "a.sv", *allow, *arguments.split())
    assert (ended.status, ended.out) == (2, ""), ended.err
    assert message in ended.err
    assert "help: " in ended.err
    assert tree(tmp_path) == before


PROVE = {
    "a folder that is not ours": ("dir", "dir: not an output folder of stillclock"),
    "RTL without our cell": ("a.sv", "the RTL holds no gating cell (stillclock_icg or stillclock_icg_n)"),
    "nothing": ("", "no RTL file is given"),
}


@pytest.mark.parametrize("name", PROVE)
def test_bad_proof(shell: Shell, tmp_path: Path, name: str) -> None:
    arguments, message = PROVE[name]
    write(tmp_path, {"a.sv": TWO, "dir/mine": "something\n"})
    ended = shell("prove", *arguments.split())
    assert (ended.status, ended.out) == (2, "")
    assert message in ended.err


@pytest.mark.parametrize(
    "arguments, message",
    [
        ((), "Usage: stillclock"),
        (("rewriet",), "error: No such command 'rewriet'"),
        (("explain", "two-writer"), "error: there is no word `two-writer`\nhelp: did you mean `two-writers`"),
        (("explain", "zzzz"), "help: `stillclock explain` lists them"),
        (("demo", "a.sv"), "error: "),
    ],
)
def test_bad_usage(shell: Shell, arguments: tuple[str, ...], message: str) -> None:
    ended = shell(*arguments)
    assert (ended.status, ended.out) == (2, "")
    assert message in ended.err


def test_a_demo_folder_that_exists(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"stillclock-demo/mine": ""})
    ended = shell("demo")
    assert ended.status == 2
    assert ended.err == "error: stillclock-demo: exists already\nhelp: name a fresh folder with --out\n"
    assert set(tree(tmp_path)) == {"stillclock-demo/mine"}
