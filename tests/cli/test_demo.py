"""`demo`: the whole job on the project's own design, as a golden test."""

import json
from pathlib import Path

import pytest

from tests.cli.running import Shell, tree
from tests.conftest import Golden

HERE = Path(__file__).parent
pytestmark = pytest.mark.engine


def test_demo(shell: Shell, tmp_path: Path, golden: Golden) -> None:
    ended = shell("demo")
    assert ended.status == 0, ended.err
    assert ended.err.count("warning") == 0
    golden(HERE / "demo.txt", ended.out)
    place = tmp_path / "stillclock-demo"
    golden(HERE / "demo.diff", (place / "gated/changes.diff").read_text())
    report = json.loads((place / "gated/report.json").read_text())
    totals = report["totals"]
    assert totals["gated_bits"] + totals["left_bits"] + totals["refused_bits"] == totals["flop_bits"]
    assert {cell["evidence"] for cell in report["cells"]} == {"proved"}
    assert {bank["reason"] for bank in report["banks"]} >= {None, "async-load", "never-holds", "array"}
    before = tree(place)
    assert shell("rewrite", "-F", place / "gated/rtl.f", "--check").status == 0, "a second run changes nothing"
    assert tree(place) == before
