"""`prove`, with the engine: a finished rewrite from its files alone, and RTL against itself."""

import json
from pathlib import Path

import pytest

from tests.cli.running import TWO, Shell, tree, write

pytestmark = pytest.mark.engine


@pytest.fixture
def rewritten(shell: Shell, tmp_path: Path) -> Path:
    write(tmp_path, {"two.sv": TWO})
    ended = shell("rewrite", "two.sv", "--out", "out")
    assert ended.status == 0, ended.err
    return tmp_path / "out"


def edit(file: Path, old: str, new: str) -> None:
    text = file.read_text()
    assert text.count(old) == 1, text
    file.write_text(text.replace(old, new))


def test_a_finished_rewrite(shell: Shell, rewritten: Path) -> None:
    before = tree(rewritten)
    ended = shell("prove", rewritten)
    assert (ended.status, ended.out) == (0, "two: 2 of 2 cells proved; 3 registers, 24 bits compared\n"), ended.err
    assert tree(rewritten) == before


def test_json(shell: Shell, rewritten: Path) -> None:
    data = json.loads(shell("prove", "--format", "json", rewritten).out)
    assert (data["schema"], data["proved"]) == ("stillclock-proof/1", True)
    assert sorted(cell["cell"] for cell in data["cells"]) == ["u_icg_q", "u_icg_r"]
    assert {cell["kind"] for cell in data["cells"]} == {"proved"}


def test_a_broken_wake_condition_is_disproved_with_an_example(shell: Shell, rewritten: Path) -> None:
    edit(rewritten / "rtl/two.sv", "wake_r = save", "wake_r = load")
    ended = shell("prove", rewritten)
    assert ended.status == 1
    assert "two.u_icg_r: disproved (r)" in ended.out
    assert "UNEQUAL r[" in ended.out
    assert "two: 1 of 2 cells proved" in ended.out


def test_the_report_is_not_believed(shell: Shell, rewritten: Path) -> None:
    report = json.loads((rewritten / "report.json").read_text())
    report["banks"], report["cells"], report["edits"] = [], [], []
    (rewritten / "report.json").write_text(json.dumps(report))
    assert shell("prove", rewritten).status == 0
    edit(rewritten / "rtl/two.sv", "wake_r = save", "wake_r = 1'b0")
    assert shell("prove", rewritten).status == 1


def test_changed_sources_are_told(shell: Shell, rewritten: Path, tmp_path: Path) -> None:
    edit(tmp_path / "two.sv", "if (save) r <= d;", "if (save) r <= ~d;")
    ended = shell("prove", rewritten)
    assert ended.status == 1
    assert f"warning: {tmp_path / 'two.sv'}: changed since the rewrite" in ended.err


def test_a_missing_source(shell: Shell, rewritten: Path, tmp_path: Path) -> None:
    (tmp_path / "two.sv").unlink()
    ended = shell("prove", rewritten)
    assert (ended.status, ended.out) == (2, "")
    assert "two.sv" in ended.err


def test_rtl_against_itself(shell: Shell, rewritten: Path) -> None:
    fine = shell("prove", "-F", rewritten / "rtl.f")
    assert fine.status == 0, fine.out + fine.err
    # A register added by hand to a gated block: it should count every clock, and now sleeps with the bank.
    edit(
        rewritten / "rtl/two.sv",
        "        if (save) r <= d;",
        "    begin\n        if (save) r <= d;\n        n <= ~n;\n    end",
    )
    edit(rewritten / "rtl/two.sv", "q, r, s,", "q, r, s, output logic n,")
    ended = shell("prove", "-F", rewritten / "rtl.f")
    assert ended.status == 1
    assert "disproved (n)" in ended.out
