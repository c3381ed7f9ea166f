"""Clocked blocks: clock and resets, traps, scopes, spans."""

import pytest

from rewriter.model.design import Edge
from rewriter.model.statement import Assign, Block
from tests.frontend.conftest import Reader, Sample


def block(sample: Reader, text: str, before: str = "", declared: str = "", name: str = "t.sv") -> Sample:
    return sample(
        f"{before}\nmodule m(input clk, rst_n, rst, en, input [3:0] d, output reg [3:0] q, r);\n{declared}\n"
        f"{text}\nendmodule\n",
        name=name,
    )


@pytest.mark.parametrize(
    "events,test,high",
    [
        ("negedge rst_n", "!rst_n", False),
        ("negedge rst_n", "~rst_n", False),
        ("negedge rst_n", "rst_n == 0", False),
        ("negedge rst_n", "rst_n == 1'b0", False),
        ("negedge rst_n", "1'b0 == rst_n", False),
        ("negedge rst_n", "rst_n != 1", False),
        ("negedge rst_n", "rst_n !== 1'b1", False),
        ("posedge rst", "rst", True),
        ("posedge rst", "(rst)", True),
        ("posedge rst", "rst == 1'b1", True),
        ("posedge rst", "rst != 1'b0", True),
        ("posedge rst", "!(!rst)", True),
        ("posedge rst", "!(rst == 0)", True),
    ],
)
def test_asynchronous_resets(sample: Reader, events: str, test: str, high: bool) -> None:  # noqa: FBT001
    found = block(sample, f"always @(posedge clk or {events}) begin if ({test}) q <= 0; else if (en) q <= d; end")
    clock = found.block.clock
    assert clock is not None
    assert (clock.signal.key, clock.edge) == ("clk", Edge.RISING)
    (reset,) = found.block.resets
    assert reset.active_high is high
    assert found.text(reset.branch.span) == "q <= 0;"
    assert found.block.synchronous is not None
    assert found.text(found.block.synchronous.span) == "if (en) q <= d;"


def test_the_clock_may_stand_last(sample: Reader) -> None:
    found = block(sample, "always @(negedge rst_n or negedge clk) if (!rst_n) q <= 0; else q <= d;")
    assert found.block.clock is not None
    assert (found.block.clock.signal.key, found.block.clock.edge) == ("clk", Edge.FALLING)


def test_two_resets_in_a_chain_and_in_one_test(sample: Reader) -> None:
    chain = block(
        sample,
        "always @(posedge clk or negedge rst_n or posedge rst)\nif (!rst_n) q <= 0; else if (rst) q <= 1; else q <= d;",
    )
    joined = block(
        sample, "always @(posedge clk or negedge rst_n or posedge rst) if (!rst_n || rst) q <= 0; else q <= d;"
    )
    for found in (chain, joined):
        assert [(r.event.signal.key, r.active_high) for r in found.block.resets] == [("rst_n", False), ("rst", True)]
        assert found.block.synchronous is not None
        assert found.text(found.block.synchronous.span) == "q <= d;"


def test_a_declaration_may_stand_before_the_reset(sample: Reader) -> None:
    found = block(
        sample,
        "always @(posedge clk or negedge rst_n) begin : b integer i; if (!rst_n) q <= 0; else\n"
        "for (i = 0; i < 4; i = i + 1) q[i] <= d[i]; end",
    )
    assert len(found.block.resets) == 1
    other = block(
        sample,
        "always @(posedge clk or negedge rst_n) begin : b automatic int i = d; if (!rst_n) q <= 0;\nelse q <= i; end",
    )
    assert other.reasons() == ("clock-unclear",)


def test_a_reset_alone_leaves_nothing_synchronous(sample: Reader) -> None:
    found = block(sample, "always @(posedge clk or posedge rst) if (rst) q <= 0;")
    assert found.block.synchronous is None


