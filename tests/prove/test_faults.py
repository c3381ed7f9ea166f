"""Planted faults: each is found, by the right check, and names the right register.

The kinds are those that a rewrite by hand or by a faulty tool shows: clock, edge, cell, wake condition, override,
memories, macros, domains.
"""

from collections.abc import Callable

import pytest

from rewriter.model.evidence import CellEvidence
from rewriter.model.reasons import EvidenceKind
from tests.prove.harbour import NO_TIME, answer, cell, mismatch
from tests.prove.test_examples import icg

pytestmark = pytest.mark.engine

GOLD = """
module lamp (input logic clk, clk2, rst, set, gain, input logic [7:0] bus, output logic [7:0] glow, dim, echo);
    always_ff @(posedge clk) if (rst) glow <= '0; else if (set && gain) glow <= bus;
    always_ff @(posedge clk) if (set) dim <= bus;
    always_ff @(posedge clk) echo <= glow ^ dim;
endmodule"""

GATE = f"""
module lamp (input logic clk, clk2, rst, set, gain, input logic [7:0] bus, output logic [7:0] glow, dim, echo,
             input wire test_en);
    {icg("glow", "rst || set && gain")}
    {icg("dim", "set")}
    always_ff @(posedge gclk_glow) if (rst) glow <= '0; else if (set && gain) glow <= bus;
    always_ff @(posedge gclk_dim) if (set) dim <= bus;
    always_ff @(posedge clk) echo <= glow ^ dim;
endmodule"""


def planted(*changes: tuple[str, str]) -> str:
    """Plant a fault in the good rewrite."""
    text = GATE
    for old, new in changes:
        assert text.count(old) == 1, old
        text = text.replace(old, new)
    return text


def test_the_good_rewrite_proves() -> None:
    assert answer(GOLD, GATE).proved


def fails(evidence: CellEvidence, register: str, reason: str = "disproved") -> None:
    assert evidence.kind is EvidenceKind.DISPROVED
    assert evidence.failing == (register,)
    assert evidence.reason == reason
    assert register in evidence.detail


WAKES = {
    "missing term": ("rst || set && gain", "rst || set && gain && bus[0]"),
    "missing reset term": ("rst || set && gain", "set && gain"),
    "inverted wake": (".wake(rst || set && gain)", ".wake(!(rst || set && gain))"),
    "tied off": (".wake(rst || set && gain)", ".wake(1'b0)"),
    "and for or": ("rst || set && gain", "rst && set && gain"),
}


@pytest.mark.parametrize("change", WAKES.values(), ids=WAKES)
def test_wrong_wake_condition(change: tuple[str, str]) -> None:
    result = answer(GOLD, planted(change))
    found = cell(result, "u_icg_glow")
    fails(found, "glow")
    assert found.counterexample is not None
    assert found.counterexample.obligation == "hold"
    assert found.counterexample.register.startswith("glow[")
    assert dict(found.counterexample.signals)["test_en"] == "0x0"
    assert cell(result, "u_icg_dim").kind is EvidenceKind.PROVED
    assert not result.mismatches


def test_counterexample_holds_when_worked_out_by_hand() -> None:
    result = answer(GOLD, planted(("rst || set && gain", "set && gain")))
    example = cell(result, "u_icg_glow").counterexample
    assert example is not None
    signals = {name: int(value, 16) for name, value in example.signals}
    assert signals["rst"] == 1
    assert not signals.get("set", 0) & signals.get("gain", 0)
    assert int(example.gold, 16) == 0
    assert int(example.gate, 16) == signals["glow"] != 0


CLOCKS: dict[str, tuple[tuple[tuple[str, str], ...], str]] = {
    "wrong edge of the bank": ((("posedge gclk_glow", "negedge gclk_glow"),), "edge-mix"),
    "wrong cell type": ((("stillclock_icg u_icg_glow", "stillclock_icg_n u_icg_glow"),), "edge-mix"),
    "falling bank on a falling cell": (
        (
            ("posedge gclk_glow", "negedge gclk_glow"),
            ("stillclock_icg u_icg_glow", "stillclock_icg_n u_icg_glow"),
        ),
        "disproved",
    ),
    "wrong clock": (((".clk(clk), .wake(rst", ".clk(clk2), .wake(rst"),), "disproved"),
    "inverted clock": (((".clk(clk), .wake(rst", ".clk(~clk), .wake(rst"),), "disproved"),
    "nested in another bank's cell": (((".clk(clk), .wake(rst", ".clk(gclk_dim), .wake(rst"),), "disproved"),
    "mixed edges in a chain": (
        (
            (".clk(clk), .wake(rst", ".clk(gclk_dim), .wake(rst"),
            ("stillclock_icg u_icg_dim", "stillclock_icg_n u_icg_dim"),
        ),
        "edge-mix",
    ),
}


