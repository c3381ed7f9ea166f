"""Statements: the text of every part, loops, targets, and what is not understood."""

from rewriter.model.statement import Assign, Block, Case, Empty, If, Index, Loop, Opaque
from tests.frontend.conftest import Reader, Sample

HEAD = "module m(input clk, en, input [7:0] d, input [1:0] s, output reg [7:0] q, r);\n"


def body(sample: Reader, text: str, declared: str = "") -> Sample:
    return sample(f"{HEAD}{declared}\nalways @(posedge clk) {text}\nendmodule\n")


def test_if(sample: Reader) -> None:
    found = body(sample, "(* fast *) unique if ( en ) q <= d; else begin r <= d; end")
    node = found.first(If)
    assert found.text(node.span) == "(* fast *) unique if ( en ) q <= d; else begin r <= d; end"
    assert found.text(node.head) == "unique if ( en )"
    assert node.attributes is not None
    assert found.text(node.attributes) == "(* fast *)"
    assert node.else_keyword is not None
    assert found.text(node.else_keyword) == "else"
    assert node.qualifier == "unique"
    assert node.other is not None
    assert (found.text(node.then.span), found.text(node.other.span)) == ("q <= d;", "begin r <= d; end")


def test_if_without_else(sample: Reader) -> None:
    node = body(sample, "if (en) q <= d;").first(If)
    assert (node.other, node.else_keyword, node.attributes, node.qualifier) == (None, None, None, "")


def test_case(sample: Reader) -> None:
    text = "(* full_case, parallel_case *) casez (s) 2'b0?, 2'b10 : q <= d; default r <= d; 2'b11: begin end endcase"
    found = body(sample, text)
    node = found.first(Case)
    assert found.text(node.span) == text
    assert (found.text(node.head), found.text(node.tail), node.keyword) == ("casez (s)", "endcase", "casez")
    assert node.attribute_names == ("full_case", "parallel_case")
    assert [found.text(item.head) for item in node.items] == ["2'b0?, 2'b10 :", "default", "2'b11:"]
    assert [item.is_default for item in node.items] == [False, True, False]
    assert [found.text(item.body.span) for item in node.items] == ["q <= d;", "r <= d;", "begin end"]
    assert [found.text(label.span) for label in node.items[0].labels] == ["2'b0?", "2'b10"]


def test_case_inside(sample: Reader) -> None:
    found = body(sample, "priority case (d) inside [1:3], 7: q <= d; default: ; endcase")
    node = found.first(Case)
    assert (node.inside, node.keyword, node.qualifier) == (True, "case", "priority")
    assert found.text(node.head) == "priority case (d) inside"
    assert isinstance(node.items[1].body, Empty)


def test_an_empty_block_is_empty(sample: Reader) -> None:
    assert body(sample, "begin end").first(Block).body == ()


def test_declarations_inside(sample: Reader) -> None:
    found = body(sample, "begin : b logic [7:0] t, u; automatic int k = 3; t = d; q <= t; end")
    node = found.first(Block)
    assert [found.text(part.span) for part in node.declarations] == ["logic [7:0] t, u;", "automatic int k = 3;"]
    assert [part.initial for part in node.declarations] == [False, True]
    target = found.first(Assign).targets[0]
    assert target.is_local
    assert target.variable == node.declarations[0].names[0]
    assert target.variable.rpartition(".")[2] == "t"


def test_locals_never_collide_with_each_other_or_the_module(sample: Reader) -> None:
    found = body(
        sample,
        "begin for (int i = 0; i < 2; i++) q[i] <= d[i]; for (int i = 2; i < 4; i++) q[i] <= d[i];\n"
        "begin int i; i = d; r <= i; end end",
        "integer i;",
    )
    names = [loop.variables[0] for loop in found.all(Loop)]
    local = next(a.targets[0].variable for a in found.all(Assign) if a.blocking)
    assert len({*names, local, "i"}) == 4


def test_for_loops(sample: Reader) -> None:
    found = body(
        sample,
        "begin for (int k = 0; k < 8; k = k + 1) q[k] <= d[k]; for (i = 0; i < 4; i = i + 1) r[2*i] <= d[i]; end",
        "integer i;",
    )
    inner, outer = found.all(Loop)
    assert found.text(inner.head) == "for (int k = 0; k < 8; k = k + 1)"
    assert (len(inner.variables), inner.outer_variables) == (1, ())
    assert (outer.variables, outer.outer_variables) == ((), ("i",))
    assert [a.targets[0].index for a in found.all(Assign)] == [Index.LOOP, Index.LOOP]
    assert [a.targets[0].bits for a in found.all(Assign)] == [(7, 0), (7, 0)]


