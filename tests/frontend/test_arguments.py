"""RTL arguments: lists, options, and the opened-up source that stands for them."""

from pathlib import Path

import pytest

from rewriter.frontend import elaborate, open_up, read
from rewriter.model.source import RtlSource, SourceText

COUNTER = (
    "module m #(parameter int W = 4, parameter logic [7:0] S = 8'h11)(input clk, output reg [W-1:0] q);\n"
    "always @(posedge clk) q <= q + `STEP;\nendmodule\n"
)


@pytest.fixture
def tree(tmp_path: Path) -> Path:
    for folder in ("rtl", "inc", "lists"):
        (tmp_path / folder).mkdir()
    (tmp_path / "rtl" / "m.sv").write_text('`include "step.vh"\n' + COUNTER)
    (tmp_path / "inc" / "step.vh").write_text("`ifndef STEP\n`define STEP 1\n`endif\n")
    return tmp_path


def test_files_and_include_folders_become_absolute(tree: Path) -> None:
    source = open_up(["rtl/m.sv", "+incdir+inc"], str(tree))
    assert source.files == (str(tree / "rtl" / "m.sv"),)
    assert source.include_dirs == (str(tree / "inc"),)
    assert {text.path for text in source.texts} == {str(tree / "rtl" / "m.sv"), str(tree / "inc" / "step.vh")}
    assert source.by_path[str(tree / "rtl" / "m.sv")].data.endswith(b"endmodule\n")


@pytest.mark.parametrize(
    "form",
    [
        ["+incdir+inc"],
        ["-I", "inc"],
        ["-Iinc"],
        ["--include-directory", "inc"],
        ["--include-directory=inc"],
        ["+incdir+nothing+inc"],
        ["-I", "nothing,inc"],
    ],
)
def test_every_way_to_name_an_include_folder(tree: Path, form: list[str]) -> None:
    assert read(["rtl/m.sv", *form], str(tree)).flop_bits == 4


@pytest.mark.parametrize("form", [["+define+STEP=2+X"], ["-D", "STEP=2"], ["-DSTEP=2"], ["--define-macro", "STEP=2"]])
def test_every_way_to_define_a_macro(tree: Path, form: list[str]) -> None:
    design = read(["rtl/m.sv", "-Iinc", *form], str(tree))
    assert "STEP=2" in design.source.defines
    assert design.modules[0].blocks[0].traps == ()