@pytest.mark.parametrize("changes,reason", CLOCKS.values(), ids=CLOCKS)
def test_wrong_clock(changes: tuple[tuple[str, str], ...], reason: str) -> None:
    fails(cell(answer(GOLD, planted(*changes)), "u_icg_glow"), "glow", reason)


def test_bank_on_the_other_bank_s_cell() -> None:
    result = answer(GOLD, planted(("posedge gclk_glow", "posedge gclk_dim")))
    fails(cell(result, "u_icg_dim"), "glow")


def test_ungated_register_moved_to_a_gated_clock() -> None:
    result = answer(GOLD, planted(("posedge clk) echo", "posedge gclk_dim) echo")))
    fails(cell(result, "u_icg_dim"), "echo")


def test_wrong_data() -> None:
    result = answer(GOLD, planted(("dim <= bus", "dim <= ~bus")))
    found = cell(result, "u_icg_dim")
    fails(found, "dim")
    assert found.counterexample is not None
    assert found.counterexample.obligation == "load"


def test_changed_output_and_ungated_register() -> None:
    result = answer(GOLD, planted(("echo <= glow ^ dim", "echo <= glow | dim")))
    assert mismatch(result, "echo").counterexample is not None
    assert all(c.kind is EvidenceKind.PROVED for c in result.cells)
    assert not result.proved


OVERRIDES = {
    "tied off": (".wake(set), .test(test_en)", ".wake(set), .test(1'b0)"),
    "inverted": (".wake(set), .test(test_en)", ".wake(set), .test(~test_en)"),
    "masked": (".wake(set), .test(test_en)", ".wake(set), .test(test_en & gain)"),
    "another pin": (".wake(set), .test(test_en)", ".wake(set), .test(gain)"),
}


@pytest.mark.parametrize("change", OVERRIDES.values(), ids=OVERRIDES)
def test_broken_override(change: tuple[str, str]) -> None:
    found = mismatch(answer(GOLD, planted(change)), "override")
    assert "u_icg_dim" in found.detail


def test_override_that_the_top_lacks() -> None:
    result = answer(GOLD, GATE, test_port="scan_mode")
    assert "scan_mode" in mismatch(result, "override").detail


def test_override_found_without_being_named() -> None:
    assert answer(GOLD, GATE, test_port=None).proved


def test_active_low_override() -> None:
    text = GATE.replace(".test(test_en)", ".test(~test_en)")
    assert answer(GOLD, text, test_active_low=True).proved
    assert not answer(GOLD, text, test_active_low=False).proved
    assert answer(GOLD, text, test_port=None).proved


def test_override_lost_on_the_way_down() -> None:
    gold = """
    module slot (input logic clk, en, d, output logic q); always_ff @(posedge clk) if (en) q <= d; endmodule
    module lamp (input logic clk, input logic [1:0] en, d, output logic [1:0] q);
        slot a (clk, en[0], d[0], q[0]); slot b (clk, en[1], d[1], q[1]); endmodule"""
    body = f"{icg('q', 'en')} always_ff @(posedge gclk_q) if (en) q <= d; endmodule"
    gate = f"""
    module slot (input logic clk, en, d, output logic q, input wire test_en); {body}
    module lamp (input logic clk, input logic [1:0] en, d, output logic [1:0] q, input wire test_en);
        slot a (clk, en[0], d[0], q[0], test_en); slot b (clk, en[1], d[1], q[1], 1'b0); endmodule"""
    assert mismatch(answer(gold, gate), "override").module == "lamp.b"


MEMORY = """
module lamp (input logic clk, we, input logic [3:0] at, input logic [7:0] d, output logic [7:0] y{port});
    logic [7:0] store [16];
    {cell}
    always_ff @(posedge {clock}) if (we) store[at] <= d;
    assign y = store[at];
endmodule"""


def memory(wake: str) -> str:
    return MEMORY.format(port=", input wire test_en", cell=icg("store", wake), clock="gclk_store")


def test_memory() -> None:
    gold = MEMORY.format(port="", cell="", clock="clk")
    assert answer(gold, memory("we")).proved
    fails(cell(answer(gold, memory("we && at != 0")), "u_icg_store"), "store")
    result = answer(gold, memory("we").replace("store[at] <= d", "store[at ^ 4'd1] <= d"))
    fails(cell(result, "u_icg_store"), "store")


