"""The exit status of `prove`: 2, then 1, then 3."""

from pathlib import Path

import pytest

from rewriter.flow import finished
from rewriter.model.errors import NoAnswerError
from rewriter.model.evidence import CellEvidence, Mismatch, ProofResult
from rewriter.model.reasons import EvidenceKind
from tests.cli.running import TWO, Shell, write

WRAPPER = "module stillclock_icg (input clk, wake, test, output gclk); assign gclk = clk; endmodule\n"
HELD = TWO.replace("clk, clk2,", "clk, clk2, test_en,").replace(
    "endmodule",
    "    wire g;\n    stillclock_icg u_icg_q (.clk(clk), .wake(load), .test(test_en), .gclk(g));\nendmodule",
)


def cell(kind: EvidenceKind) -> CellEvidence:
    return CellEvidence("two", "two", "u_icg_q", kind, ("q",))


def result(*kinds: EvidenceKind, mismatch: bool = False, undecided: bool = False, unread: bool = False) -> ProofResult:
    return ProofResult(
        tuple(cell(kind) for kind in kinds),
        (Mismatch("two", "output q", "it differs"),) if mismatch else (),
        ("output q",) if undecided else (),
        {},
        (),
        (("two", "cannot be read"),) if unread else (),
        {},
        1,
        8,
    )


K = EvidenceKind


@pytest.mark.parametrize(
    "answer, status",
    [
        (result(K.PROVED, K.UNDER_TOP, K.FROM_RESET), 0),
        (result(K.PROVED, K.DISPROVED), 1),
        (result(K.UNDECIDED, K.DISPROVED), 1),
        (result(K.PROVED, mismatch=True), 1),
        (result(K.PROVED, mismatch=True, undecided=True), 1),
        (result(K.PROVED, K.UNDECIDED), 3),
        (result(K.PROVED, K.NOT_CHECKED), 3),
        (result(K.PROVED, undecided=True), 3),
        (result(K.PROVED, unread=True), 3),
        (NoAnswerError("the engine is missing", help="install it"), 3),
    ],
)
def test_prove(
    shell: Shell, tmp_path: Path, monkeypatch: pytest.MonkeyPatch, answer: ProofResult | NoAnswerError, status: int
) -> None:
    def prove(*_: object) -> ProofResult:
        if isinstance(answer, NoAnswerError):
            raise answer
        return answer

    monkeypatch.setattr(finished, "prove", prove)
    write(tmp_path, {"two.sv": HELD, "cell.v": WRAPPER})
    assert shell("prove", "two.sv", "cell.v").status == status
