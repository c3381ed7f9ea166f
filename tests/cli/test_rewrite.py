"""`rewrite`: destinations, exit statuses, report.json, and what is left alone."""

import json
from collections.abc import Callable
from pathlib import Path

import pytest

from rewriter.model.evidence import ProofJob
from rewriter.model.reasons import EvidenceKind
from tests.cli.running import FREE, HOLD, TWO, Shell, tree, write

Prover = Callable[..., list[ProofJob]]


@pytest.fixture(autouse=True)
def design(tmp_path: Path, prover: Prover) -> None:
    prover({"q": EvidenceKind.PROVED, "r": EvidenceKind.PROVED})
    write(tmp_path, {"rtl/two.sv": TWO, "rtl/free.sv": FREE})


def test_a_dry_run_prints_the_diff_and_writes_nothing(shell: Shell, tmp_path: Path) -> None:
    before = tree(tmp_path)
    ended = shell("rewrite", "rtl/two.sv")
    assert ended.status == 0
    assert ended.out.startswith("--- a/rtl/two.sv\n+++ b/rtl/two.sv\n@@ ")
    assert "stillclock_icg u_icg_q" in ended.out
    assert tree(tmp_path) == before


def test_check_and_diff_together(shell: Shell, tmp_path: Path) -> None:
    before = tree(tmp_path)
    quiet = shell("rewrite", "rtl/two.sv", "--check")
    assert (quiet.status, quiet.out) == (1, "")
    shown = shell("rewrite", "--diff", "rtl/two.sv", "--check")
    assert shown.status == 1
    assert shown.out.startswith("--- a/rtl/two.sv\n")
    assert tree(tmp_path) == before


def test_nothing_to_do(shell: Shell, tmp_path: Path) -> None:
    for arguments in (("--check",), ("--check", "--diff"), (), ("--strict",)):
        ended = shell("rewrite", "rtl/free.sv", *arguments)
        assert (ended.status, ended.out) == (0, "")
    assert shell("rewrite", "rtl/free.sv", "--out", "out").status == 0
    found = tree(tmp_path / "out")
    assert set(found) == {"rtl.f", "original.f", "report.json", "changes.diff"}
    assert found["changes.diff"] == b""


def test_the_output_folder(shell: Shell, tmp_path: Path) -> None:
    ended = shell("rewrite", "rtl/two.sv", "--out", "out")
    assert (ended.status, ended.out) == (0, "")
    found = tree(tmp_path / "out")
    assert set(found) == {
        "rtl/two.sv", "cell/stillclock_icg.v", "rtl.f", "original.f", "report.json", "changes.diff",
    }  # fmt: skip
    assert b"/rtl/two.sv\n" in found["original.f"]
    assert b"\nrtl/two.sv\ncell/stillclock_icg.v\n" in found["rtl.f"]


def test_edits_applied_to_the_sources_give_the_output(shell: Shell, tmp_path: Path) -> None:
    data = TWO.replace("// loads", "// l\u00e4dt").encode("latin-1").replace(b"\n", b"\r\n")
    (tmp_path / "rtl/two.sv").write_bytes(data)
    assert shell("rewrite", "rtl/two.sv", "--out", "out").status == 0
    report = json.loads((tmp_path / "out/report.json").read_text())
    out, position = b"", 0
    for edit in report["edits"]:
        assert edit["file"] == str(tmp_path / "rtl/two.sv")
        out += data[position : edit["start"]] + edit["text"].encode("utf-8", "surrogateescape")
        position = edit["end"]
    assert out + data[position:] == (tmp_path / "out/rtl/two.sv").read_bytes()


def test_report_json(shell: Shell, tmp_path: Path) -> None:
    shell("rewrite", "rtl/two.sv", "-DA=1", "--out", "out")
    report = json.loads((tmp_path / "out/report.json").read_text())
    assert (report["schema"], report["top"]) == ("stillclock-report/1", "two")
    assert report["configuration"]["defines"] == ["A=1"]
    assert report["totals"].items() >= {
        "flop_bits": 24, "held_bits": 24, "gated_bits": 16, "left_bits": 0, "refused_bits": 8, "banks": 2, "cells": 2,
    }.items()  # fmt: skip
    assert {
        "name", "module", "file", "line", "registers", "bits", "clock", "edge", "wake", "method", "verdict", "reason",
        "evidence", "occurrences",
    } <= set(report["banks"][0])  # fmt: skip
    bank = next(bank for bank in report["banks"] if bank["name"] == "two.q")
    assert (bank["line"], bank["registers"], bank["clock"], bank["edge"], bank["wake"]) == (
        6,
        ["q"],
        "clk",
        "rising",
        "load",
    )
    assert bank["occurrences"] == [{"module": "two", "scope": "", "instances": 1, "bits": 8}]
    assert [set(source) for source in report["sources"]] == [{"file", "sha256"}]