@pytest.mark.parametrize(
    "text",
    [
        "always @(posedge clk or posedge rst) if (!rst) q <= 0; else q <= d;",
        "always @(posedge clk or negedge rst_n) if (rst_n) q <= 0; else q <= d;",
        "always @(posedge clk or posedge rst) q <= d;",
        "always @(posedge clk or posedge rst) begin r <= d; if (rst) q <= 0; else q <= d; end",
        "always @(posedge clk or posedge rst) if (rst && en) q <= 0; else q <= d;",
        "always @(posedge clk or negedge clk) q <= d;",
        "always @(edge clk) q <= d;",
        "always @(posedge clk or en) q <= d;",
        "always @(posedge clk or posedge rst iff en) if (rst) q <= 0; else q <= d;",
        "always @(posedge clk or posedge rst) if (rst || en) q <= 0; else q <= d;",
    ],
)
def test_an_unclear_clock_is_a_trap(sample: Reader, text: str) -> None:
    found = block(sample, text)
    assert found.block.clock is None
    assert "clock-unclear" in found.reasons()


def test_iff_becomes_a_condition(sample: Reader) -> None:
    found = block(sample, "always_ff @(posedge clk iff en) q <= d;")
    assert found.block.clock is not None
    assert found.block.clock.condition is not None
    assert found.block.clock.condition.key == "en"


def test_spans_include_attributes_and_labels(sample: Reader) -> None:
    text = "(* keep = 1 *) always @(posedge clk) begin : main (* full_case *) if (en) q <= d; end : main"
    found = block(sample, text)
    assert found.text(found.block.span) == text
    assert found.text(found.block.keyword_span) == found.block.keyword == "always"
    body = found.first(Block)
    assert (found.text(body.begin), found.text(body.end), body.label) == ("begin : main", "end : main", "main")
    assert found.block.label == "main"


def test_combinational_and_latch_blocks_are_not_lowered(sample: Reader) -> None:
    found = block(sample, "always @* q = d; always_comb r = d;")
    assert found.top.blocks == ()


def test_generate_copies_have_scopes(sample: Reader) -> None:
    found = block(
        sample,
        "for (genvar i = 0; i < 2; i++) begin : g logic x;\n"
        "always_ff @(posedge clk) if (d[i]) x <= en; end\n"
        "if (0) begin : no always_ff @(posedge clk) q <= 0; end else begin : yes logic y;\n"
        "always_ff @(posedge clk) y <= en; end",
    )
    assert [b.scope for b in found.top.blocks] == ["g[0].", "g[1].", "yes."]
    assert [a.targets[0].variable for b in found.top.blocks for a in b.body.walk() if isinstance(a, Assign)] == [
        "g[0].x",
        "g[1].x",
        "yes.y",
    ]
    assert not any(b.unbraced for b in found.top.blocks)


def test_a_generate_branch_without_begin_is_marked(sample: Reader) -> None:
    found = block(
        sample,
        "if (1) always @(posedge clk) q <= d; else always @(posedge clk) q <= 0;\n"
        "for (genvar i = 0; i < 2; i++) always @(posedge clk) r[i] <= d[i];\n"
        "generate always @(posedge clk) r[3] <= d[3]; endgenerate",
    )
    assert [b.unbraced for b in found.top.blocks] == [True, True, True, False]


def test_blocks_from_macros_are_traps(sample: Reader) -> None:
    macro = "`define FF(o, i) always @(posedge clk) o <= i;\n`define ACT q <= d\n`define BOTH q <= d; r <= d;\n"
    for text, name in (
        ("`FF(q, d)", "FF"),
        ("always @(posedge clk) `ACT;", "ACT"),
        ("always @(posedge clk) begin `BOTH end", "BOTH"),
    ):
        found = block(sample, text, macro)
        assert found.reasons() == ("inside-macro",), text
        assert found.block.traps[0].detail == name


def test_a_macro_for_the_clock_or_a_constant_is_no_trap(sample: Reader) -> None:
    found = block(sample, "always @(posedge `CK) if (en) q <= `INIT;", "`define CK clk\n`define INIT 4'd7\n")
    assert found.reasons() == ()
    assert found.block.clock is not None
    assert found.text(found.block.clock.signal.span) == "`CK"


