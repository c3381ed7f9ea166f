"""The test override through every port and connection style."""

from pathlib import Path

import pytest

from rewriter.edit import EditOptions
from rewriter.model.errors import UserError
from rewriter.model.rewrite import TestPin
from tests.edit.rewriting import Rewritten, rewrite_files

LEAF = """\
module leaf (input wire clk, input wire en, input wire [3:0] d, output reg [3:0] q);
    always @(posedge clk) if (en) q <= d;
endmodule
"""


def done_with(folder: Path, top: str, *arguments: str, leaf: str = LEAF, pins: tuple[TestPin, ...] = ()) -> Rewritten:
    return rewrite_files(folder, {"leaf.v": leaf, "top.sv": top}, *arguments, options=EditOptions(test_pins=pins))


PORTS = {
    "one line": (
        "module leaf (input clk, input en, input [3:0] d, output reg [3:0] q);",
        "module leaf (input clk, input en, input [3:0] d, output reg [3:0] q, input wire test_en);",
    ),
    "in columns": (
        (
            "module leaf (\n"
            "  input  wire       clk, en,\n"
            "  input  wire [3:0] d, // data\n"
            "  output reg  [3:0] q  // held\n"
            ");"
        ),
        (
            "module leaf (\n"
            "  input  wire       clk, en,\n"
            "  input  wire [3:0] d, // data\n"
            "  output reg  [3:0] q,  // held\n"
            "  input  wire       test_en\n"
            ");"
        ),
    ),
    "tabs": (
        "module leaf (\n\tinput\twire\t\tclk, en,\n\tinput\twire [3:0]\td,\n\toutput\treg [3:0]\tq\n);",
        (
            "module leaf (\n"
            "\tinput\twire\t\tclk, en,\n"
            "\tinput\twire [3:0]\td,\n"
            "\toutput\treg [3:0]\tq,\n"
            "\tinput\twire\ttest_en\n"
            ");"
        ),
    ),
    "comma first": (
        "module leaf (\n    input clk\n  , input en\n  , input [3:0] d\n  , output reg [3:0] q\n);",
        (
            "module leaf (\n"
            "    input clk\n"
            "  , input en\n"
            "  , input [3:0] d\n"
            "  , output reg [3:0] q\n"
            "  , input wire test_en\n"
            ");"
        ),
    ),
    "bracket on the last line": (
        "module leaf (input clk, input en,\n             input [3:0] d, output reg [3:0] q /* held */);",
        (
            "module leaf (input clk, input en,\n"
            "             input [3:0] d, output reg [3:0] q, input wire test_en /* held */);"
        ),
    ),
    "comment over two lines": (
        "module leaf (\n    input clk, en,\n    input [3:0] d,\n    output reg [3:0] q /* held\n    always */\n);",
        (
            "module leaf (\n"
            "    input clk, en,\n"
            "    input [3:0] d,\n"
            "    output reg [3:0] q, input wire test_en /* held\n"
            "    always */\n"
            ");"
        ),
    ),
    "directive among the ports": (
        (
            "module leaf (\n"
            "    input clk, en,\n"
            "    input [3:0] d,\n"
            "    output reg [3:0] q\n"
            "`ifdef PROBE\n"
            "    , output p\n"
            "`endif\n"
            ");"
        ),
        (
            "module leaf (\n"
            "    input wire test_en,\n"
            "    input clk, en,\n"
            "    input [3:0] d,\n"
            "    output reg [3:0] q\n"
            "`ifdef PROBE\n"
            "    , output p\n"
            "`endif\n"
            ");"
        ),
    ),
    "parameters and an import-free header": (
        "module leaf #(parameter P = 1) (input clk, input en, input [3:0] d, output reg [3:0] q);",
        "module leaf #(parameter P = 1) (input clk, input en, input [3:0] d, output reg [3:0] q, input wire test_en);",
    ),
    "names alone": (
        "module leaf (clk, en, d, q);\n    input clk, en;\n    input [3:0] d;\n    output reg [3:0] q;",
        (
            "module leaf (clk, en, d, q, test_en);\n"
            "    input wire test_en;\n"
            "    input clk, en;\n"
            "    input [3:0] d;\n"
            "    output reg [3:0] q;"
        ),
    ),
    "names alone, one a line": (
        (
            "module leaf (\n"
            "  clk,\n"
            "  en,\n"
            "  d,\n"
            "  q // held\n"
            "); // a leaf\n"
            "  input clk, en;\n"
            "  input [3:0] d;\n"
            "  output reg [3:0] q;"
        ),
        (
            "module leaf (\n"
            "  clk,\n"
            "  en,\n"
            "  d,\n"
            "  q,\n"
            "  test_en // held\n"
            "); // a leaf\n"
            "  input wire test_en;\n"
            "  input clk, en;\n"
            "  input [3:0] d;\n"
            "  output reg [3:0] q;"
        ),
    ),
    "names and a directive": (
        (
            "module leaf (\n"
            "  clk, en, d, q\n"
            "`ifdef PROBE\n"
            "  , p\n"
            "`endif\n"
            ");\n"
            "  input clk, en;\n"
            "  input [3:0] d;\n"
            "  output reg [3:0] q;"
        ),
        (
            "module leaf (\n"
            "  test_en,\n"
            "  clk, en, d, q\n"
            "`ifdef PROBE\n"
            "  , p\n"
            "`endif\n"
            ");\n"
            "  input wire test_en;\n"
            "  input clk, en;\n"
            "  input [3:0] d;\n"
            "  output reg [3:0] q;"
        ),
    ),
}


