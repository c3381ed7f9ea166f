"""Combinational logic, lowered on request; and that no use of it can crash."""

import gc
from pathlib import Path

from rewriter.frontend import read
from rewriter.model.design import WriterKind
from rewriter.model.expr import Expr, Operation
from rewriter.model.statement import Case, Statement
from tests.frontend.conftest import Reader

LOGIC = """
module sub(output [1:0] o); assign o = 2; endmodule
module m(input clk, input [7:0] d, output reg [7:0] q);
  wire [7:0] w = d & 8'h3; wire [7:0] n; logic [7:0] c, l; wire [3:0] parts; reg held;
  assign n = w | q;
  assign parts[1:0] = d[1:0];
  sub u(parts[3:2]);
  always_comb case (d[1:0]) 0: c = n; default: c = l; endcase
  always_latch if (clk) l = d;
  always @(posedge clk) q <= c;
endmodule
"""


def test_what_drives_each_kind_of_signal(sample: Reader) -> None:
    found = sample(LOGIC)
    ask = found.design.drivers.drivers_of
    (wire,) = ask("m", "w")
    assert (wire.kind, wire.bits) == (WriterKind.CONTINUOUS, (7, 0))
    assert isinstance(wire.value, Operation)
    assert wire.value.reads() == {"d"}
    (assign,) = ask("m", "n")
    assert isinstance(assign.value, Expr)
    assert assign.value.reads() == {"w", "q"}
    assert {(d.kind, d.bits) for d in ask("m", "parts")} == {
        (WriterKind.CONTINUOUS, (1, 0)),
        (WriterKind.INSTANCE, (3, 2)),
    }
    combinational = ask("m", "c")
    assert {d.kind for d in combinational} == {WriterKind.COMBINATIONAL}
    assert isinstance(combinational[0].value, Case)
    (latch,) = ask("m", "l")
    assert latch.kind is WriterKind.LATCH
    assert isinstance(latch.value, Statement)
    (clocked,) = ask("m", "q")
    assert clocked.kind is WriterKind.CLOCKED
    assert ask("m", "d") == ask("m", "held") == ask("m", "nothing") == ()


def test_drivers_inside_generate_scopes(sample: Reader) -> None:
    found = sample(
        "module m(input clk, input [1:0] d, output reg [1:0] q); for (genvar i = 0; i < 2; i++) begin : g\n"
        "wire w; assign w = ~d[i]; always @(posedge clk) q[i] <= w; end endmodule"
    )
    (driver,) = found.design.drivers.drivers_of("m", "g[1].w")
    assert isinstance(driver.value, Expr)
    assert driver.value.key == "~d[g[1].i]"


def test_designs_outlive_everything_else(tmp_path: Path) -> None:
    """A dropped compilation with symbols still held crashes the process; drivers keep their owner."""
    (tmp_path / "t.sv").write_text(LOGIC)
    drivers = [read(["t.sv", f"-DN{n}"], str(tmp_path)).drivers for n in range(20)]
    gc.collect()
    assert all(d.drivers_of("m", "c") for d in drivers)
    del drivers
    gc.collect()