def test_an_empty_macro_is_no_trap(sample: Reader) -> None:
    found = block(
        sample,
        "always @(posedge clk) begin `DEBUG(q) if (en) q <= d; `NOTHING end",
        "`define DEBUG(x)\n`define NOTHING nothing;\n",
        "task nothing; begin end endtask",
    )
    assert found.reasons() == ()


def test_delays_inside_are_traps_and_a_nonblocking_delay_is_not(sample: Reader) -> None:
    assert block(sample, "always @(posedge clk) q <= #1 d;").reasons() == ()
    assert block(sample, "always @(posedge clk) q <= #1 d;").first(Assign).delay is not None
    for text in ("#1 q <= d;", "q = #1 d;", "begin @(posedge clk) q <= d; end", "q <= @(posedge en) d;"):
        assert "timing-control" in block(sample, f"always @(posedge clk) {text}").reasons(), text


def test_an_event_control_inside_a_block_is_a_trap(sample: Reader) -> None:
    found = block(sample, "always begin @(posedge clk) q <= d; end")
    assert found.block.clock is None
    assert "timing-control" in found.reasons()


def test_inactive_text_is_found(sample: Reader) -> None:
    found = block(
        sample,
        "always @(posedge clk) begin\n`ifdef FAST\n  q <= 0;\n`elsif SLOW\n  q <= 1;\n`else\n"
        "  q <= d;\n`endif\n`ifndef FAST\n r <= d;\n`else\n r <= 1; // gone\n`endif\nend",
    )
    assert [found.text(span).strip() for span in found.block.disabled] == ["q <= 0;", "q <= 1;", "r <= 1; // gone"]


def test_inactive_text_before_a_block_is_not_its_own(sample: Reader) -> None:
    found = block(sample, "`ifdef FAST\nalways @(posedge clk) q <= 0;\n`endif\nalways @(posedge clk) q <= d;")
    assert found.block.disabled == ()


def test_crlf_tabs_a_byte_order_mark_and_other_encodings_keep_offsets(sample: Reader) -> None:
    text = (
        "\ufeff// \u00fcber\r\nmodule m(input clk, en,\td, output reg q); /* ".encode()
        + b"caf\xe9*/"
        + b"\r\n\talways @(posedge clk)\r\n\t\tif (en) q <= d; // \xe4\r\nendmodule\r\n"
    )
    found = sample(text)
    assert found.text(found.block.span) == "always @(posedge clk)\r\n\t\tif (en) q <= d;"


def test_a_header_in_another_encoding_keeps_offsets(sample: Reader, tmp_path: object) -> None:
    assert isinstance(tmp_path, type(tmp_path))
    (tmp_path / "h.vh").write_bytes(b"/* caf\xe9*/ `define V 1\n")  # type: ignore[operator]
    found = sample('`include "h.vh"\nmodule m(input clk, output reg q); always @(posedge clk) q <= `V; endmodule')
    assert found.text(found.block.span) == "always @(posedge clk) q <= `V;"


def test_escaped_identifiers(sample: Reader) -> None:
    found = sample("module m(input clk, output reg \\q[1] ); always @(posedge clk) \\q[1] <= ~\\q[1] ; endmodule")
    target = found.first(Assign).targets[0]
    assert found.text(target.span).strip() == "\\q[1]"
    assert target.variable in found.top.writers


def test_a_block_in_a_header_that_is_read_twice_is_a_trap(sample: Reader, tmp_path: object) -> None:
    (tmp_path / "body.vh").write_text("always @(posedge clk) q <= d;\n")  # type: ignore[operator]
    text = (
        'module a(input clk, d, output reg q);\n`include "body.vh"\nendmodule\n'
        'module b(input clk, d, output reg q, p); a u(.q(p), .*);\n`include "body.vh"\nendmodule\n'
    )
    found = sample(text, "--top", "b")
    assert all("shared-include" in [t.reason for t in b.traps] for m in found.design.modules for b in m.blocks)
    once = sample(text.replace('`include "body.vh"', "always @(posedge clk) q <= d;", 1), "--top", "b")
    assert once.reasons() == ()
