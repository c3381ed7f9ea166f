"""The demo design is sound RTL for every tool, and its testbench sees faults."""

import re
from pathlib import Path

import pytest

from rewriter import resources, tools
from tests.support.simulators import icarus, verilator, yosys

DESIGN = ("water_level.sv", "settings.sv", "uplink.v", "lantern.sv", "tide_gauge.sv")
BENCH = "demo_tb.sv"
PASSED = re.compile(r"TIDE GAUGE: all 1\d{5} checks passed\n")

FAULTS = {
    "water_level.sv": [
        ("else if (adc_valid) begin\n            tap0", "else begin\n            tap0"),
        ("tap3 <= tap2;", "tap3 <= tap1;"),
        ("if (corrected > highest)", "if (corrected >= lowest)"),
        ("uptime + 16'd1", "uptime + 16'd2"),
    ],
    "settings.sv": [
        ("5'd1: alarm_level", "5'd7: alarm_level"),
        ("write && address == 5'd8 + 5'(i)", "write && address[2:0] == 3'(i)"),
        ("else if (!write) begin", "else begin"),
        ("line + 4'd1", "line + 4'd3"),
    ],
    "uplink.v": [
        ("remaining <= 6'd15", "remaining <= 6'd14"),
        ("checksum  <= 8'hff", "checksum  <= 8'h00"),
        ("sent  <= sent + 16'd1", "sent  <= sent"),
    ],
    "lantern.sv": [
        ("always_ff @(negedge clk or", "always_ff @(posedge clk or"),
        ("dark && step", "step"),
        ("mode <= straps", "mode <= 4'd0"),
    ],
    "tide_gauge.sv": [
        ("due ? report_every", "due ? 16'd600"),
        ("mean > alarm_level", "level > alarm_level"),
    ],
}


@pytest.fixture
def demo(tmp_path: Path) -> Path:
    """Copy the shipped demo."""
    for item in resources.templates().joinpath("demo").iterdir():
        (tmp_path / item.name).write_text(item.read_text(encoding="utf-8"), encoding="utf-8")
    return tmp_path


def test_file_list_names_the_design(demo: Path) -> None:
    listed = [line for line in (demo / "demo.f").read_text(encoding="utf-8").split("\n") if line and line[0] != "/"]
    assert tuple(listed) == DESIGN
    assert 200 <= sum((demo / name).read_text(encoding="utf-8").count("\n") for name in DESIGN) <= 400


@pytest.mark.simulator
def test_verilator_has_nothing_to_say(demo: Path) -> None:
    ran = tools.run(
        "verilator", ["--lint-only", "-Wall", "--top-module", "tide_gauge", "-F", "demo.f"], folder=demo, seconds=60
    )
    assert (ran.status, ran.stdout + ran.stderr) == (0, "")


@pytest.mark.engine
def test_engine_elaborates_it(demo: Path) -> None:
    ran = yosys(
        demo, "read_slang -j 1 --top tide_gauge -F demo.f; hierarchy -check -top tide_gauge; proc; check -assert"
    )
    assert ran.ok, ran.stdout + ran.stderr
    assert "Build succeeded: 0 errors, 0 warnings" in ran.stdout
    assert "Warning:" not in ran.stdout + ran.stderr


@pytest.mark.simulator
def test_bench_passes_with_icarus(demo: Path) -> None:
    assert PASSED.fullmatch(icarus(demo, [BENCH, *DESIGN]))


@pytest.mark.simulator
@pytest.mark.slow
def test_bench_passes_with_verilator(demo: Path) -> None:
    assert PASSED.match(verilator(demo, "demo_tb", [BENCH, *DESIGN]))


@pytest.mark.simulator
@pytest.mark.parametrize("name, fault", [(name, fault) for name, faults in FAULTS.items() for fault in faults])
def test_bench_sees_a_fault(demo: Path, name: str, fault: tuple[str, str]) -> None:
    text = (demo / name).read_text(encoding="utf-8")
    assert text.count(fault[0]) == 1
    (demo / name).write_text(text.replace(*fault), encoding="utf-8")
    assert "checks FAILED" in icarus(demo, [BENCH, *DESIGN])
