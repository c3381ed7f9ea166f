"""Modules without source: their ports are told by what is connected to them."""

from tests.frontend.conftest import Reader

RTL = """module top(input clk, en, input [7:0] d, output [7:0] q, output reg [7:0] r);
  wire [7:0] mid; wire busy;
  macro_x #(.W(8)) u0 (.clk(clk), .d(d & {8{en}}), .q(mid), .busy(busy), .\\odd+name (q[3:0]), .nc());
  macro_y u1 (clk, mid[3:0], q[7:4]);
  always @(posedge clk) if (busy) r <= mid;
endmodule"""


def test_what_nothing_else_drives_is_an_output(sample: Reader) -> None:
    x, _ = sample(RTL).design.black_boxes
    assert {p.name: (p.width, p.is_output) for p in x.ports} == {
        "clk": (1, False), "d": (8, False), "q": (8, True), "busy": (1, True), "odd+name": (4, True), "nc": (1, False),
    }  # fmt: skip
    assert x.parameters == ("W",)


def test_ordered_ports_keep_their_places(sample: Reader) -> None:
    _, y = sample(RTL).design.black_boxes
    assert [(p.name, p.width) for p in y.ports] == [("port0", 1), ("port1", 4), ("port2", 4)]
    assert y.ports[2].is_output


def test_a_stub_is_a_module_of_these_ports(sample: Reader) -> None:
    design = sample(RTL).design
    again = sample(f"{RTL}\n{design.stubs}")
    assert again.design.black_boxes == ()
