"""Bodies: instances, variables, writers, clocks as data, registers that drive clocks."""

from rewriter.model.design import WriterKind
from tests.frontend.conftest import Reader

LEAF = (
    "module leaf #(parameter W = 2)(input ck, rn, input [W-1:0] d, output reg [W-1:0] q);\n"
    "always @(posedge ck or negedge rn) if (!rn) q <= 0; else q <= d;\nendmodule\n"
)


def test_bodies_are_shared_by_equal_parameters(sample: Reader) -> None:
    found = sample(
        LEAF + "module pair(input c, r, input [3:0] d, output [3:0] q);\n"
        "leaf #(4) a(c, r, d, q); leaf #(4) b(c, r, d, ); leaf s(c, r, d[1:0], ); endmodule\n"
        "module m(input c, r, input [3:0] d, output [3:0] q, p); pair x(c, r, d, q), y(c, r, d, p); "
        "endmodule"
    )
    leaves = {m.key: m for m in found.design.modules if m.definition == "leaf"}
    assert leaves["m.x.a"].instances == ("m.x.a", "m.x.b", "m.y.a", "m.y.b")
    assert leaves["m.x.s"].instances == ("m.x.s", "m.y.s")
    assert leaves["m.x.a"].parameters == ("W=4",)
    assert leaves["m.x.a"].blocks[0].span == leaves["m.x.s"].blocks[0].span
    assert found.design.flop_bits == 4 * 4 + 2 * 2


def test_instance_arrays_and_generate_loops(sample: Reader) -> None:
    found = sample(
        LEAF + "module m(input c, r, input [3:0] d, output [3:0] q, p);\n"
        "leaf u[1:0](c, r, d, q); for (genvar i = 0; i < 2; i++) begin : g\n"
        "leaf v(c, r, d[2*i +: 2], p[2*i +: 2]); end endmodule"
    )
    assert set(found.module("leaf").instances) == {"m.u[0]", "m.u[1]", "m.g[0].v", "m.g[1].v"}


def test_declarations_make_copies(sample: Reader) -> None:
    found = sample(
        "typedef enum logic [1:0] {A, B} st_t;\n"
        "module m #(parameter W = 4, parameter type T = logic)(input wire clk, "
        "input [W-1:0] d, output reg [3:0] q);\n"
        "reg signed [7:0] a; st_t s; logic [1:0][3:0] b [0:1]; integer i; enum {X, Y} e; T t; "
        "(* keep, a = 2 *) bit k;\n"
        "struct packed { logic z; } z; wire [2:0] w = d;\n"
        "always @(posedge clk) begin a <= d; s <= A; b[0] <= d; i <= d; e <= X; t <= d; k <= w; "
        "q <= d; z <= d; end\n"
        "endmodule"
    )
    texts = {name: (v.declaration, v.unpacked, v.width, v.element_width) for name, v in found.top.variables.items()}
    assert texts == {
        "clk": ("logic", "", 1, 1),
        "d": ("logic [W-1:0]", "", 4, 4),
        "q": ("reg [3:0]", "", 4, 4),
        "a": ("reg signed [7:0]", "", 8, 8),
        "s": ("st_t", "", 2, 2),
        "b": ("logic [1:0][3:0]", "[0:1]", 16, 8),
        "i": ("integer", "", 32, 32),
        "e": (None, "", 32, 32),
        "t": ("T", "", 1, 1),
        "k": ("bit", "", 1, 1),
        "w": ("logic [2:0]", "", 3, 3),
        "z": (None, "", 1, 1),
    }
    assert found.top.variables["k"].attributes == ("keep", "a")
    assert {name for name, v in found.top.variables.items() if v.is_port} == {"clk", "d", "q"}
    assert {name for name, v in found.top.variables.items() if v.is_net} == {"clk", "d", "w"}