def test_lists_inside_lists_comments_and_variables(tree: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("HERE", str(tree))
    monkeypatch.setenv("INC", "inc")
    (tree / "lists" / "outer.f").write_text("// a comment\n# another\n/* and\nmore */ -f $HERE/lists/inner.f\n-GW=6\n")
    (tree / "lists" / "inner.f").write_text('"${HERE}/rtl/m.sv"\n+incdir+$HERE/$(INC)\n')
    design = read(["-f", "lists/outer.f"], str(tree))
    assert design.flop_bits == 6
    assert design.source.parameters == ("W=6",)


def test_paths_start_from_the_list_only_with_a_capital_letter(tree: Path) -> None:
    (tree / "lists" / "rel.f").write_text("../rtl/m.sv\n+incdir+../inc\n")
    (tree / "lists" / "cwd.f").write_text("rtl/m.sv\n+incdir+inc\n")
    assert read(["-F", "lists/rel.f"], str(tree)).flop_bits == 4
    assert read(["-f", "lists/cwd.f"], str(tree)).flop_bits == 4
    assert read(["-flists/cwd.f"], str(tree)).flop_bits == 4


def test_quotes_of_parameters_survive(tree: Path) -> None:
    (tree / "lists" / "g.f").write_text("rtl/m.sv +incdir+inc -GS=8'h1A -GW=3\n")
    for arguments in (["rtl/m.sv", "-Iinc", "-GS=8'h1A", "-G", "W=3"], ["-f", "lists/g.f"]):
        design = read(arguments, str(tree))
        assert design.source.parameters == ("S=8'h1A", "W=3")
        assert "S=8'd26" in design.modules[0].parameters


def test_other_options_pass_verbatim_and_in_order(tree: Path) -> None:
    design = read(
        [
            "--std",
            "1800-2017",
            "rtl/m.sv",
            "--allow-use-before-declare",
            "-Iinc",
            "--timescale=1ns/1ps",
            "-Wno-unused",
            "--max-generate-steps",
            "5000",
        ],
        str(tree),
    )
    assert design.source.options == (
        "--std",
        "1800-2017",
        "--allow-use-before-declare",
        "--timescale=1ns/1ps",
        "-Wno-unused",
        "--max-generate-steps",
        "5000",
    )
    assert design.source.files == (str(tree / "rtl" / "m.sv"),)
    assert design.definitions["m"].timescale == "1ns/1ps"


def test_tops(tree: Path) -> None:
    (tree / "two.sv").write_text("module a(input c); endmodule\nmodule b(input c); endmodule\n")
    assert read(["two.sv", "--top", "b"], str(tree)).top == "b"
    assert read(["two.sv", "--top=a"], str(tree)).source.tops == ("a",)
    assert read(["two.sv", "--top", "a", "--top", "b"], str(tree)).top == "a,b"
    assert read(["rtl/m.sv", "-Iinc"], str(tree)).source.tops == ("m",)


def test_wildcards(tree: Path) -> None:
    (tree / "rtl" / "a.sv").write_text("module a; endmodule\n")
    assert open_up(["rtl/*.sv", "-Iinc"], str(tree)).files == (str(tree / "rtl" / "a.sv"), str(tree / "rtl" / "m.sv"))


def test_a_file_named_twice_is_read_once(tree: Path) -> None:
    assert read(["rtl/m.sv", "./rtl/m.sv", "-Iinc"], str(tree)).source.files == (str(tree / "rtl" / "m.sv"),)


def test_links_are_followed(tree: Path) -> None:
    (tree / "link.sv").symlink_to(tree / "rtl" / "m.sv")
    design = read(["link.sv", "-Iinc"], str(tree))
    assert design.modules[0].blocks[0].span.file == str(tree / "rtl" / "m.sv")


def test_opened_up_arguments_read_the_same_from_anywhere(tree: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    first = read(["rtl/m.sv", "+incdir+inc", "-GW=7"], str(tree))
    monkeypatch.chdir("/")
    again = elaborate(first.source)
    assert again.modules == first.modules
    assert again.source == first.source


def test_texts_count_and_not_the_disk(tree: Path) -> None:
    source = read(["rtl/m.sv", "+incdir+inc"], str(tree)).source
    path = str(tree / "rtl" / "m.sv")
    changed = source.with_texts(
        {path: source.by_path[path].data.replace(b"int W = 4", b"int W = 9")},
        (SourceText(str(tree / "rtl" / "new.sv"), b"module fresh; endmodule\n"),),
    )
    design = elaborate(changed)
    assert design.flop_bits == 9
    assert "fresh" in design.definitions
    header = str(tree / "inc" / "step.vh")
    macro = source.with_texts({header: b"`define STEP 1; reg r; always @(posedge clk) r <= 1\n"})
    assert elaborate(macro).flop_bits == 5


def test_library_texts_count_as_well(tree: Path) -> None:
    (tree / "lib.v").write_text("module leaf(input c, output reg q); always @(posedge c) q <= ~q; endmodule\n")
    (tree / "top.v").write_text("module top(input c, output q); leaf u(c, q); endmodule\n")
    source = read(["-v", "lib.v", "top.v"], str(tree)).source
    path = str(tree / "lib.v")
    design = elaborate(source.with_texts({path: source.by_path[path].data.replace(b"reg q", b"reg [2:0] q")}))
    assert design.flop_bits == 3
    trap = design.definitions["leaf"].trap
    assert trap is not None
    assert trap.reason == "library-file"


def test_an_empty_source_has_no_texts() -> None:
    assert RtlSource(()).by_path == {}
