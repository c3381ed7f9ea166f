"""What the rewriting relies on, as the standard says it and as Icarus and Yosys do it.

Source: IEEE 1800-2017 (quoted by clause; IEEE 1364-2005 says the same in 9.5). The tables below follow from the text
of the clause; nothing here comes from the program under test.
"""

import itertools
import re
from collections.abc import Callable
from pathlib import Path

import pytest

from tests.support.simulators import icarus, write, yosys

TWO, FOUR = "01", "01xz"


def same(a: str, b: str) -> bool:
    """Case: each bit matches exactly, x and z included (12.5)."""
    return a == b


def same_z(a: str, b: str) -> bool:
    """Casez: z (or ?) in either is a do-not-care (12.5.1)."""
    return all(p == q or "z" in (p, q) for p, q in zip(a, b, strict=True))


def same_x(a: str, b: str) -> bool:
    """Casex: z and x in either are do-not-cares (12.5.1)."""
    return all(p == q or p in "xz" or q in "xz" for p, q in zip(a, b, strict=True))


# Overlapping labels: the first that matches wins (12.5), without a match nothing happens.
LABELS = {"case": ("01", "1x", "11"), "casez": ("1?", "?1", "00"), "casex": ("x1", "1x", "00")}
MATCHES: dict[str, Callable[[str, str], bool]] = {"case": same, "casez": same_z, "casex": same_x}


def expected(keyword: str, selector: str) -> str:
    labels = [label.replace("?", "z") for label in LABELS[keyword]]
    return next((str(n + 1) for n, label in enumerate(labels) if MATCHES[keyword](selector, label)), "0")


def case_text(keyword: str) -> str:
    items = "\n".join(f"        2'b{label}: n = {place + 1};" for place, label in enumerate(LABELS[keyword]))
    return (
        f"module choose_{keyword} (input [1:0] s, output reg [1:0] n);\n    always @(s) begin\n        n = 0;\n"
        f"        {keyword} (s)\n{items}\n        endcase\n    end\nendmodule\n"
    )


@pytest.mark.simulator
@pytest.mark.parametrize("keyword", LABELS)
def test_case_in_icarus(tmp_path: Path, keyword: str) -> None:
    values = ["".join(bits) for bits in itertools.product(FOUR, repeat=2)]
    steps = "\n".join(f'        s = 2\'b{value}; #1 $display("{value} %0d", n);' for value in values)
    bench = (
        f"module bench;\n    reg [1:0] s; wire [1:0] n;\n    choose_{keyword} dut (s, n);\n    initial begin\n"
        f"        s = 2'b00; #1 s = 2'b11; #1;\n{steps}\n    end\nendmodule\n"
    )
    said = icarus(tmp_path, write(tmp_path, {"c.v": case_text(keyword), "b.v": bench})).splitlines()
    assert dict(line.split() for line in said) == {value: expected(keyword, value) for value in values}


def table(folder: Path, text: str, inputs: str, output: str, *, slang: bool = False) -> dict[str, str]:
    """Evaluate a combinational module in Yosys for every value of its inputs."""
    write(folder, {"t.sv": text})
    top = text.split()[1]
    reader = f"read_slang -j 1 --top {top}" if slang else "read_verilog -sv"
    ran = yosys(folder, f"{reader} t.sv; hierarchy -top {top}; proc; opt_clean; eval -table {inputs} -show {output}")
    assert ran.ok, ran.stdout + ran.stderr
    rows = re.findall(r"^ *((?:\d+'[01]+ +)+)\| *\d+'([01x]+) *$", ran.stdout, re.MULTILINE)
    assert rows, ran.stdout
    return {" ".join(re.findall(r"'([01]+)", left)): right for left, right in rows}


@pytest.mark.engine
@pytest.mark.parametrize("keyword", ["casez", "casex"])
def test_case_in_yosys(tmp_path: Path, keyword: str) -> None:
    found = table(tmp_path, case_text(keyword), "s", "n")
    assert found == {"".join(s): f"{int(expected(keyword, ''.join(s))):02b}" for s in itertools.product(TWO, repeat=2)}