@pytest.mark.simulator
@pytest.mark.parametrize("style", PORTS)
def test_port_styles(tmp_path: Path, style: str) -> None:
    before, after = PORTS[style]
    rest = "\n    always @(posedge clk) if (en) q <= d;\nendmodule\n"
    top = (
        "module top (input clk, en, input [3:0] d, output [3:0] q);\n"
        "    leaf u (.clk(clk), .en(en), .d(d), .q(q));\n"
        "endmodule\n"
    )
    done = done_with(tmp_path, top, leaf=before + rest)
    assert done.text("leaf.v").startswith(after + "\n")
    done.compile()


@pytest.mark.simulator
@pytest.mark.parametrize(
    "header, after",
    [("module top;", "module top (input wire test_en);"), ("module top ();", "module top (input wire test_en);")],
)
def test_tops_without_ports(tmp_path: Path, header: str, after: str) -> None:
    body = "\n    reg clk, en; reg [3:0] d; wire [3:0] q;\n    leaf u (.clk(clk), .en(en), .d(d), .q(q));\nendmodule\n"
    done = done_with(tmp_path, header + body)
    assert done.text("top.sv").startswith(after)
    assert done.rewrite.test_ports == {"leaf": "test_en", "top": "test_en"}
    done.compile()


CONNECTIONS = {
    "named": (
        "leaf u (.clk(clk), .en(en), .d(d), .q(q));",
        "leaf u (.test_en(test_en), .clk(clk), .en(en), .d(d), .q(q));",
    ),
    "named, one a line": (
        "leaf u (\n        .clk (clk),\n        .en  (en),\n        .d   (d),\n        .q   (q)\n    );",
        (
            "leaf u (\n"
            "        .test_en(test_en),\n"
            "        .clk (clk),\n"
            "        .en  (en),\n"
            "        .d   (d),\n"
            "        .q   (q)\n"
            "    );"
        ),
    ),
    "implicit named": ("leaf u (.clk, .en, .d, .q);", "leaf u (.test_en(test_en), .clk, .en, .d, .q);"),
    "ordered": ("leaf u (clk, en, d, q);", "leaf u (clk, en, d, q, test_en);"),
    "ordered, in brackets": (
        "leaf u (clk, (en), {d[3], d[2:0]}, q);",
        "leaf u (clk, (en), {d[3], d[2:0]}, q, test_en);",
    ),
    "ordered, short": ("leaf u (clk, en, d);", "leaf u (clk, en, d, , test_en);"),
    "ordered, last left out": ("leaf u (clk, en, d, );", "leaf u (clk, en, d, , test_en);"),
    "wildcard": ("leaf u (.*);", "leaf u (.*);"),
    "wildcard and named": ("leaf u (.en(1'b1), .*);", "leaf u (.en(1'b1), .*);"),
    "empty": ("leaf u ();", "leaf u (.test_en(test_en));"),
    "array": (
        "leaf u [1:0] (.clk(clk), .en(en), .d(d), .q());",
        "leaf u [1:0] (.test_en(test_en), .clk(clk), .en(en), .d(d), .q());",
    ),
    "array, ordered": ("leaf u [1:0] (clk, en, d, );", "leaf u [1:0] (clk, en, d, , test_en);"),
    "two of them": (
        "leaf u (clk, en, d, q), v (clk, en, d, );",
        "leaf u (clk, en, d, q, test_en), v (clk, en, d, , test_en);",
    ),
    "loop": (
        "for (genvar i = 0; i < 2; i++) begin : g leaf u (.clk(clk), .en(en), .d(d), .q()); end",
        "for (genvar i = 0; i < 2; i++) begin : g leaf u (.test_en(test_en), .clk(clk), .en(en), .d(d), .q()); end",
    ),
    "directive among them": (
        "leaf u (\n`ifdef PROBE\n .en(1'b0),\n`else\n .en(en),\n`endif\n .clk(clk), .d(d), .q(q));",
        "leaf u (.test_en(test_en), \n`ifdef PROBE\n .en(1'b0),\n`else\n .en(en),\n`endif\n .clk(clk), .d(d), .q(q));",
    ),
    "untaken branch": (
        "leaf u (clk, en, d, q);\n    generate if (0) begin : off leaf w (clk, en, d, ); end endgenerate",
        (
            "leaf u (clk, en, d, q, test_en);\n"
            "    generate if (0) begin : off leaf w (clk, en, d, , test_en); end endgenerate"
        ),
    ),
}


