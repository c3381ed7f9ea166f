"""How a design reaches the engine: folders, arguments, copies that are mended, ways out."""

import pytest

from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.logic.elaborate import Elaborated, elaborate
from rewriter.model.source import RtlSource, SourceText

pytestmark = pytest.mark.engine


def texts(**files: str) -> tuple[SourceText, ...]:
    return tuple(SourceText(path, data.encode()) for path, data in files.items())


def run(source: RtlSource, top: str = "quay", **options: str) -> Elaborated:
    return elaborate({"gold": source, "gate": source}, top, 60, **options)  # pyright: ignore[reportArgumentType]


def test_includes_beside_above_and_on_the_path() -> None:
    files = {
        "/a/rtl/quay.sv": '`include "near.svh"\n`include "../up.svh"\n`include "far.svh"\n'
        "module quay (output logic [`NEAR+`UP+`FAR-1:0] y); assign y = '1; endmodule\n",
        "/a/rtl/near.svh": "`define NEAR 1\n",
        "/a/up.svh": "`define UP 2\n",
        "/b/inc/far.svh": "`define FAR 4\n",
    }
    done = run(RtlSource(("/a/rtl/quay.sv",), include_dirs=("/b/inc",), texts=texts(**files)))
    assert done.sides, done.message
    assert len(done.sides[0].modules["quay"].ports["y"].bits) == 7


def test_defines_parameters_and_library_files() -> None:
    files = {
        "/a/quay.sv": "module quay #(parameter int N = 1) (output logic [N-1:0] y);\n"
        "`ifdef GONE\n nothing n();\n`endif\n pile #(.W(N + `MORE)) p(.y(y)); endmodule\n",
        "/a/lib.v": "module pile #(parameter W = 1) (output [W-1:0] y); assign y = {W{1'b1}}; endmodule\n",
    }
    source = RtlSource(
        ("/a/quay.sv",), library_files=("/a/lib.v",), defines=("MORE=(1 + 2)", "GONE"), undefines=("GONE",),
        parameters=("N=5",), texts=texts(**files),
    )  # fmt: skip
    done = run(source)
    assert done.sides, done.message
    assert len(done.sides[0].modules["quay"].ports["y"].bits) == 5
    (pile,) = [module for name, module in done.sides[0].modules.items() if name.startswith("pile")]
    assert len(pile.ports["y"].bits) == 8


def test_awkward_paths() -> None:
    path = "/a b/pi$er/qu'ay(1).sv"
    done = run(RtlSource((path,), texts=texts(**{path: "module quay (output y); assign y = 1; endmodule\n"})))
    assert done.sides, done.message


MENDED = """module quay (input logic a, b, output logic y);
    logic unused = a &
                   b;
    assign y = a;
endmodule
"""


def test_initial_value_from_a_net_is_left_out_of_the_copies() -> None:
    done = run(RtlSource(("/a/quay.sv",), texts=texts(**{"/a/quay.sv": MENDED})))
    assert done.sides, done.message
    assert done.notes == ("initial value left out of the proof: logic unused",)


def test_synthesis_is_defined_only_when_nothing_else_works() -> None:
    choose = "module quay (output y);\n`ifdef SYNTHESIS\n assign y = 1;\n`else\n {}\n`endif\nendmodule\n"
    plain = run(RtlSource(("/a/q.sv",), texts=texts(**{"/a/q.sv": choose.format("assign y = 0;")})))
    assert plain.sides[0].modules["quay"].ports["y"].bits == ("0",) or not plain.notes
    needed = run(RtlSource(("/a/q.sv",), texts=texts(**{"/a/q.sv": choose.format("nowhere n(y);")})))
    assert needed.sides, needed.message
    assert "SYNTHESIS" in needed.notes[0]


def test_interfaces_keep_their_hierarchy() -> None:
    text = """
    interface line (input logic clk); logic v; modport dst (input v, clk); endinterface
    module slot (line.dst b, output logic q); always_ff @(posedge b.clk) q <= b.v; endmodule
    module quay (input logic clk, v, output logic q); line b (clk); assign b.v = v; slot s (.b(b), .q); endmodule
    """
    done = run(RtlSource(("/a/q.sv",), texts=texts(**{"/a/q.sv": text})))
    assert set(done.sides[0].instances()) == {"quay", "quay.s"}


def test_our_cells_are_black_boxes_whatever_their_text() -> None:
    for kind in ("behavioural", "discrete", "transparent"):
        cells = {f"/a/{name}": text for name, text in render_cells(load_cell_map(kind), None).items()}
        text = """module quay (input wire clk, w, t, output wire g, h);
            stillclock_icg a (.clk(clk), .wake(w), .test(t), .gclk(g));
            stillclock_icg_n b (.clk(clk), .wake(w), .test(t), .gclk(h)); endmodule"""
        files = {"/a/quay.v": text} | cells
        done = run(RtlSource(tuple(files), texts=texts(**files)))
        assert done.sides, done.message
        assert set(done.sides[0].modules["quay"].instances) == {"a", "b"}
        assert set(done.sides[0].instances()) == {"quay"}


def test_modules_without_source_come_as_stubs() -> None:
    source = RtlSource(
        ("/a/q.v",), texts=texts(**{"/a/q.v": "module quay (input a, output y); pump p (a, y); endmodule"})
    )
    assert "unknown module 'pump'" in run(source).message
    assert run(source, stubs="module pump (input a, output y); endmodule").sides


def test_messages_name_the_design_s_own_files() -> None:
    source = RtlSource(("/a/q.v",), texts=texts(**{"/a/q.v": "module quay (input a);\n wire b = nowhere;\nendmodule"}))
    message = run(source).message
    assert "/a/q.v:2" in message
    assert "/rtl/" not in message