MACRO = """
module lamp (input logic clk, en, input logic [3:0] d, output logic [3:0] q, y{port});
    {cell}
    always_ff @(posedge {bank}) if (en) q <= d;
    ram u_ram (.ck({macro}), .a(d), .q(y));
endmodule"""
STUB = "module ram (input ck, input [3:0] a, output [3:0] q); endmodule"


def test_macro_moved_to_a_gated_clock() -> None:
    gold = MACRO.format(port="", cell="", bank="clk", macro="clk")
    parts = {"port": ", input wire test_en", "cell": icg("q", "en"), "bank": "gclk_q"}
    assert answer(gold, MACRO.format(**parts, macro="clk"), stubs=STUB).proved
    result = answer(gold, MACRO.format(**parts, macro="gclk_q"), stubs=STUB)
    assert mismatch(result, "u_ram.ck")


def test_register_added_by_hand_to_a_gated_block() -> None:
    """The rewritten RTL against itself, its cells transparent."""
    assert answer(None, GATE).proved
    added = planted(
        ("if (set) dim <= bus;", "begin if (set) dim <= bus; echo <= glow ^ dim; end"),
        ("    always_ff @(posedge clk) echo <= glow ^ dim;\n", ""),
    )
    fails(cell(answer(None, added), "u_icg_dim"), "echo")


def test_register_that_only_one_text_has() -> None:
    extra = planted(("echo <= glow ^ dim;", "echo <= late; logic [7:0] late; always_ff @(posedge clk) late <= glow;"))
    result = answer(GOLD, extra)
    assert mismatch(result, "late")
    assert mismatch(result, "echo")


def test_initial_value() -> None:
    gold = """module lamp (input logic clk, en, output logic q); logic s = 1'b1;
        always_ff @(posedge clk) if (en) s <= 1'b0; assign q = s; endmodule"""
    gate = f"""module lamp (input logic clk, en, output logic q, input wire test_en); logic s = 1'b1;
        {icg("s", "en")} always_ff @(posedge gclk_s) if (en) s <= 1'b0; assign q = s; endmodule"""
    assert answer(gold, gate).proved
    fails(cell(answer(gold, gate.replace("1'b1;", "1'b0;", 1)), "u_icg_s"), "s")


ASYNC = """
module lamp (input logic clk, rst_n, por_n, en, input logic [3:0] d, boot, output logic [3:0] q{port});
    {cell}
    always_ff @(posedge {clock} or negedge {reset}) if (!{reset}) q <= {value}; else if (en) q <= d;
endmodule"""


def asynchronous(**parts: str) -> str:
    given = {"port": ", input wire test_en", "cell": icg("q", "en"), "clock": "gclk_q", "reset": "rst_n", "value": "'0"}
    return ASYNC.format(**given | parts)


RESETS = {
    "another reset": {"reset": "por_n"},
    "another value": {"value": "4'd1"},
}


@pytest.mark.parametrize("parts", RESETS.values(), ids=RESETS)
def test_asynchronous_reset(parts: dict[str, str]) -> None:
    gold = asynchronous(port="", cell="", clock="clk")
    assert answer(gold, asynchronous()).proved
    found = cell(answer(gold, asynchronous(**parts)), "u_icg_q")
    fails(found, "q")
    assert found.counterexample is not None
    assert found.counterexample.obligation == "reset"


def test_asynchronous_reset_that_loads_a_signal() -> None:
    gold = asynchronous(port="", cell="", clock="clk", value="boot")
    fails(cell(answer(gold, asynchronous(value="boot")), "u_icg_q"), "q", "async-load")


DOMAIN = """
module source (input logic c, r_n, e, output logic o);
    always_ff @(posedge c or negedge r_n) if (!r_n) o <= '0; else o <= e;
endmodule
module lamp (input logic clk, clk2, rst_n, por_n, en, input logic [3:0] d, output logic [3:0] q{port});
    logic go;
    source s (.c({c}), .r_n({r}), .e(en), .o(go));
    {cell}
    always_ff @(posedge {clock} or negedge rst_n) if (!rst_n) q <= '0; else if (go) q <= d;
endmodule"""


