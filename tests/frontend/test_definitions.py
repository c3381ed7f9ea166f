"""Definitions at syntax level: ports, instances, identifiers, reasons not to edit."""

from pathlib import Path

import pytest

from rewriter.model.design import ConnectionStyle, Definition, Language, PortStyle
from tests.frontend.conftest import Reader, Sample


def ports(sample: Reader, text: str) -> tuple[Sample, Definition]:
    found = sample(text)
    return found, found.design.definitions["m"]


@pytest.mark.parametrize(
    "text,style,names",
    [
        ("module m(input a, output b); endmodule", PortStyle.ANSI, ("a", "b")),
        ("module m(a, b); input a; output b; endmodule", PortStyle.NON_ANSI, ("a", "b")),
        ("module m(a, .b(c)); input a; output c; endmodule", PortStyle.NON_ANSI, ("a", "b")),
        ("module m(); endmodule", PortStyle.EMPTY, ()),
        ("module m #(parameter P = 1); endmodule", PortStyle.NONE, ()),
    ],
)
def test_port_lists(sample: Reader, text: str, style: PortStyle, names: tuple[str, ...]) -> None:
    found, definition = ports(sample, text)
    assert (definition.ports.style, definition.ports.names) == (style, names)
    source = found.design.source.by_path[definition.span.file].data
    assert source[definition.ports.header_end - 1 : definition.ports.header_end] == b";"
    if style is PortStyle.NONE:
        assert found.text(definition.ports.span) == ""
        assert source[definition.ports.span.end : definition.ports.span.end + 1] == b";"
    else:
        inner = found.text(definition.ports.span)
        assert inner[0] + inner[-1] == "()"


def test_first_and_last_port(sample: Reader) -> None:
    found, definition = ports(sample, "module m( (* x *) input a, output [1:0] b // last\n); endmodule")
    data = found.design.source.by_path[definition.span.file].data
    assert data[definition.ports.first : definition.ports.last_end] == b"(* x *) input a, output [1:0] b"
    assert definition.ports.first_has_direction


def test_directives_in_a_port_list(sample: Reader) -> None:
    _, definition = ports(sample, "module m(input a\n`ifdef X\n, input b\n`endif\n); endmodule")
    assert definition.ports.has_directives
    assert not ports(sample, "module m(input [`W:0] a); endmodule".replace("`W", "3"))[1].ports.has_directives


def test_a_first_port_without_direction(sample: Reader) -> None:
    assert not ports(sample, "module m(logic a, input b); endmodule")[1].ports.first_has_direction


def test_instances_in_every_branch(sample: Reader) -> None:
    found = sample(
        "module leaf(input a, output b); endmodule\n"
        "module m(input a); wire b, c; leaf n(.a(a), .b()), o(a, c); leaf w(.*); leaf e();\n"
        "if (0) begin leaf untaken[1:0](a, ); end else leaf lone(.a);\n"
        "leaf d(\n`ifdef X\n.a(a)\n`endif\n); endmodule"
    )
    by_name = {i.name: i for i in found.design.definitions["m"].instances}
    assert {n: i.style for n, i in by_name.items()} == {
        "n": ConnectionStyle.NAMED,
        "o": ConnectionStyle.ORDERED,
        "w": ConnectionStyle.WILDCARD,
        "e": ConnectionStyle.EMPTY,
        "untaken": ConnectionStyle.ORDERED,
        "lone": ConnectionStyle.NAMED,
        "d": ConnectionStyle.EMPTY,
    }
    assert found.text(by_name["untaken"].span) == "untaken[1:0](a, )"
    assert found.text(by_name["n"].parentheses) == "(.a(a), .b())"
    assert by_name["n"].connected == ("a", "b")
    assert [n for n, i in by_name.items() if i.has_directives] == ["d"]
    assert by_name["n"].target == "leaf"


def test_bind_and_macros_are_marked(sample: Reader) -> None:
    found = sample(
        "`define MAKE leaf k(.a(a));\nmodule leaf(input a); endmodule\n"
        "module m(input a); `MAKE bind m leaf b(.a(a)); endmodule"
    )
    marks = {i.name: (i.in_macro, i.is_bind) for i in found.design.definitions["m"].instances}
    assert marks == {"k": (True, False), "b": (False, True)}


