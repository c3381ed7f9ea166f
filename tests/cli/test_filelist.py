"""File lists. Outside check: slang's own driver reads them back (pyslang 12.1)."""

import shutil
from pathlib import Path
from typing import Any, cast

import pytest
from pyslang.driver import CommandLineOptions, Driver

from rewriter import tools
from rewriter.model.errors import UserError
from rewriter.model.source import RtlSource
from rewriter.report.filelist import render


def slang_reads(file: Path) -> list[str]:
    """Compile a list with slang, and give the names of the top's parameters' values."""
    driver = Driver()
    driver.addStandardArgs()
    options = CommandLineOptions()
    options.ignoreProgramName = True
    assert driver.parseCommandLine(f'-F "{file}"', options)
    assert driver.processOptions()
    assert driver.parseAllSources()
    compilation = driver.createCompilation()
    assert not [str(found.code) for found in compilation.getAllDiagnostics()]
    top = cast("Any", compilation.getRoot()).topInstances[0]
    return [str(top.name), *(str(item.value) for item in top.body.parameters)]


@pytest.fixture
def sources(tmp_path: Path) -> RtlSource:
    folder = tmp_path / "my rtl"
    (folder / "inc #1").mkdir(parents=True)
    (folder / "inc #1" / "h.vh").write_text("`define FROM_HEADER 5\n")
    (folder / "a.sv").write_text(
        '`include "h.vh"\n`ifdef GONE\nsyntax error\n`endif\n'
        "module a #(parameter int P = 1, parameter int Q = `FROM_HEADER, parameter R = `V) (); cell1 c (); endmodule\n"
    )
    (folder / "cells.v").write_text("module cell1; endmodule\n")
    return RtlSource(
        files=(str(folder / "a.sv"),),
        library_files=(str(folder / "cells.v"),),
        include_dirs=(str(folder / "inc #1"),),
        defines=('S="x y\\\\n"', "V=4'h3"),
        undefines=("GONE",),
        tops=("a",),
        parameters=("P=32'h1A",),
        options=("--std", "1800-2023", "--allow-use-before-declare"),
    )


def test_slang_reads_back_what_was_given(sources: RtlSource, tmp_path: Path) -> None:
    (tmp_path / "l.f").write_text(render(sources, "a list"))
    assert slang_reads(tmp_path / "l.f") == ["a", "26", "5", "4'b11"]


def test_one_entry_a_line(sources: RtlSource) -> None:
    text = render(RtlSource(("/r/a.sv",), include_dirs=("/r/inc",), options=sources.options), "a list")
    assert text == "// a list\n+incdir+/r/inc\n--std 1800-2023\n--allow-use-before-declare\n/r/a.sv\n"


def test_icarus_reads_the_common_forms(tmp_path: Path) -> None:
    (tmp_path / "a.v").write_text('`include "h.vh"\nmodule a; initial $display(`H + `D); endmodule\n')
    (tmp_path / "inc").mkdir()
    (tmp_path / "inc" / "h.vh").write_text("`define H 40\n")
    source = RtlSource((str(tmp_path / "a.v"),), include_dirs=(str(tmp_path / "inc"),), defines=("D=2",))
    (tmp_path / "l.f").write_text(render(source, "a list"))
    assert shutil.which("iverilog"), "Icarus is missing: apt-get install iverilog"
    built = tools.run("iverilog", ["-o", "a.vvp", "-f", "l.f"], folder=tmp_path, seconds=60)
    assert built.ok, built.stderr
    assert tools.run("vvp", ["-N", "a.vvp"], folder=tmp_path, seconds=60).stdout.split() == ["42"]


@pytest.mark.parametrize("name", ["/r/$HOME/a.sv", "/r/${x}.sv", "/r/$(x).sv", "/r/a\nb.sv"])
def test_names_that_no_list_can_carry(name: str) -> None:
    with pytest.raises(UserError, match="cannot be written into a file list"):
        render(RtlSource((name,)), "a list")
