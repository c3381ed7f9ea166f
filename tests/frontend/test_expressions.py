"""Expressions: text, key, self-determined size (IEEE 1800-2017 table 11-21), value, bits."""

import pytest

from rewriter.model.expr import Call, Concatenation, Conditional, Constant, Expr, Opaque, Operation, Reference, Select
from rewriter.model.statement import Assign, If
from tests.frontend.conftest import Reader, Sample

PORTS = "input logic clk, input logic [7:0] a, b, input logic [3:0] c, input logic s, input logic signed [7:0] n"


def condition(sample: Reader, text: str, before: str = "", head: str = "", declared: str = "") -> tuple[Sample, Expr]:
    found = sample(
        f"{before}\nmodule m {head} ({PORTS}, output logic q);\n{declared}\n"
        f"always_ff @(posedge clk) if ({text}) q <= 1;\nendmodule\n"
    )
    return found, found.first(If).condition


@pytest.mark.parametrize(
    "text,width,signed",
    [
        ("a", 8, False),
        ("a + c", 8, False),
        ("c + a", 8, False),
        ("a & s", 8, False),
        ("a << c", 8, False),
        ("c << a", 4, False),
        ("a == c", 1, False),
        ("!a", 1, False),
        ("~a", 8, False),
        ("&a", 1, False),
        ("n", 8, True),
        ("n + n", 8, True),
        ("n + a", 8, False),
        ("n >>> 1", 8, True),
        ("s ? a : c", 8, False),
        ("{a, c}", 12, False),
        ("{3{c}}", 12, False),
        ("a[3]", 1, False),
        ("a[6:2]", 5, False),
        ("a[c +: 3]", 3, False),
        ("5", 32, True),
        ("8'h3", 8, False),
        ("'1", 1, False),
        ("a + 1", 32, False),
        ("4'(a)", 4, False),
        ("$signed(a)", 8, True),
        ("a inside {1, 2}", 1, False),
        ("a && n", 1, False),
    ],
)
def test_size_is_that_of_the_text_alone(sample: Reader, text: str, width: int, signed: bool) -> None:  # noqa: FBT001
    found, expr = condition(sample, text)
    assert (expr.width, expr.signed) == (width, signed)
    assert found.text(expr.span) == text
    assert expr.copyable


def test_operands_keep_their_own_size_below_a_wider_one(sample: Reader) -> None:
    _, expr = condition(sample, "(a & c) == 32'd1")
    assert isinstance(expr, Operation)
    assert expr.operands[0].width == 8
    assert [type(e) for e in expr.walk()] == [Operation, Operation, Reference, Reference, Constant]


def test_keys_ignore_spacing_comments_and_needless_parentheses(sample: Reader) -> None:
    _, one = condition(sample, "a[ 3 ]  &&/* why */ (b == 8'h 4)")
    _, two = condition(sample, "a[3]&&b==8'h4")
    _, other = condition(sample, "a[3]&&b==8'h5")
    assert one.key == two.key != other.key


def test_keys_tell_apart_how_a_constant_is_written(sample: Reader) -> None:
    """`b == 1` compares 32 bits, `b == 8'd1` eight: they do not read the same."""
    assert condition(sample, "b == 1")[1].key != condition(sample, "b == 8'd1")[1].key


def test_values_come_from_parameters(sample: Reader) -> None:
    for text, value in (
        ("P", 3),
        ("P + 1", 4),
        ("P == 3", 1),
        ("0 && a", 0),
        ("a[0] && 0", 0),
        ("a[0] || 1", 1),
        ("-P", -3),
        ("a[0] && 1", None),
        ("P > 2 ? 5 : 6", 5),
        ("V[1]", 1),
        ("$clog2(P)", 2),
    ):
        _, expr = condition(sample, text, head="#(parameter int P = 3, parameter logic [3:0] V = 4'b0010)")
        assert expr.constant == value, text


def test_x_in_a_literal_is_seen(sample: Reader) -> None:
    _, expr = condition(sample, "a == 8'b0000_x01z")
    literal = next(e for e in expr.walk() if isinstance(e, Constant))
    assert literal.has_x
    assert literal.constant is None


def test_a_type_that_is_not_integral_has_no_width(sample: Reader) -> None:
    assert condition(sample, "r", declared="real r;")[1].width == 0


def test_bits_of_selects(sample: Reader) -> None:
    declared = """
    typedef struct packed { logic [2:0] hi; logic [4:0] lo; } pair_t;
    pair_t p; logic [0:7] up; logic [1:0][3:0] two; logic [7:0] mem [0:3]; struct { logic x; logic [3:0] y; } loose;
    logic [11:4] off;"""
    for text, bits in (
        ("a[3]", (3, 3)),
        ("a[6:2]", (6, 2)),
        ("a[2 +: 3]", (4, 2)),
        ("a[4 -: 3]", (4, 2)),
        ("up[0]", (7, 7)),
        ("up[1:2]", (6, 5)),
        ("up[1 +: 2]", (6, 5)),
        ("up[2 -: 2]", (6, 5)),
        ("two[1]", (7, 4)),
        ("two[1][2]", (6, 6)),
        ("mem[0]", (31, 24)),
        ("mem[3][1]", (1, 1)),
        ("p.hi", (7, 5)),
        ("p.lo[1]", (1, 1)),
        ("loose.x", (4, 4)),
        ("loose.y", (3, 0)),
        ("off[4]", (0, 0)),
        ("off[11:10]", (7, 6)),
        ("a[c]", None),
        ("mem[c][1]", None),
    ):
        _, expr = condition(sample, text, declared=declared)
        assert isinstance(expr, Select)
        assert expr.bits == bits, text


