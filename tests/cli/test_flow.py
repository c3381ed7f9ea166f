"""The loop: what the proof sends back is left out, and nothing unsound is written."""

import json
from collections.abc import Callable
from pathlib import Path

import pytest

from rewriter.model.evidence import Counterexample, Mismatch, ProofJob
from rewriter.model.reasons import EvidenceKind
from rewriter.report.diff import LineCounts
from tests.cli.running import TWO, Shell, tree, write

Prover = Callable[..., list[ProofJob]]
PROVED, DISPROVED, UNDECIDED = EvidenceKind.PROVED, EvidenceKind.DISPROVED, EvidenceKind.UNDECIDED


@pytest.fixture(autouse=True)
def sources(tmp_path: Path) -> None:
    write(tmp_path, {"two.sv": TWO})


def report(folder: Path) -> dict[str, dict[str, object]]:
    return {bank["name"]: bank for bank in json.loads((folder / "report.json").read_text())["banks"]}


def test_all_proved(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    jobs = prover({"q": PROVED, "r": PROVED})
    ended = shell("rewrite", "two.sv", "--out", "out")
    assert (ended.status, len(jobs)) == (0, 1)
    assert jobs[0].test_port == "test_en"
    banks = report(tmp_path / "out")
    assert banks["two.q"]["verdict"] == banks["two.r"]["verdict"] == "gated"
    assert banks["two.q"]["evidence"]["kind"] == "proved"  # type: ignore[index]
    assert (banks["two.s"]["verdict"], banks["two.s"]["reason"]) == ("refused", "async-load")


@pytest.mark.parametrize("kind, strict", [(DISPROVED, 1), (UNDECIDED, 3)])
def test_a_bank_that_does_not_prove_is_left_out(
    shell: Shell, prover: Prover, tmp_path: Path, *, kind: EvidenceKind, strict: int
) -> None:
    word = kind.value
    jobs = prover({"q": PROVED, "r": kind})
    ended = shell("rewrite", "two.sv", "--out", "out", "--off", "two.s")
    assert (ended.status, len(jobs)) == (0, 2), "the rest is proved again"
    assert f"warning: bank two.r is left out, {word}" in ended.err
    assert ("this is a fault of stillclock: report it" in ended.err) == (kind is DISPROVED)
    banks = report(tmp_path / "out")
    assert banks["two.q"]["verdict"] == "gated"
    assert (banks["two.r"]["verdict"], banks["two.r"]["reason"]) == ("refused", word)
    assert "gclk_r" not in (tmp_path / "out/rtl/two.sv").read_text()
    assert shell("rewrite", "two.sv", "--strict", "--off", "two.s").status == strict


def test_a_refusal_under_strict(shell: Shell, prover: Prover) -> None:
    prover({"q": PROVED, "r": UNDECIDED})
    assert shell("rewrite", "two.sv", "--strict").status == 1, "1 before 3"
    prover({"q": PROVED, "r": PROVED})
    assert shell("rewrite", "two.sv", "--strict", "--off", "two.s").status == 0


def test_undecided_banks_can_be_kept_and_every_report_says_so(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    prover({"q": PROVED, "r": UNDECIDED})
    ended = shell("rewrite", "two.sv", "--out", "out", "--allow-unproved")
    assert ended.status == 0
    assert "warning: 1 bank is gated WITHOUT PROOF (undecided): two.r" in ended.err
    assert report(tmp_path / "out")["two.r"]["evidence"]["kind"] == "undecided"  # type: ignore[index]
    data = json.loads((tmp_path / "out/report.json").read_text())
    assert data["totals"]["unproved_banks"] == 1
    assert any("WITHOUT PROOF" in warning["message"] for warning in data["warnings"])


def test_disproved_banks_are_never_kept(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    prover({"q": PROVED, "r": DISPROVED})
    assert shell("rewrite", "two.sv", "--out", "out", "--allow-unproved").status == 0
    assert report(tmp_path / "out")["two.r"]["reason"] == "disproved"


def test_a_cell_that_the_engine_did_not_meet_counts_as_unproved(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    prover({"q": PROVED})
    assert shell("rewrite", "two.sv", "--out", "out").status == 0
    assert report(tmp_path / "out")["two.r"]["reason"] == "not-checked"


def test_a_difference_outside_the_banks_writes_nothing(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    example = Counterexample("q", "output", (("d", "0x1"),), "0", "1")
    prover({"q": PROVED, "r": PROVED}, mismatches=(Mismatch("two", "output q", "it differs", example),))
    ended = shell("rewrite", "two.sv", "--out", "out")
    assert ended.status == 3
    assert ended.err.startswith("internal error: the rewritten RTL differs in two: output q, it differs\nUNEQUAL q")
    kept = Path(ended.err.rpartition("kept in ")[2].strip())
    assert kept.read_bytes().startswith(b"--- a/")
    kept.unlink()
    assert set(tree(tmp_path)) == {"two.sv"}


def test_an_open_question_outside_the_banks_writes_nothing(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    prover({"q": PROVED, "r": PROVED}, undecided=("output q",))
    ended = shell("rewrite", "two.sv", "--out", "out")
    assert ended.status == 3
    assert "error: the proof is open outside the banks: output q\nhelp: " in ended.err
    assert set(tree(tmp_path)) == {"two.sv"}
    assert shell("rewrite", "two.sv", "--out", "out", "--allow-unproved").status == 0


def test_lines_are_counted(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    prover({"q": PROVED, "r": PROVED})
    shell("rewrite", "two.sv", "--out", "out")
    totals = json.loads((tmp_path / "out/report.json").read_text())["totals"]
    diff = (tmp_path / "out/changes.diff").read_text().splitlines()
    counted = LineCounts(sum(line.startswith("+") for line in diff) - 1, sum(line.startswith("-") for line in diff) - 1)
    assert LineCounts(totals["lines_added"], totals["lines_removed"]) == counted


def test_a_register_that_the_rewrite_of_its_block_harms(shell: Shell, prover: Prover, tmp_path: Path) -> None:
    text = TWO.replace("if (save) r <= d;", "begin if (save) r <= d; t <= ~t; end").replace("q, r, s", "q, r, s, t")
    write(tmp_path, {"two.sv": text})
    harmed = Mismatch("two", "t", "t: takes another value than in the original")
    jobs = prover({"q": PROVED, "r": PROVED}, if_gated="r", mismatches=(harmed,))
    ended = shell("rewrite", "two.sv", "--out", "out")
    assert (ended.status, len(jobs)) == (0, 2), ended.err
    assert "bank two.r is left out, disproved: the rewrite of its block changes t" in ended.err
    banks = report(tmp_path / "out")
    assert (banks["two.q"]["verdict"], banks["two.r"]["reason"]) == ("gated", "disproved")