def test_a_bind_outside_modules_is_kept(sample: Reader) -> None:
    found = sample("module leaf(input a); endmodule\nmodule m(input a); endmodule\nbind m leaf b(.a(a));")
    assert [(i.target, i.is_bind) for d in found.design.definitions.values() for i in d.instances] == [("leaf", True)]


def test_a_bind_in_a_file_of_its_own_is_kept(sample: Reader, tmp_path: Path) -> None:
    (tmp_path / "b.sv").write_text("bind m leaf b(.a(a));\n")
    found = sample("module leaf(input a); endmodule\nmodule m(input a); endmodule\n", "b.sv")
    assert [(i.target, i.is_bind) for d in found.design.definitions.values() for i in d.instances] == [("leaf", True)]


def test_identifiers_include_inactive_text(sample: Reader) -> None:
    _, definition = ports(sample, "module m(input a);\n`ifdef X\nwire secret;\n`endif\nwire \\odd+name ; endmodule")
    assert {"a", "secret", "odd+name", "m"} <= definition.identifiers
    assert "other" not in definition.identifiers


def test_language_by_suffix(sample: Reader) -> None:
    assert sample("module m; endmodule", name="a.v").design.definitions["m"].language is Language.VERILOG
    assert sample("module m; endmodule", name="a.sv").design.definitions["m"].language is Language.SYSTEMVERILOG


def test_timescale_and_hierarchy(sample: Reader) -> None:
    found = sample("`timescale 1ns / 10ps\nmodule unused; wire x; endmodule\nmodule m; endmodule", "--top", "m")
    assert found.design.definitions["m"].timescale == "1ns/10ps"
    assert found.design.definitions["m"].in_hierarchy
    assert not found.design.definitions["unused"].in_hierarchy
    assert sample("module m; endmodule").design.definitions["m"].timescale is None


def test_interfaces_are_marked(sample: Reader) -> None:
    found = sample("interface bus; logic a; endinterface\nmodule m; bus b(); endmodule")
    assert found.design.definitions["bus"].is_interface


def test_reasons_not_to_edit(sample: Reader, tmp_path: Path) -> None:
    (tmp_path / "lib.v").write_text("module cell_a(input a); endmodule\n")
    (tmp_path / "dir").mkdir()
    (tmp_path / "dir" / "cell_b.v").write_text("module cell_b(input a); endmodule\n")
    found = sample(
        "`define HEAD module macro_made(input a);\n`HEAD endmodule\n"
        "`celldefine\nmodule tech(input a); endmodule\n`endcelldefine\n"
        "module m(input a); cell_a x(a); cell_b y(a); tech z(a); macro_made w(a); endmodule",
        "-v",
        "lib.v",
        "-y",
        "dir",
        "+libext+.v",
        "--top",
        "m",
    )
    traps = {name: d.trap.reason for name, d in found.design.definitions.items() if d.trap}
    assert traps == {
        "cell_a": "library-file",
        "cell_b": "library-file",
        "tech": "celldefine",
        "macro_made": "inside-macro",
    }
    assert set(found.design.source.library_files) == {str(tmp_path / "lib.v"), str(tmp_path / "dir" / "cell_b.v")}


def test_protected_text_is_not_edited(sample: Reader) -> None:
    found = sample("module m(input a);\n`pragma protect begin\nwire b;\n`pragma protect end\nendmodule")
    trap = found.design.definitions["m"].trap
    assert trap is not None
    assert trap.reason == "encrypted"


@pytest.mark.parametrize(
    "text,cell",
    [
        ("input c, e, t, output g); logic l; always_latch if (!c) l = e | t; assign g = l & c;", True),
        ("input c, e, output g); reg l; always @(c or e) if (!c) l <= e; assign g = c & l;", True),
        ("input c, e, output g); reg l; always @(c or e) if (c) l <= e; assign g = c | l;", True),
        ("input c, e, output g); reg l; always @* l = e; assign g = c & l;", False),
        ("input c, e, output g); assign g = c & e;", False),
        ("input c, e, output g); reg l; always @(posedge c) l <= e; assign g = c & l;", False),
    ],
)
def test_existing_cells_are_recognised(sample: Reader, text: str, cell: bool) -> None:  # noqa: FBT001
    assert sample(f"module m({text} endmodule").design.definitions["m"].cell_like is cell


def test_generated_files_are_noticed(sample: Reader) -> None:
    assert sample("// Generated by a script. Do not edit.\nmodule m; endmodule").design.definitions["m"].generated
    assert not sample("module m; wire generated_by; endmodule").design.definitions["m"].generated
