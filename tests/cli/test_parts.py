"""Below a top that the engine cannot read, modules are proved on their own."""

from pathlib import Path

import pytest

from tests.cli.running import Shell, write
from tests.cli.test_flow import report

pytestmark = pytest.mark.engine

# The engine refuses $urandom_range; slang does not.
RTL = """module buoy #(parameter int W = 4) (input logic clk, en, input logic [W-1:0] d, output logic [W-1:0] q);
  always_ff @(posedge clk) if (en) q <= d;
endmodule
module fleet (input logic clk, en, input logic [7:0] d, output logic [7:0] q, output logic [31:0] drift);
  buoy #(.W(8)) u (.*);
  always_ff @(posedge clk) drift <= $urandom_range(7);
endmodule
"""


def test_a_module_below_is_gated_and_says_so(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"fleet.sv": RTL})
    ended = shell("rewrite", "fleet.sv", "--top", "fleet", "--out", "out")
    assert ended.status == 0
    bank = report(tmp_path / "out")["buoy.q"]
    assert bank["verdict"] == "gated"
    assert "on its own: the engine cannot read fleet" in str(bank["evidence"])


def test_proving_the_folder_gives_no_full_answer(shell: Shell, tmp_path: Path) -> None:
    write(tmp_path, {"fleet.sv": RTL})
    assert shell("rewrite", "fleet.sv", "--top", "fleet", "--out", "out").status == 0
    ended = shell("prove", "out")
    assert ended.status == 3
    assert "1 of 1 cell proved" in ended.out
    assert "fleet: the engine could not read it" in ended.out + ended.err