def test_declarations_in_verilog(sample: Reader) -> None:
    found = sample(
        "module m(clk, d, q); input clk; input [3:0] d; output [3:0] q; reg [3:0] q; wire [3:0] w;\n"
        "assign w = d; always @(posedge clk) q <= w; endmodule",
        name="t.v",
    )
    assert {n: v.declaration for n, v in found.top.variables.items()} == {
        "clk": "reg",
        "q": "reg [3:0]",
        "w": "reg [3:0]",
    }


def test_every_writer_is_found(sample: Reader) -> None:
    found = sample(
        "module drv(output [1:0] o); assign o = 1; endmodule\n"
        "module m(input clk, en, input [7:0] d, output reg [7:0] q); wire [7:0] n; logic [7:0] c; reg [7:0] l = 3;\n"
        "always @(posedge clk) q[1:0] <= d; always @(posedge clk) q[3:2] <= d; always @* q[4] = d[0];\n"
        "initial q = 0; always @(posedge clk) begin c[0] <= 1; l <= d; end drv u(c[2:1]); assign c[3] = en;\n"
        "endmodule"
    )
    writers = {name: {(w.kind, w.bits) for w in found.top.writers[name]} for name in ("q", "c", "l")}
    assert writers["q"] == {
        (WriterKind.CLOCKED, (1, 0)),
        (WriterKind.CLOCKED, (3, 2)),
        (WriterKind.COMBINATIONAL, (4, 4)),
        (WriterKind.INITIAL, (7, 0)),
    }
    assert writers["c"] == {
        (WriterKind.CLOCKED, (0, 0)),
        (WriterKind.INSTANCE, (2, 1)),
        (WriterKind.CONTINUOUS, (3, 3)),
    }
    assert writers["l"] == {(WriterKind.CLOCKED, (7, 0))}  # an initial value is no writer
    spans = {found.text(w.span) for w in found.top.writers["q"] if w.kind is WriterKind.CLOCKED}
    assert spans == {found.text(b.span) for b in found.top.blocks[:2]}


def test_writers_of_array_words_count_from_the_last(sample: Reader) -> None:
    found = sample(
        "module m(input clk, input [7:0] d); logic [7:0] mem [0:3]; logic [7:0] rev [3:0];\n"
        "always @(posedge clk) begin mem[0] <= d; rev[0] <= d; end endmodule"
    )
    assert [w.bits for w in found.top.writers["mem"]] == [(31, 24)]
    assert [w.bits for w in found.top.writers["rev"]] == [(7, 0)]


def test_a_latch_is_a_writer(sample: Reader) -> None:
    found = sample(
        "module m(input clk, en, d, output logic [1:0] q); always_latch if (en) q[1] = d;\n"
        "always @(posedge clk) q[0] <= d; endmodule"
    )
    assert {w.kind for w in found.top.writers["q"]} == {WriterKind.LATCH, WriterKind.CLOCKED}


def test_a_clock_read_as_data_is_found(sample: Reader) -> None:
    def uses(text: str) -> dict[str, str]:
        found = sample(
            f"{LEAF}module m(input clk, en, output reg q, output o); {text}\nalways @(posedge clk) q <= en; endmodule",
            "--top",
            "m",
        )
        return {name: found.text(span) for name, span in found.top.clock_uses.items()}

    assert uses("") == {}
    assert uses("leaf u(.ck(clk), .rn(en), .d(2'b0), .q());") == {}
    assert uses("assign o = clk & en;") == {"clk": "clk"}
    assert uses("logic n; always_comb n = clk;") == {"clk": "clk"}
    assert uses("leaf u(.ck(clk & en), .rn(en), .d(2'b0), .q());") == {"clk": "clk"}
    assert uses("wire copy; assign copy = clk; logic x; always @(posedge copy) x <= en;") == {}
    assert uses("wire copy; assign copy = clk; assign o = ~copy;") == {"clk": "copy"}
    assert uses("wire copy = clk; logic x; always @(posedge copy) x <= en;") == {}
    assert uses("wire copy = clk; assign o = ~copy;") == {"clk": "copy"}
    assert uses("wire n; and g(n, clk, en);") == {"clk": "clk"}