def test_other_loops(sample: Reader) -> None:
    found = body(sample, "begin foreach (q[k]) q[k] <= d[k]; repeat (3) r <= d; end")
    assert [loop.keyword for loop in found.all(Loop)] == ["foreach", "repeat"]
    assert found.all(Assign)[0].targets[0].index is Index.LOOP


def test_loops_without_fixed_bounds_are_opaque(sample: Reader) -> None:
    for text in (
        "for (int k = 0; k < d; k++) q[k] <= 1;",
        "while (d > i) i = i + 1;",
        "repeat (s) q <= d;",
        "for (int k = 0; k < 8; k++) begin q[k] <= d[k]; k = k + 1; end",
        "for (int k = 0; k < 8; k++) begin if (en) break; q[k] <= d[k]; end",
    ):
        found = body(sample, text, "integer i;")
        assert found.all(Opaque), text


def test_targets(sample: Reader) -> None:
    declared = """typedef struct packed { logic [2:0] hi; logic [4:0] lo; } pair_t;
    pair_t p; logic [0:7] up; logic [1:0][3:0] two; logic [7:0] mem [0:3]; logic [7:0] deep [0:1][0:1];"""
    for text, variable, bits, index, unpacked in (
        ("q <= d;", "q", (7, 0), Index.CONSTANT, False),
        ("q[3] <= en;", "q", (3, 3), Index.CONSTANT, False),
        ("q[5:2] <= d;", "q", (5, 2), Index.CONSTANT, False),
        ("q[s] <= en;", "q", (7, 0), Index.VARIABLE, False),
        ("q[s +: 2] <= d;", "q", (7, 0), Index.VARIABLE, False),
        ("p.hi <= d;", "p", (7, 5), Index.CONSTANT, False),
        ("p.lo[s] <= en;", "p", (4, 0), Index.VARIABLE, False),
        ("up[0] <= en;", "up", (7, 7), Index.CONSTANT, False),
        ("two[1][0] <= en;", "two", (4, 4), Index.CONSTANT, False),
        ("two[s] <= d;", "two", (7, 0), Index.VARIABLE, False),
        ("mem[1] <= d;", "mem", (23, 16), Index.CONSTANT, False),
        ("mem[s] <= d;", "mem", (31, 0), Index.VARIABLE, True),
        ("mem[2][s] <= en;", "mem", (15, 8), Index.VARIABLE, False),
        ("deep[0][s] <= d;", "deep", (31, 16), Index.VARIABLE, True),
    ):
        target = body(sample, text, declared).first(Assign).targets[0]
        assert (target.variable, target.bits, target.index, target.unpacked) == (variable, bits, index, unpacked), text


def test_a_concatenation_has_several_targets(sample: Reader) -> None:
    targets = body(sample, "{q[3:0], r} <= d;").first(Assign).targets
    assert [(t.variable, t.bits) for t in targets] == [("q", (3, 0)), ("r", (7, 0))]


def test_side_effects_are_opaque(sample: Reader) -> None:
    task = "task put(input [7:0] v); r <= v; endtask"
    for text, what, harmless in (
        ('$display("%d", d);', "call of $display", True),
        ("put(d);", "call of put", False),
        ("assert (en);", "assertion", True),
        ("$finish;", "call of $finish", False),
        ("-> e;", "EventTrigger statement", False),
        ("begin : b if (en) disable b; q <= d; end", "Disable statement", False),
        ("fork q <= d; join", "Block statement", False),
        ("force q = d;", "ProceduralAssign statement", False),
    ):
        node = body(sample, text, f"{task} event e;").first(Opaque)
        assert (node.what, node.harmless) == (what, harmless), text
    assert body(sample, '$display("%d", d);').first(Opaque).reads == {"d"}


def test_parts_lie_inside_their_statement(sample: Reader) -> None:
    found = body(
        sample, "begin : x if (en) begin q <= d; end else if (s == 1) case (s) 0: r <= d; default: ; endcase end"
    )
    for statement in found.block.body.walk():
        assert all(statement.span.covers(child.span) for child in statement.children())
