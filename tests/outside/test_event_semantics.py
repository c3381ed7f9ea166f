"""Events, as the standard has them and Icarus does them: each is a reason why some bank is refused, or may be gated.

Source: IEEE 1800-2017, clauses 4 (scheduling), 9.2.2 (always procedures), 9.4.2 (event control).
"""

from pathlib import Path

import pytest

from tests.support.simulators import icarus, write

pytestmark = pytest.mark.simulator


def run(folder: Path, text: str) -> list[str]:
    return icarus(folder, write(folder, {"bench.v": text})).split()


def test_edges_between_all_four_values(tmp_path: Path) -> None:
    """Table 9-2: 0 to anything and x or z to 1 are rising; 1 to anything and x or z to 0 are falling."""
    changes = [(a, b) for a in "01xz" for b in "01xz" if a != b]
    steps = "\n".join(
        f"        s = 1'b{a}; #1 up = 0; down = 0; s = 1'b{b}; #1 $display(\"{a}{b}%0d%0d\", up, down);"
        for a, b in changes
    )
    text = (
        "module bench;\n    reg s; integer up = 0, down = 0;\n    always @(posedge s) up = up + 1;\n"
        f"    always @(negedge s) down = down + 1;\n    initial begin\n{steps}\n    end\nendmodule\n"
    )
    rising = {a + b for a, b in changes if a == "0" or (b == "1" and a in "xz")}
    falling = {a + b for a, b in changes if a == "1" or (b == "0" and a in "xz")}
    assert run(tmp_path, text) == [f"{a}{b}{int(a + b in rising)}{int(a + b in falling)}" for a, b in changes]


def test_a_reset_that_loads_a_signal_loads_it_again_at_every_clock_edge(tmp_path: Path) -> None:
    """Why `async-load` is refused: the block runs at every event in its list (9.4.2), the reset branch as well."""
    text = """module bench;
    reg clk = 0, rst_n = 1; reg [3:0] boot = 3, q, gated;
    wire gclk = clk & 1'b0;
    always @(posedge clk or negedge rst_n) if (!rst_n) q <= boot;
    always @(posedge gclk or negedge rst_n) if (!rst_n) gated <= boot;
    initial begin
        #1 rst_n = 0; #1 boot = 9; #1 clk = 1; #1 $display("%0d %0d", q, gated);
    end
endmodule
"""
    assert run(tmp_path, text) == ["9", "3"]


def test_the_end_of_one_of_two_resets_is_no_event(tmp_path: Path) -> None:
    """Why resets that load different values are refused: the second value comes with the next clock edge only."""
    text = """module bench;
    reg clk = 0, rst_n = 1, set_n = 1; reg [3:0] q, gated;
    wire gclk = clk & 1'b0;
    always @(posedge clk or negedge rst_n or negedge set_n) if (!rst_n) q <= 0; else if (!set_n) q <= 15;
    always @(posedge gclk or negedge rst_n or negedge set_n) if (!rst_n) gated <= 0; else if (!set_n) gated <= 15;
    initial begin
        #1 set_n = 0; #1 rst_n = 0; #1 rst_n = 1; #1 $display("%0d %0d", q, gated);
        clk = 1; #1 $display("%0d %0d", q, gated);
    end
endmodule
"""
    assert run(tmp_path, text) == ["0", "0", "15", "0"]


def test_a_blocking_source_depends_on_the_order_of_the_blocks(tmp_path: Path) -> None:
    """Why `blocking-source` is refused: processes of one time step run in any order (4.7).

    Icarus happens to follow the order of the text, so that both answers can be seen. Behind a gate the clock arrives
    later than the blocking assignment, whatever the order.
    """
    count = "    always @(posedge clk) n = n + 1;"
    watch = "    always @(posedge CLOCK) seen <= n;"
    seen: dict[tuple[str, str], str] = {}
    for clock in ("clk", "gclk"):
        for order in ("count first", "watch first"):
            blocks = (count, watch) if order == "count first" else (watch, count)
            text = "\n".join([
                "module bench;", "    reg clk = 0; integer n = 0, seen = 0, i;", "    wire gclk = clk & 1'b1;",
                *(block.replace("CLOCK", clock) for block in blocks),
                "    initial begin", "        for (i = 0; i < 11; i = i + 1) #1 clk = ~clk;",
                '        #1 $display("%0d", seen);', "    end", "endmodule", "",
            ])  # fmt: skip
            folder = tmp_path / f"{clock} {order}"
            folder.mkdir()
            (seen[clock, order],) = run(folder, text)
    assert seen["clk", "count first"] != seen["clk", "watch first"]
    assert seen["gclk", "count first"] == seen["gclk", "watch first"] == "6"


def test_always_star_does_not_run_at_time_zero_but_always_comb_does(tmp_path: Path) -> None:
    """Why a wake condition is always_comb, or an assign: `@*` waits for a change (9.2.2.2.2)."""
    text = """module bench;
    reg a = 1, star; logic comb;
    wire one = 1'b1;
    wire assigned = one;
    always @* star = 1'b0 | (one & 1'b0);
    always_comb comb = one & 1'b0;
    initial #1 $display("%b%b%b", comb, assigned, a);
endmodule
"""
    assert run(tmp_path, text) == ["011"]
    constant = text.replace("wire one", "localparam one").replace('"%b%b%b", comb, assigned, a', '"%b%b", comb, star')
    (tmp_path / "constant").mkdir()
    assert run(tmp_path / "constant", constant) == ["0x"]


def test_a_clock_made_with_a_non_blocking_assignment_races_with_its_parent(tmp_path: Path) -> None:
    """Why a bank on a divided clock is refused: what the parent launches arrives before the divided edge (4.4)."""
    text = """module bench;
    reg clk = 0, half = 0, go = 0, held = 0; integer plain = 0, gated = 0;
    always @(posedge clk) half <= ~half;
    always @(posedge clk) go <= ~go;
    wire g;
    always @* if (!half) held = go;
    assign g = half & held;
    always @(posedge half) if (go) plain = plain + 1;
    always @(posedge g) if (go) gated = gated + 1;
    integer i;
    initial begin
        for (i = 0; i < 40; i = i + 1) #1 clk = ~clk;
        #1 $display("%0d", plain != gated);
    end
endmodule
"""
    assert run(tmp_path, text) == ["1"]