@pytest.mark.parametrize(
    "c,r,reason",
    [("clk", "rst_n", ""), ("clk2", "rst_n", "foreign-domain"), ("clk", "por_n", "foreign-reset")],
)
def test_source_of_the_wake_condition(c: str, r: str, reason: str) -> None:
    gold = DOMAIN.format(port="", cell="", clock="clk", c=c, r=r)
    gate = DOMAIN.format(port=", input wire test_en", cell=icg("q", "go"), clock="gclk_q", c=c, r=r)
    found = cell(answer(gold, gate), "u_icg_q")
    assert found.reason == reason
    assert (found.kind is EvidenceKind.PROVED) == (not reason)
    if reason:
        assert "lamp.s.o" in found.detail


def test_bank_without_reset_may_wake_on_a_register_with_one() -> None:
    gold = DOMAIN.format(port="", cell="", clock="clk", c="clk", r="por_n")
    gold = gold.replace(" or negedge rst_n) if (!rst_n) q <= '0; else", ")")
    gate = DOMAIN.format(port=", input wire test_en", cell=icg("q", "go"), clock="gclk_q", c="clk", r="por_n")
    gate = gate.replace(" or negedge rst_n) if (!rst_n) q <= '0; else", ")")
    assert answer(gold, gate).proved


WAKE_SOURCES: dict[str, tuple[str, str, str]] = {
    "clock as data": ("", "en & clk", "clock-as-data"),
    "another clock as data": ("", "en & clk2", "clock-as-data"),
    "latch": ("logic l; always_latch if (!clk) l = en;", "l", "foreign-domain"),
}


@pytest.mark.parametrize("extra,wake,reason", WAKE_SOURCES.values(), ids=WAKE_SOURCES)
def test_wake_condition_that_moves_within_a_cycle(extra: str, wake: str, reason: str) -> None:
    text = """module lamp (input logic clk, clk2, en, d, output logic q, p{port}); {extra} {cell}
        always_ff @(posedge clk2) p <= d;
        always_ff @(posedge {clock}) if ({wake}) q <= d; endmodule"""
    gold = text.format(port="", extra=extra, cell="", clock="clk", wake=wake)
    gate = text.format(port=", input wire test_en", extra=extra, cell=icg("q", wake), clock="gclk_q", wake=wake)
    assert cell(answer(gold, gate), "u_icg_q").reason == reason


def test_missing_and_changed_instances_and_ports() -> None:
    gold = """
    module slot #(parameter K = 0) (input logic d, output logic y); assign y = d ^ K[0]; endmodule
    module lamp (input logic d, output logic y, z); slot a (.d(d), .y(y)); slot b (.d(~d), .y(z)); endmodule"""
    assert answer(gold, gold).proved
    changes: list[tuple[Callable[[str], str], str]] = [
        (lambda t: t.replace("slot b (.d(~d), .y(z));", "assign z = ~d;"), "b"),
        (lambda t: t.replace(".d(~d)", ".d(d)"), "b.d"),
        (lambda t: t.replace("slot b", "slot #(.K(1)) b"), "y"),
        (lambda t: t.replace("output logic y, z", "output logic y").replace(".y(z)", ".y()"), "z"),
    ]
    for change, what in changes:
        result = answer(gold, change(gold))
        assert what in [m.what for m in result.mismatches], what


def test_limits_leave_things_undecided() -> None:
    gold = """module lamp (input logic clk, en, input logic [15:0] a, b, output logic [31:0] q);
        always_ff @(posedge clk) if (en) q <= 32'(a) * 32'(b); endmodule"""
    gate = f"""module lamp (input logic clk, en, input logic [15:0] a, b, output logic [31:0] q, input wire test_en);
        {icg("q", "en")} always_ff @(posedge gclk_q) if (en) q <= 32'(b) * 32'(a); endmodule"""
    found = cell(answer(gold, gate, limits=NO_TIME), "u_icg_q")
    assert found.kind is EvidenceKind.UNDECIDED
    assert (found.reason, found.failing) == ("undecided", ("q",))


def test_text_that_the_engine_cannot_read() -> None:
    gold = """module lamp (input logic clk, set, clr, d, output logic q);
        always @(posedge clk or posedge set or posedge clr)
            if (set) q <= 1; else if (clr) q <= 0; else q <= d; endmodule"""
    result = answer(gold, gold)
    assert not result.proved
    ((where, message),) = result.unread
    assert where == "lamp"
    assert "/design/harbour.sv:2" in message


def test_a_cell_without_its_latch_is_disproved_for_its_register() -> None:
    gate = GATE.replace(icg("dim", "set"), "wire gclk_dim = clk & (set | test_en === 1'b1);")
    assert gate != GATE
    found = mismatch(answer(GOLD, gate), "dim")
    assert "clock" in found.detail
