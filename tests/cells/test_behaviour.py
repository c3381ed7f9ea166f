"""The wrappers in simulation: state table, glitches, pulse count, resets and clocks of all styles."""

import re
from pathlib import Path

import pytest

from rewriter import tools
from rewriter.model.cells import COUNT, EXACT, FILES, WRAPPERS
from rewriter.model.design import Edge
from tests.cells.cell_texts import BAD_CELLS, GATING, LIBRARIES, invented, mapped, wrapper
from tests.support.simulators import icarus, verilator, write

HERE = Path(__file__).parent
EDGES = [pytest.param(edge, id=edge.value) for edge in Edge]
WRITTEN = [
    pytest.param(name, edge, id=f"{name}-{edge.value}")
    for name in GATING
    for edge in Edge
    if edge is Edge.RISING or name not in LIBRARIES
]
ALL_MOVES = "state-table bad 0 moves 36"

pytestmark = pytest.mark.simulator


def bench(name: str) -> dict[str, str]:
    return {name: (HERE / name).read_text(encoding="utf-8")}


def defines_for(edge: Edge, *more: str) -> tuple[str, ...]:
    falling = ("FALLING",) if edge is Edge.FALLING else ()
    return (f"WRAPPER={WRAPPERS[edge]}", *falling, *more)


def walk(folder: Path, texts: dict[str, str], edge: Edge, *defines: str) -> str:
    files = write(folder, texts | bench("state_table.sv"))
    return icarus(folder, files, defines=defines_for(edge, *defines))


@pytest.mark.parametrize("edge", EDGES)
@pytest.mark.parametrize("name", ["behavioural", "discrete"])
def test_simulation_text_keeps_the_state_table(tmp_path: Path, name: str, edge: Edge) -> None:
    assert walk(tmp_path, wrapper(name, edge), edge, EXACT).strip() == ALL_MOVES


@pytest.mark.parametrize("edge", EDGES)
def test_discrete_synthesis_text_keeps_the_state_table(tmp_path: Path, edge: Edge) -> None:
    assert walk(tmp_path, wrapper("discrete", edge), edge, "SYNTHESIS").strip() == ALL_MOVES


@pytest.mark.parametrize("name", LIBRARIES)
@pytest.mark.parametrize("defines", [("SYNTHESIS",), (EXACT,), ("SYNTHESIS", "STILLCLOCK_SIMULATION", EXACT)])
def test_mapped_wrapper_keeps_the_state_table(tmp_path: Path, name: str, defines: tuple[str, ...]) -> None:
    assert walk(tmp_path, mapped(name), Edge.RISING, *defines).strip() == ALL_MOVES


@pytest.mark.parametrize("edge", EDGES)
def test_map_with_both_edges_keeps_the_state_table(tmp_path: Path, edge: Edge) -> None:
    assert walk(tmp_path, invented(tmp_path), edge, "SYNTHESIS").strip() == ALL_MOVES


def pulses(folder: Path, texts: dict[str, str], edge: Edge, *defines: str) -> tuple[int, int, int]:
    files = write(folder, texts | bench("glitches.sv"))
    printed = icarus(folder, files, defines=defines_for(edge, *defines))
    found = re.search(r"glitches pulses (\d+) asked (\d+) misshapen (\d+)", printed)
    assert found, printed
    return int(found[1]), int(found[2]), int(found[3])


@pytest.mark.parametrize("edge", EDGES)
@pytest.mark.parametrize("name", ["behavioural", "discrete"])
def test_one_clean_pulse_for_every_cycle_asked_for(tmp_path: Path, name: str, edge: Edge) -> None:
    ran, asked, misshapen = pulses(tmp_path, wrapper(name, edge), edge, EXACT)
    assert 400 < asked < 800
    assert (ran, misshapen) == (asked, 0)


@pytest.mark.parametrize("name", LIBRARIES)
def test_one_clean_pulse_from_mapped_wrappers(tmp_path: Path, name: str) -> None:
    ran, asked, misshapen = pulses(tmp_path, mapped(name), Edge.RISING, "SYNTHESIS")
    assert (ran, misshapen) == (asked, 0)


@pytest.mark.parametrize("edge", EDGES)
@pytest.mark.parametrize("fault", BAD_CELLS)
def test_the_benches_see_a_bad_cell(tmp_path: Path, fault: str, edge: Edge) -> None:
    """A flop of the same edge differs in glitches alone, the others in the state table already."""
    text = {FILES[edge]: BAD_CELLS[fault][edge]}
    ran, asked, misshapen = pulses(tmp_path, text, edge)
    assert (ran, misshapen) != (asked, 0)
    if fault != "a flop of the bank's own edge":
        assert re.search(r"state-table bad [1-9]", walk(tmp_path, text, edge))


@pytest.mark.parametrize("edge", EDGES)
def test_without_a_latch_the_clock_glitches(tmp_path: Path, edge: Edge) -> None:
    _, _, misshapen = pulses(tmp_path, {FILES[edge]: BAD_CELLS["no latch"][edge]}, edge)
    assert misshapen > 100


@pytest.mark.parametrize("name, edge", WRITTEN)
def test_counter_prints_the_pulses(tmp_path: Path, name: str, edge: Edge) -> None:
    files = write(tmp_path, wrapper(name, edge) | bench("glitches.sv"))
    printed = icarus(tmp_path, files, defines=defines_for(edge, EXACT, COUNT))
    counted = re.search(r"stillclock-count glitches\.dut (\d+)$", printed, re.MULTILINE)
    assert counted
    assert f"glitches pulses {counted[1]} " in printed