@pytest.mark.simulator
@pytest.mark.parametrize("style", CONNECTIONS)
def test_connection_styles(tmp_path: Path, style: str) -> None:
    before, after = CONNECTIONS[style]
    head = "module top (input clk, en, input [3:0] d, output [3:0] q);\n    "
    done = done_with(tmp_path, f"{head}{before}\nendmodule\n")
    new_head = head.replace("q);", "q, input wire test_en);")
    assert done.text("top.sv") == f"{new_head}{after}\nendmodule\n"
    done.compile()


@pytest.mark.simulator
def test_ordered_connections_follow_a_port_that_goes_first(tmp_path: Path) -> None:
    leaf = LEAF.replace("output reg [3:0] q)", "output reg [3:0] q\n`ifdef PROBE\n, output p\n`endif\n)")
    top = "module top (input clk, en, input [3:0] d, output [3:0] q);\n    leaf u (clk, en, d, q);\nendmodule\n"
    done = done_with(tmp_path, top, leaf=leaf)
    assert "leaf u (test_en, clk, en, d, q);" in done.text("top.sv")
    assert "module leaf (input wire test_en, input wire clk" in done.text("leaf.v")
    done.compile()


@pytest.mark.simulator
def test_one_free_name_for_all_on_the_way(tmp_path: Path) -> None:
    top = "module top (input clk, test_en, input [3:0] d, output [3:0] q);\n    leaf u (.en(test_en), .*);\nendmodule\n"
    done = done_with(tmp_path, top)
    assert done.rewrite.test_ports == {"leaf": "test_en_2", "top": "test_en_2"}
    done.compile()


@pytest.mark.simulator
@pytest.mark.parametrize("low, value", [(False, "scan"), (True, "!scan")])
def test_a_named_pin_is_used_instead_of_a_port(tmp_path: Path, *, low: bool, value: str) -> None:
    mid = "module mid (input clk, scan, en, input [3:0] d, output [3:0] q);\n    leaf u (.*);\nendmodule\n"
    top = "module top (input clk, en, input [3:0] d, output [3:0] q);\n    mid m (.scan(1'b0), .*);\nendmodule\n"
    done = done_with(tmp_path, mid + top, pins=(TestPin("mid", "scan", "scan-enable", low),))
    assert done.text("top.sv") == (mid + top).replace("leaf u (.*);", f"leaf u (.test_en({value}), .*);")
    assert done.rewrite.test_ports == {"leaf": "test_en", "mid": "scan"}
    done.compile()


@pytest.mark.simulator
def test_a_pin_of_the_module_with_the_cells(tmp_path: Path) -> None:
    top = (
        "module top (input clk, en, tm_n, input [3:0] d, output reg [3:0] q);\n"
        "    always @(posedge clk) if (en) q <= d;\n"
        "endmodule\n"
    )
    done = rewrite_files(
        tmp_path, {"top.v": top}, options=EditOptions(test_pins=(TestPin("top", "tm_n", "test-mode", active_low=True),))
    )
    assert ".test(!tm_n)" in done.text("top.v")
    assert "test_en" not in done.text("top.v")
    done.compile()