INSIDE = """module range (input [3:0] v, output reg [1:0] n);
    always_comb begin
        n = 0;
        case (v) inside
            4'd0, 4'd7: n = 1;
            [4'd5:4'd9]: n = 2;
            4'b11?1: n = 3;
        endcase
    end
endmodule
"""


@pytest.mark.engine
def test_case_inside_in_yosys(tmp_path: Path) -> None:
    """Ranges hold both ends, ? is a wildcard of the label, the first match wins (12.5.4, 11.4.13)."""
    found = table(tmp_path, INSIDE, "v", "n", slang=True)

    def wanted(v: int) -> int:
        if v in (0, 7):
            return 1
        return 2 if 5 <= v <= 9 else 3 if v & 0b1101 == 0b1101 else 0

    assert found == {f"{v:04b}": f"{wanted(v):02b}" for v in range(16)}


WIDTHS = """module widths (input [1:0] a, b, output reg plain, reduced, compared);
    always @(a or b) begin
        if (a + b) plain = 1; else plain = 0;
        reduced = |(a + b);
        compared = (a + b) != 0;
    end
endmodule
"""


def test_a_comparison_with_zero_would_widen_the_condition(tmp_path: Path) -> None:
    """An `if` condition is self-determined; `0` widens the operands of `!=` to 32 bits (11.6.1, 11.8.1, 12.4)."""
    carries = {f"{a:02b} {b:02b}" for a in range(4) for b in range(4) if a + b == 4}
    steps = "\n".join(
        f'        a = {a}; b = {b}; #1 $display("%b %b %b%b%b", a, b, plain, reduced, compared);'
        for a in range(4) for b in range(4)
    )  # fmt: skip
    bench = (
        "module bench;\n    reg [1:0] a, b; wire plain, reduced, compared;\n"
        "    widths dut (a, b, plain, reduced, compared);\n    initial begin\n"
        f"        a = 3; b = 3; #1;\n{steps}\n    end\nendmodule\n"
    )
    said = icarus(tmp_path, write(tmp_path, {"w.v": WIDTHS, "b.v": bench})).splitlines()
    seen = {line[:5]: line[6:] for line in said}
    assert len(seen) == 16
    assert {key for key, (plain, reduced, compared) in seen.items() if plain == reduced != compared} == carries
    assert all(plain == reduced for plain, reduced, _ in seen.values())


@pytest.mark.engine
def test_yosys_agrees_on_the_widths(tmp_path: Path) -> None:
    columns = {name: table(tmp_path, WIDTHS, "a,b", name) for name in ("plain", "reduced", "compared")}
    assert columns["plain"] == columns["reduced"]
    assert [key for key in columns["plain"] if columns["plain"][key] != columns["compared"][key]] == [
        "01 11", "10 10", "11 01",
    ]  # fmt: skip


UNKNOWN = """module unknown (input [1:0] a, output reg taken, exact);
    always @(a) begin
        taken = 0; exact = 0;
        if (a == 2'b1x) taken = 1;
        case (a) 2'b1x: exact = 1; default: ; endcase
    end
endmodule
"""


@pytest.mark.engine
@pytest.mark.simulator
def test_x_in_a_condition_means_something_else_to_each_engine(tmp_path: Path) -> None:
    """In simulation an unknown condition is false (12.4) and `case` finds x only in x (12.5); synthesis has no x.

    That is why a wake condition with an x constant is refused (`x-in-wake`).
    """
    bench = (
        "module bench;\n    reg [1:0] a; wire taken, exact;\n    unknown dut (a, taken, exact);\n    initial begin\n"
        + "".join(f'        a = 2\'b{v}; #1 $display("{v} %b%b", taken, exact);\n' for v in ("11", "00", "10", "1x"))
        + "    end\nendmodule\n"
    )
    said = icarus(tmp_path, write(tmp_path, {"u.v": UNKNOWN, "b.v": bench})).splitlines()
    assert said == ["11 00", "00 00", "10 00", "1x 01"]
    in_yosys = table(tmp_path, UNKNOWN, "a", "taken")
    assert {in_yosys["10"], in_yosys["11"]} != {"0"}, "Yosys agrees now: look at x-in-wake anew"
