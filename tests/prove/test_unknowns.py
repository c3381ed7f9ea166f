"""x: a don't-care in the original's next state, a refusal in a wake condition."""

import pytest

from rewriter.model.reasons import EvidenceKind
from tests.prove.harbour import answer, cell
from tests.prove.test_examples import icg

pytestmark = pytest.mark.engine

TEXT = """
module lamp (input logic clk, rst, input logic [1:0] mode, input logic [3:0] d, input logic [2:0] pick,
             input logic [4:0] ready, output logic [3:0] q{port});
    {cell}
    always_ff @(posedge {clock}) {body}
endmodule"""


# A condition as a pruned copy of the block's own case, with its `unique`.
COPY = """logic wake_q; always_comb begin wake_q = '0;
        unique case (1'b1) mode[0]: ; mode[1]: wake_q = '1; default: ; endcase end """


def both(body: str, wake: str) -> tuple[str, str]:
    gold = TEXT.format(port="", cell="", clock="clk", body=body)
    return gold, TEXT.format(port=", input wire test_en", cell=COPY + icg("q", wake), clock="gclk_q", body=body)


FINE = {
    "unique case without a default": (
        "unique case (mode) 2'd0: q <= d; 2'd1: ; 2'd2: q <= ~d; endcase",
        "mode == 0 || mode == 2",
    ),
    "full_case": ("(* full_case *) case (mode) 2'd0: q <= d; 2'd1: ; endcase", "mode == 0"),
    "parallel_case": (
        "(* parallel_case *) case (1'b1) mode[0]: q <= d; mode[1]: q <= ~d; endcase",
        "mode[0] || mode[1]",
    ),
    "unique arms that overlap": (
        "unique case (1'b1) mode[0]: ; mode[1]: q <= d; default: ; endcase",
        "wake_q",
    ),
    "x assigned": ("if (mode == 0) q <= d; else if (mode == 3) q <= 'x;", "mode == 0"),
    "select out of range": ("if (ready[pick]) q <= d;", "ready[pick]"),
}


@pytest.mark.parametrize("body,wake", FINE.values(), ids=FINE)
def test_x_in_the_next_state_is_free(body: str, wake: str) -> None:
    assert answer(*both(body, wake)).proved


def test_unique_arms_count_as_parallel() -> None:
    """The engine takes `unique` at its word, as synthesis may: a condition that relies on the order is no proof."""
    body, _ = FINE["unique arms that overlap"]
    assert not answer(*both(body, "!mode[0] && mode[1]")).proved


REFUSED = {
    "x constant": ("if (mode != 0) q <= d;", "(mode == 1 ? 1'bx : mode != 0)"),
    "x against x": ("if (mode != 0) q <= d;", "mode != 0 && ((mode == 1 ? 1'bx : 1'b0) ^ (mode == 1 ? 1'bx : 1'b1))"),
    "x from a select": ("if (mode != 0) q <= d;", "mode != 0 && (ready[pick] || !ready[pick])"),
}


@pytest.mark.parametrize("body,wake", REFUSED.values(), ids=REFUSED)
def test_x_in_the_wake_condition_is_refused(body: str, wake: str) -> None:
    found = cell(answer(*both(body, wake)), "u_icg_q")
    assert found.kind is EvidenceKind.DISPROVED
    assert found.reason == "x-in-wake"
    assert found.failing == ("q",)


def test_x_of_the_original_allows_no_other_state_to_differ() -> None:
    gold, gate = both("if (mode == 0) q <= d; else if (mode == 3) q <= 'x;", "mode == 0 && d[0]")
    assert cell(answer(gold, gate), "u_icg_q").reason == "disproved"


def test_x_that_the_rewrite_brings_in_differs() -> None:
    gold, gate = both("if (mode == 0) q <= d;", "mode == 0")
    assert not answer(gold, gate.replace("q <= d", "q <= d[0] ? d : 'x")).proved