def test_a_clock_made_here_is_not_read_by_being_written(sample: Reader) -> None:
    found = sample(
        "module cg(input c, e, output g); assign g = c & e; endmodule\n"
        "module m(input clk, en, d, output reg q); wire g; cg u(clk, en, g); always @(posedge g) "
        "q <= d; endmodule"
    )
    assert found.top.clock_uses == {}


def test_registers_that_drive_clocks_are_found(sample: Reader) -> None:
    found = sample(
        LEAF + "module mid(input c, r, input [1:0] d); leaf u(c, r, d, ); endmodule\n"
        "module m(input clk, input [1:0] d, output reg plain);\n"
        "reg div, rst, through, own, quiet; wire w; assign w = through & d[0];\n"
        "always @(posedge clk) begin div <= ~div; rst <= d[0]; through <= d[1]; own <= d[0]; "
        "quiet <= 1; end\n"
        "mid a(div, rst, d); leaf b(w, 1'b1, {quiet, quiet}, ); always @(posedge own) "
        "plain <= d[0];\nendmodule"
    )
    assert set(found.top.drives_clocks) == {"div", "rst", "through", "own"}


def test_black_boxes_are_warned_of(sample: Reader) -> None:
    found = sample("module m(input clk, d, output reg q); macro_x u(.a(q)); always @(posedge clk) q <= d; endmodule")
    assert [box.name for box in found.design.black_boxes] == ["macro_x"]
    (warning,) = found.design.warnings
    assert "macro_x" in warning.message
    assert warning.place.endswith("t.sv:1:47")


def test_names_used_from_outside_are_found(sample: Reader) -> None:
    found = sample(
        "module leaf(input c); logic h; always @(posedge c) begin : b logic t; t = ~h; h <= t; "
        "end endmodule\n"
        "module m(input clk, output o, p); leaf u(clk), v(clk); assign o = u.h; assign p = m.v.b.t; "
        "endmodule"
    )
    assert found.module("leaf").external_references == {"h", "b.t"}


def test_bits_that_count(sample: Reader) -> None:
    def bits(text: str) -> tuple[int, int]:
        found = sample(
            "module m(input clk, en, input [3:0] d, output reg [3:0] q, output [3:0] o);\n"
            f"reg [3:0] r, t; reg [7:0] mem [0:3]; integer i; {text} endmodule"
        )
        return found.design.flop_bits, found.design.array_bits

    assert bits("always @(posedge clk) q <= d;") == (4, 0)
    assert bits("always @(posedge clk) q[1:0] <= d;") == (2, 0)
    assert bits("always @(posedge clk) mem[d] <= d;") == (0, 32)
    assert bits("always @(posedge clk) mem[2] <= d;") == (8, 0)
    assert bits("always @(posedge clk) if (0) q <= d; else r <= d;") == (4, 0)
    assert bits("always @(posedge clk) for (i = 0; i < 2; i = i + 1) q[i] <= d[i];") == (4, 0)  # may write all four
    assert bits("always @(posedge clk) begin t = d; q <= t; end") == (4, 0)  # t is a temporary
    assert bits("always @(posedge clk) begin if (en) t = d; q <= t; end") == (8, 0)  # t keeps its value
    assert bits("always @(posedge clk) begin case (d) 0: t = 1; default: t = 2; endcase q <= t; end") == (4, 0)
    assert bits("always @(posedge clk) begin q <= t; t = d; end") == (8, 0)
    assert bits("always @(posedge clk) q = d;") == (4, 0)
    assert bits("always @(posedge clk) r = d; assign o = r;") == (4, 0)
    assert bits("always @(posedge clk) r = d; always @* q = r;") == (4, 0)
    assert bits("always @(posedge clk) t = t + 1;") == (4, 0)