def reset_styles(folder: Path, edge: Edge, *defines: str) -> dict[tuple[int, int], tuple[int, int]]:
    files = write(folder, wrapper("behavioural", edge) | bench("reset_styles.sv"))
    printed = icarus(folder, files, defines=defines_for(edge, *defines)[1:])
    rows = re.findall(r"reset (\d) clock (\d) bad (\d+) unknown (\d+)", printed)
    return {(int(reset), int(clock)): (int(bad), int(unknown)) for reset, clock, bad, unknown in rows}


@pytest.mark.parametrize("edge", EDGES)
def test_every_style_of_reset_and_clock_reaches_a_sleeping_bank(tmp_path: Path, edge: Edge) -> None:
    """Four styles of reset times four of clock, the test pin left open (z): no mismatch, nothing left unknown."""
    assert reset_styles(tmp_path, edge) == {(reset, clock): (0, 0) for reset in range(4) for clock in range(4)}


@pytest.mark.parametrize("edge", EDGES)
def test_it_is_the_first_edge_that_reaches_it(tmp_path: Path, edge: Edge) -> None:
    """Without the first edge, a reset that is low from time 0 (styles 0 and 1) never reaches a sleeping bank."""
    found = reset_styles(tmp_path, edge, EXACT)
    assert {style for style, (bad, _) in found.items() if bad} == {
        (reset, clock) for reset in (0, 1) for clock in range(4)
    }


@pytest.mark.parametrize("edge", EDGES)
def test_open_test_pin_is_no_test(tmp_path: Path, edge: Edge) -> None:
    """The wake pin low for good, the test pin at z and at x: only the first edge passes."""
    text = f"""
    module open_pin;
        reg clk = 0; reg test = 1'bz; wire gclk; integer pulses = 0, unknown = 0;
        {WRAPPERS[edge]} dut (.clk(clk), .wake(1'b0), .test(test), .gclk(gclk));
        always @({"posedge" if edge is Edge.RISING else "negedge"} gclk) pulses = pulses + 1;
        always @(clk) #1 if (gclk === 1'bx) unknown = unknown + 1;
        initial begin
            repeat (40) #5 clk = ~clk;
            test = 1'bx;
            repeat (40) #5 clk = ~clk;
            #2 $display("pulses %0d unknown %0d", pulses, unknown);
            $finish;
        end
    endmodule
    """
    files = write(tmp_path, wrapper("behavioural", edge) | {"open_pin.sv": text})
    assert icarus(tmp_path, files).strip() == "pulses 1 unknown 0"


@pytest.mark.parametrize("edge", EDGES)
def test_transparent_wrapper_is_a_wire(tmp_path: Path, edge: Edge) -> None:
    text = f"""
    module wire_bench;
        reg clk = 0; wire gclk; integer bad = 0;
        {WRAPPERS[edge]} dut (.clk(clk), .wake(1'b0), .test(1'b0), .gclk(gclk));
        initial begin
            repeat (20) begin #5 clk = ~clk; #1 if (gclk !== clk) bad = bad + 1; end
            $display("bad %0d", bad);
        end
    endmodule
    """
    files = write(tmp_path, wrapper("transparent", edge) | {"wire_bench.sv": text})
    assert icarus(tmp_path, files).strip() == "bad 0"


@pytest.mark.slow
@pytest.mark.parametrize("edge", EDGES)
def test_verilator_agrees(tmp_path: Path, edge: Edge) -> None:
    """The coding for Verilator is another one: the same state table, pulses and count."""
    files = write(tmp_path, wrapper("behavioural", edge) | bench("glitches.sv"))
    printed = verilator(tmp_path, "glitches", files, defines=defines_for(edge, EXACT, COUNT))
    found = re.search(r"glitches pulses (\d+) asked (\d+) misshapen (\d+)", printed)
    assert found, printed
    assert (found[1], found[3]) == (found[2], "0")
    assert re.search(rf"^stillclock-count \S*dut {found[1]}$", printed, re.MULTILINE)


@pytest.mark.slow
def test_verilator_resets_a_sleeping_bank(tmp_path: Path) -> None:
    files = write(tmp_path, wrapper("behavioural", Edge.RISING) | bench("reset_styles.sv"))
    printed = verilator(tmp_path, "reset_styles", files)
    assert len(re.findall(r"^reset \d clock \d bad 0 unknown 0$", printed, re.MULTILINE)) == 16


@pytest.mark.parametrize("name, edge", [*WRITTEN, ("transparent", Edge.RISING), ("transparent", Edge.FALLING)])
def test_wrapper_is_verilog_2001(tmp_path: Path, name: str, edge: Edge) -> None:
    """Icarus reads every wrapper and model with -g2001, as Verilog-2001 (IEEE 1364-2001)."""
    files = write(tmp_path, mapped(name) if name in LIBRARIES else wrapper(name, edge))
    for define in ("ORDINARY",) if name == "behavioural" else ("ORDINARY", "SYNTHESIS"):
        arguments = ["-g2001", "-Wall", f"-D{define}", "-s", WRAPPERS[edge], "-o", "out.vvp", *files]
        built = tools.run("iverilog", arguments, folder=tmp_path, seconds=60)
        assert (built.status, built.stdout + built.stderr) == (0, ""), define