def test_kinds(sample: Reader) -> None:
    for text, kind in (("s ? a : b", Conditional), ("{a, b}", Concatenation), ("$onehot(a)", Call), ("a", Reference)):
        assert isinstance(condition(sample, text)[1], kind), text
    _, expr = condition(sample, "{2{a, s}}")
    assert isinstance(expr, Concatenation)
    assert (expr.count, len(expr.parts)) == (2, 2)


def test_parameters_and_enum_values_are_no_reads(sample: Reader) -> None:
    _, expr = condition(sample, "a == P && s == ON", head="#(parameter P = 1)", declared="enum logic {OFF, ON} e;")
    assert expr.reads() == {"a", "s"}


def test_functions_tell_what_they_read_and_do(sample: Reader) -> None:
    functions = """
    logic hid; logic out; int cnt;
    function automatic logic clean(input logic x); logic t; t = ~x; return t; endfunction
    function automatic logic peeks(input logic x); return x & hid; endfunction
    function automatic logic writes(input logic x); out = x; return x; endfunction
    function automatic logic steps(input logic x); cnt++; return x; endfunction
    function automatic logic talks(input logic x); $display("x"); return x; endfunction
    function automatic logic nested(input logic x); return peeks(x); endfunction"""
    for name, hidden, pure in (
        ("clean", None, True),
        ("peeks", "hid", True),
        ("writes", None, False),
        ("steps", "cnt", False),
        ("talks", None, False),
        ("nested", "hid", True),
    ):
        _, expr = condition(sample, f"{name}(s)", declared=functions, before="")
        assert isinstance(expr, Call)
        assert (hidden is None or hidden in expr.hidden_reads, expr.pure) == (True, pure), name
    _, random = condition(sample, "$random")
    assert isinstance(random, Call)
    assert not random.pure


def test_what_is_not_understood_still_tells_its_reads(sample: Reader) -> None:
    declared = "typedef struct packed { logic [7:0] hi, lo; } pair_t;"
    _, expr = condition(sample, "pair_t'{hi: a, lo: b} == 0", declared=declared)
    opaque = next(e for e in expr.walk() if isinstance(e, Opaque))
    assert opaque.reads() == {"a", "b"}


def test_a_macro_that_is_the_whole_expression_may_be_copied(sample: Reader) -> None:
    found, expr = condition(sample, "`EN(a)", "`define EN(v) ((v[0]) && s) // why\n")
    assert found.text(expr.span) == "`EN(a)"
    assert expr.copyable
    assert expr.key == "(a[0]&&s)"


def test_part_of_a_macro_may_not_be_copied(sample: Reader) -> None:
    _, expr = condition(sample, "`EN && b[0]", "`define EN a[0] && s\n")
    assert not expr.copyable or expr.key == "((a[0]&&s)&&b[0])"
    parts = [e for e in expr.walk() if isinstance(e, Reference) and e.name in ("a", "s")]
    assert not any(part.copyable for part in parts)


def test_half_a_macro_is_no_expression_of_its_own(sample: Reader) -> None:
    """`s || `X` where X is `a[0] && b[0]` groups differently than it looks: only the whole may be copied."""
    found, expr = condition(sample, "s `REST", "`define REST || a[0] && b[0]\n")
    assert found.text(expr.span) == "s `REST"
    inner = [e for e in expr.walk() if e.key == "(a[0]&&b[0])"]
    assert inner
    assert not inner[0].copyable


def test_macro_constants_inside_an_expression(sample: Reader) -> None:
    found, expr = condition(sample, "a == `LIMIT", "`define LIMIT 8'd200\n")
    assert found.text(expr.span) == "a == `LIMIT"
    assert expr.copyable


def test_macro_arguments_are_not_copied(sample: Reader) -> None:
    found = sample(
        "`define PASS(x) x\nmodule m(input clk, a, b, output reg q);\n"
        "always @(posedge clk) if (`PASS(a & b)) q <= 1;\nendmodule"
    )
    expr = found.first(If).condition
    assert found.text(expr.span) == "`PASS(a & b)"


def test_hierarchical_references_are_marked(sample: Reader) -> None:
    found = sample(
        "module leaf(input c); logic h; always_ff @(posedge c) h <= ~h; endmodule\n"
        "module m(input clk, output logic q); leaf u(clk); always_ff @(posedge clk) if (u.h) q <= 1; "
        "endmodule"
    )
    expr = found.first(If).condition
    assert isinstance(expr, Reference)
    assert (expr.is_hierarchical, expr.name) == (True, "u.h")
    assert found.module("leaf").external_references == {"h"}


def test_compound_assignments_read_their_target(sample: Reader) -> None:
    found = sample(
        "module m(input clk, input [7:0] a, output logic [7:0] q); logic [7:0] t;\n"
        "always_ff @(posedge clk) begin t = 0; t += a; t++; q <= t; end endmodule"
    )
    plus, step = found.all(Assign)[1:3]
    assert plus.rhs.reads() >= {"a", "t"}
    assert step.rhs.reads() == {"t"}
    assert step.blocking
