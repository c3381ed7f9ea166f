"""No tool says anything about the wrappers and the models: Verilator -Wall, Icarus -Wall, slang, Yosys."""

from pathlib import Path

import pytest
from pyslang.driver import Driver

from rewriter import tools
from rewriter.edit.cells import load_cell_map, render_cells, shipped_maps
from rewriter.model.cells import COUNT, EXACT, NEEDS_MAP, WRAPPERS
from rewriter.model.design import Edge
from tests.cells.cell_texts import LIBRARIES, mapped, wrapper
from tests.support.simulators import write, yosys

SIMULATION = ("ORDINARY", EXACT, COUNT)
RENDERED = [
    pytest.param(name, edge, id=f"{name}-{edge.value}")
    for name in shipped_maps()
    for edge in Edge
    if load_cell_map(name).supports(edge)
]


def texts_of(name: str, edge: Edge) -> dict[str, str]:
    return mapped(name) if name in LIBRARIES else wrapper(name, edge)


def defines_of(name: str) -> tuple[str, ...]:
    """A behavioural wrapper has no synthesis text to lint."""
    return SIMULATION if name == "behavioural" else (*SIMULATION, "SYNTHESIS")


@pytest.mark.simulator
@pytest.mark.parametrize("name, edge", RENDERED)
def test_verilator(tmp_path: Path, name: str, edge: Edge) -> None:
    files = write(tmp_path, texts_of(name, edge))
    for define in defines_of(name):
        # Other modules of a file list may stand in it unused; here the models do, unless SYNTHESIS is defined.
        listed = files if define == "SYNTHESIS" else files[:1]
        for language in ("1364-2001", "1800-2012"):
            arguments = ["--lint-only", "-Wall", "--timing", "--default-language", language, f"-D{define}"]
            ran = tools.run(
                "verilator", [*arguments, "--top-module", WRAPPERS[edge], *listed], folder=tmp_path, seconds=60
            )
            assert (ran.status, ran.stdout + ran.stderr) == (0, ""), (define, language)


@pytest.mark.simulator
@pytest.mark.parametrize("name, edge", RENDERED)
def test_icarus(tmp_path: Path, name: str, edge: Edge) -> None:
    files = write(tmp_path, texts_of(name, edge))
    for define in defines_of(name):
        arguments = ["-g2012", "-Wall", f"-D{define}", "-s", WRAPPERS[edge], "-o", "out.vvp", *files]
        ran = tools.run("iverilog", arguments, folder=tmp_path, seconds=60)
        assert (ran.status, ran.stdout + ran.stderr) == (0, ""), define


@pytest.mark.parametrize("name, edge", RENDERED)
def test_slang(tmp_path: Path, name: str, edge: Edge) -> None:
    files = write(tmp_path, texts_of(name, edge))
    for define in defines_of(name):
        assert slang_says(tmp_path, files, "-Weverything", f"-D{define}") == [], define


def slang_says(folder: Path, files: list[str], *flags: str) -> list[str]:
    driver = Driver()
    driver.addStandardArgs()
    words = ["slang", *flags, *(str(folder / name) for name in files)]
    assert driver.parseCommandLine(" ".join(f'"{word}"' for word in words))
    assert driver.processOptions()
    assert driver.parseAllSources()
    compilation = driver.createCompilation()
    return [str(diagnostic.code) for diagnostic in compilation.getAllDiagnostics()]


@pytest.mark.engine
@pytest.mark.parametrize("name, edge", [case for case in RENDERED if case.values[0] != "behavioural"])
def test_yosys(tmp_path: Path, name: str, edge: Edge) -> None:
    files = write(tmp_path, texts_of(name, edge))
    # Yosys tells of every latch it infers; a cell without a clock-gating cell of a library is one.
    script = f"read_verilog {' '.join(files)}; hierarchy -check -top {WRAPPERS[edge]}; proc; check -assert"
    ran = yosys(tmp_path, script)
    said = [
        line for line in (ran.stdout + ran.stderr).splitlines() if "Warning" in line and "Latch inferred" not in line
    ]
    assert (ran.status, said) == (0, [])


def test_slang_finds_no_cell_in_a_synthesis_run_without_a_map(tmp_path: Path) -> None:
    files = write(tmp_path, render_cells(load_cell_map("behavioural"), None))
    assert slang_says(tmp_path, files, "-DSYNTHESIS") == ["DiagCode(UnknownModule)"] * 2
    assert NEEDS_MAP in (tmp_path / files[0]).read_text(encoding="utf-8")


def test_timescale_stands_before_the_module_exactly_when_given(tmp_path: Path) -> None:
    """IEEE 1800-2017 clause 22.7; slang reports MissingTimeScale when only some modules have one."""
    design = (
        "`timescale 1ns/1ps\nmodule bank(input wire c, w, t, output wire g);\n"
        "stillclock_icg u (c, w, t, g);\nendmodule\n"
    )
    with_one = render_cells(load_cell_map("behavioural"), "1ns/1ps")
    without = render_cells(load_cell_map("behavioural"), None)
    assert all(text.count("`timescale 1ns/1ps\n") == 1 for text in with_one.values())
    assert not any("timescale" in text for text in without.values())
    files = write(tmp_path, with_one | {"bank.sv": design})
    assert slang_says(tmp_path, files, "-Weverything") == []
    files = write(tmp_path, without | {"bank.sv": design})
    assert "DiagCode(MissingTimeScale)" in slang_says(tmp_path, files)


def test_wrappers_joined_into_one_file_still_compile(tmp_path: Path) -> None:
    joined = "".join(render_cells(load_cell_map("discrete"), None).values())
    files = write(tmp_path, {"cells.v": joined})
    assert slang_says(tmp_path, files, "-Weverything", "-DSYNTHESIS") == []
    assert slang_says(tmp_path, files, "-Weverything") == []
