"""What the mutants found in the prover, kept as small designs."""

import pytest

from rewriter.model.reasons import EvidenceKind
from tests.prove.harbour import answer, cell
from tests.prove.test_examples import icg

pytestmark = pytest.mark.engine

MEMORY = """
module lamp (input logic clk, en, sel, input logic [7:0] d, output logic [7:0] y{port});
    for (genvar g = 0; g < 1; g++) begin : gen
        logic [7:0] store [4];
        {cell}
        always_ff @(posedge {clock}) if (en) begin if (sel) store[2] <= d; else store[1] <= ~d; end
        assign y = store[d[1:0]];
    end
endmodule"""


def memory(wake: str) -> str:
    return MEMORY.format(port=", input wire test_en", cell=icg("store", wake), clock="gclk_store")


def test_memory_in_a_generate_block_written_at_constant_places() -> None:
    """It was taken for a register that nothing reads, and a wrong condition passed."""
    gold = MEMORY.format(port="", cell="", clock="clk")
    assert answer(gold, memory("en")).proved
    found = cell(answer(gold, memory("en && sel")), "gen[0].u_icg_store")
    assert found.kind is EvidenceKind.DISPROVED
    assert found.failing == ("gen[0].store[1]",)
    assert not found.dead


@pytest.mark.parametrize("wake, wider", [("en", False), ("1'b1", True), ("en || sel", True)])
def test_too_wide_a_condition_of_a_memory_is_reported(wake: str, wider: bool) -> None:  # noqa: FBT001
    result = answer(MEMORY.format(port="", cell="", clock="clk"), memory(wake))
    assert result.proved
    assert bool(cell(result, "gen[0].u_icg_store").wider) is wider


COPIED = """
module lamp (input logic clk, input logic [1:0] mode, input logic a, b, output logic q, input wire test_en);
    function wake_q_f (input [1:0] mode_i, input a_i, b_i);
        begin
            wake_q_f = 1'b0;
            case (mode_i)
                2'd0: {first}
                2'd1: if (b_i) wake_q_f = 1'b1;
                default: ;
            endcase
        end
    endfunction
    wire wake_q = wake_q_f(mode, a, b);
    wire gclk_q;
    stillclock_icg u_icg_q (.clk(clk), .wake(wake_q), .test(test_en), .gclk(gclk_q));
    always_ff @(posedge gclk_q) case (mode) 2'd0: if (a) q <= b; 2'd1: if (b) q <= a; default: ; endcase
endmodule"""


@pytest.mark.parametrize("first, wider", [("if (a_i) wake_q_f = 1'b1;", False), ("wake_q_f = 1'b1;", True)])
def test_too_wide_a_copy_of_branches_is_reported(first: str, wider: bool) -> None:  # noqa: FBT001
    """A condition that holds an x by structure alone was not asked about."""
    gold = """module lamp (input logic clk, input logic [1:0] mode, input logic a, b, output logic q);
        always_ff @(posedge clk) case (mode) 2'd0: if (a) q <= b; 2'd1: if (b) q <= a; default: ; endcase
    endmodule"""
    result = answer(gold, COPIED.format(first=first))
    assert result.proved
    assert bool(cell(result, "u_icg_q").wider) is wider