@pytest.mark.parametrize(
    "pin, message, way_out",
    [
        (TestPin("lea", "en", "scan-enable"), "there is no module `lea`", "did you mean `leaf`?"),
        (TestPin("leaf", "enn", "scan-enable"), "`leaf` has no port `enn`", "did you mean `en`?"),
    ],
)
def test_unknown_pins(tmp_path: Path, pin: TestPin, message: str, way_out: str) -> None:
    with pytest.raises(UserError, match=message) as caught:
        rewrite_files(tmp_path, {"leaf.v": LEAF}, options=EditOptions(test_pins=(pin,)))
    assert caught.value.help == way_out


@pytest.mark.parametrize("name", ["2nd", "test en", "always", ""])
def test_impossible_port_names(tmp_path: Path, name: str) -> None:
    with pytest.raises(UserError, match="cannot name a port"):
        rewrite_files(tmp_path, {"leaf.v": LEAF}, options=EditOptions(test_port=name))


@pytest.mark.simulator
def test_modules_beside_the_top_are_threaded_and_benches_drive_it_off(tmp_path: Path) -> None:
    beside = "module beside (input clk, en, input [3:0] d, output [3:0] q);\n    leaf u (clk, en, d, q);\nendmodule\n"
    bench = "module bench;\n    reg clk, en; reg [3:0] d; wire [3:0] q;\n    beside b (clk, en, d, q);\nendmodule\n"
    done = rewrite_files(tmp_path, {"leaf.v": LEAF, "beside.v": beside, "bench.v": bench}, "--top", "leaf")
    assert "leaf u (clk, en, d, q, test_en);" in done.text("beside.v")
    assert done.text("bench.v") == bench.replace("d, q);", "d, q, 1'b0);")
    done.compile()


MACRO = "`define MAKE(n) leaf n (.clk(clk), .en(en), .d(d), .q(q));\n"
BLOCKED = {
    "an instance out of a macro": (
        MACRO + "module top (input clk, en, input [3:0] d, output [3:0] q);\n    `MAKE(u)\nendmodule\n",
        "no-test-path",
    ),
    "a bound instance": (
        (
            "module top (input clk, en, input [3:0] d);\n"
            "endmodule\n"
            "module binder (input clk, en, input [3:0] d);\n"
            "    top t (.*);\n"
            "    bind top leaf u (.clk, .en, .d, .q());\n"
            "endmodule\n"
        ),
        "bind",
    ),
    "bound at the top level": (
        "module top (input clk, en, input [3:0] d);\nendmodule\nbind top leaf u (.clk, .en, .d, .q());\n",
        "bind",
    ),
    "a cell of the library above": (
        (
            "`celldefine\n"
            "module mid (input clk, en, input [3:0] d, output [3:0] q);\n"
            "    leaf u (.*);\n"
            "endmodule\n"
            "`endcelldefine\n"
            "module top (input clk, en, input [3:0] d, output [3:0] q);\n"
            "    mid m (.*);\n"
            "endmodule\n"
        ),
        "celldefine",
    ),
}


@pytest.mark.parametrize("case", BLOCKED)
def test_banks_that_no_override_can_reach_are_left_out(tmp_path: Path, case: str) -> None:
    text, reason = BLOCKED[case]
    done = done_with(tmp_path, text)
    assert done.reasons == {"q": reason}
    assert done.rewrite.files == ()
    assert done.rewrite.cell_files == {}


def test_what_is_not_under_the_top_only_warns(tmp_path: Path) -> None:
    beside = "module beside (input clk, en, input [3:0] d, output [3:0] q);\n    `MAKE(u)\nendmodule\n"
    done = rewrite_files(tmp_path, {"leaf.v": LEAF, "beside.v": MACRO + beside}, "--top", "leaf")
    assert done.reasons == {}
    (warning,) = done.rewrite.warnings
    assert warning.message == "beside is not under the top and cannot pass the test override to u (no-test-path)"
    assert done.text("beside.v") == MACRO + beside