def test_rewriting_the_output_again_changes_nothing(shell: Shell, tmp_path: Path) -> None:
    shell("rewrite", "rtl/two.sv", "--out", "out")
    assert shell("rewrite", "-F", "out/rtl.f", "--check", "--diff").out == ""
    assert shell("rewrite", "-F", "out/rtl.f", "--check").status == 0
    again = shell("rewrite", "-F", "out/rtl.f", "--out", "out")
    assert again.status == 2
    assert "stands in the output folder" in again.err
    assert (tmp_path / "out/rtl/two.sv").exists()


def test_in_place(shell: Shell, tmp_path: Path) -> None:
    shell("rewrite", "rtl/two.sv", "--out", "out")
    ended = shell("rewrite", "rtl/two.sv", "--in-place", "--cell-file", "rtl/cell.v")
    assert (ended.status, ended.out) == (0, "rtl/cell.v\n")
    assert "add this line to the file list:" in ended.err
    assert (tmp_path / "rtl/two.sv").read_bytes() == (tmp_path / "out/rtl/two.sv").read_bytes()
    assert "module stillclock_icg " in (tmp_path / "rtl/cell.v").read_text()
    again = shell("rewrite", "rtl/two.sv", "rtl/cell.v", "--in-place", "--cell-file", "rtl/cell.v")
    assert (again.status, again.out) == (0, "")
    assert shell("rewrite", "rtl/two.sv", "rtl/cell.v", "--check").status == 0


def test_in_place_again_with_cells_of_the_other_edge(shell: Shell, tmp_path: Path) -> None:
    falling = HOLD.replace("hold", "two").replace("posedge", "negedge")
    write(tmp_path, {"fall.sv": falling.replace("module two", "module fall")})
    shell("rewrite", "rtl/two.sv", "--in-place", "--cell-file", "cell.v")
    first = (tmp_path / "cell.v").read_text()
    ended = shell(
        "rewrite", "fall.sv", "cell.v", "--top", "fall", "--in-place", "--cell-file", "cell.v", "--allow-unproved"
    )
    assert (ended.status, ended.out) == (0, ""), "the line is in the list already"
    assert (tmp_path / "cell.v").read_text().startswith(first)
    assert "module stillclock_icg_n " in (tmp_path / "cell.v").read_text()
    assert shell("rewrite", "rtl/two.sv", "fall.sv", "cell.v", "--top", "fall", "--top", "two", "--check").status == 0


def test_json_goes_to_stdout(shell: Shell) -> None:
    report = json.loads(shell("rewrite", "rtl/two.sv", "--format", "json").out)
    assert report["schema"] == "stillclock-report/1"
    assert report["diff"].startswith("--- a/rtl/two.sv\n")


def test_settings_and_flags(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"stillclock.toml": "min-bits = 9\n", "other.toml": 'off = ["two.q"]\n'})
    assert shell("rewrite", "rtl/two.sv", "--check").status == 0
    assert shell("rewrite", "rtl/two.sv", "--check", "--min-bits", "8").status == 1
    ended = shell("rewrite", "rtl/two.sv", "--settings", "other.toml")
    assert "u_icg_r" in ended.out
    assert "u_icg_q" not in ended.out


def test_headers_and_lists(shell: Shell, tmp_path: Path) -> None:
    write(
        tmp_path,
        {
            "p/hold.sv": HOLD.replace("    always_ff @(posedge clk)", '`include "body.svh"\n//').replace(
                "if (load) q <= d;", ""
            ),
            "p/inc/body.svh": "    always_ff @(posedge clk)\n        if (load) q <= d;\n",
            "p/list.f": "+incdir+inc\nhold.sv\n",
        },
    )
    ended = shell("rewrite", "-F", "p/list.f", "--out", "out", "--allow-unproved")
    assert ended.status == 0, ended.err
    found = tree(tmp_path / "out")
    assert {"rtl/hold.sv", "rtl/inc/body.svh"} <= set(found), "the includer moves with its header"
    assert b"gclk_q" in found["rtl/inc/body.svh"]
    assert found["rtl.f"].splitlines()[1:4] == [
        b"+incdir+rtl/inc",
        *(b"+incdir+" + bytes(tmp_path / p) for p in ("p/inc", "p")),
    ]


def test_an_interrupt_leaves_the_former_folder(shell: Shell, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    shell("rewrite", "rtl/two.sv", "--out", "out")
    before = tree(tmp_path)

    def stop(*_: object) -> None:
        raise KeyboardInterrupt

    monkeypatch.setattr("rewriter.flow.verify_folder", stop)
    ended = shell("rewrite", "rtl/two.sv", "--out", "out", "--off", "two.q")
    assert (ended.status, ended.err.splitlines()[-1]) == (130, "interrupted")
    assert tree(tmp_path) == before
