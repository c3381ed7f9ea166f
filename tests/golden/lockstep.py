"""Run original and rewritten RTL beside each other in Icarus, with the same stimulus, and compare what they print.

It knows nothing of the prover: each side is compiled on its own with one bench that drives every case in several
styles, and prints the outputs around every clock edge. Equal traces are equal values, x and z included.

Clocks are inputs named clk…, resets inputs with `rst` in their name, active low when they end in _n. Common practice,
no source: the styles of reset and of the test pin are those that testbenches use.
"""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from tests.golden.ports import Port, Top

CYCLES = 160

# reset: 0 active from time 0 without an edge, 1 inactive at first, then pulsed, 2 random pulses with the clock,
#        3 never, 4 random pulses between the edges
# test:  0, 1, random, z
# dirty: inputs carry x now and then
STYLES = (
    {"RESET": 0, "TEST": 0, "DIRTY": 0},
    {"RESET": 1, "TEST": 3, "DIRTY": 0},
    {"RESET": 2, "TEST": 2, "DIRTY": 0},
    {"RESET": 3, "TEST": 0, "DIRTY": 1},
    {"RESET": 4, "TEST": 0, "DIRTY": 1},
    {"RESET": 2, "TEST": 1, "DIRTY": 1},
)


@dataclass(frozen=True)
class Device:
    """A top module under test: a name for messages, its ports in the original, and the test pin of the rewrite."""

    name: str
    top: Top
    test: str | None


def is_clock(port: Port) -> bool:
    return port.name.startswith("clk")


def is_reset(port: Port) -> bool:
    return "rst" in port.name and port.width == 1


def bench(devices: Sequence[Device], *, gate: bool) -> str:
    """Write the bench of one side; both sides get the same stimulus."""
    parts = [_harness(number, device, gate=gate) for number, device in enumerate(devices)]
    runs = [
        f"    drive_{number} #(.STYLE({style}), .SEED({_seed(number, style)}), "
        + ", ".join(f".{key}({value})" for key, value in STYLES[style].items())
        + f") run_{number}_{style} ();"
        for number in range(len(devices))
        for style in range(len(STYLES))
    ]
    return "\n".join(
        ["`timescale 1ns/1ps", *parts, "module bench;", *runs, f"    initial #{CYCLES * 10} $finish;", "endmodule", ""]
    )


def _seed(number: int, style: int) -> str:
    return f"32'd{1 + (number * 7919 + style * 104729) * 2654435 % 4294967295}"


def _harness(number: int, device: Device, *, gate: bool) -> str:
    clocks = [port for port in device.top.of("in") if is_clock(port)]
    resets = [port for port in device.top.of("in") if is_reset(port)]
    data = [port for port in device.top.of("in") if not is_clock(port) and not is_reset(port)]
    outputs = device.top.of("out")
    connections = [f".{_name(port)}({_local(port)})" for port in device.top.ports]
    if gate and device.test:
        connections.append(f".{device.test}(test_pin)")
    lines = [
        f"module drive_{number};",
        "    parameter STYLE = 0, SEED = 1, RESET = 0, TEST = 0, DIRTY = 0;",
        *(_declaration(port) for port in device.top.ports),
        "    reg test_pin;",
        "    reg [31:0] dice;",
        "    integer cycle;",
        f"    {_escaped(device.top.name)} dut ({', '.join(connections)});",
        "    function [31:0] roll(input [31:0] now);",
        "        begin",
        "            roll = now ^ (now << 13);",
        "            roll = roll ^ (roll >> 17);",
        "            roll = roll ^ (roll << 5);",
        "        end",
        "    endfunction",
        "    task next; dice = roll(dice); endtask",
        *_clocks(clocks),
        "    initial begin",
        "        dice = SEED; cycle = 0; test_pin = TEST == 1 ? 1'b1 : TEST == 3 ? 1'bz : 1'b0;",
        *(f"        {_local(port)} = RESET == 0 ? {_on(port)} : {_off(port)};" for port in resets),
        "    end",
        f"    always @(posedge {_beat(clocks)}) begin",
        "        cycle = cycle + 1;",
        "        next; if (TEST == 2) test_pin <= dice[7];",
        *_resets(resets),
        *_inputs(data),
        "    end",
        *_early_resets(resets),
        *_trace(device, outputs, clocks),
        "endmodule",
    ]
    return "\n".join(lines)


def _declaration(port: Port) -> str:
    """Declare what a port connects to; a clock is low from the start, for x to 0 would be a falling edge."""
    kind = "reg" if port.direction == "in" else "wire"
    start = " = 0" if port.direction == "in" and is_clock(port) else ""
    return f"    {kind} [{port.width - 1}:0] {_local(port)}{start};"


def _clocks(clocks: list[Port]) -> Iterable[str]:
    """Toggle every clock bit at its own pace, the first with a period of 10 ns."""
    names = [f"{_local(port)}[{bit}]" for port in clocks for bit in range(port.width)]
    for place, name in enumerate(names):
        half = 5 if place == 0 else 7 + 2 * place
        yield f"    initial forever #{half} {name} = ~{name};"


def _beat(clocks: list[Port]) -> str:
    return f"{_local(clocks[0])}[0]" if clocks else "cycle"


def _resets(resets: list[Port]) -> Iterable[str]:
    for port in resets:
        yield (
            f"        next; case (RESET) 0: if (cycle == 3) {_local(port)} <= {_off(port)};"
            f" 1: {_local(port)} <= cycle == 2 || cycle == 90 ? {_on(port)} : {_off(port)};"
            f" 2: {_local(port)} <= cycle == 1 || dice[9:5] == 0 ? {_on(port)} : {_off(port)}; default: ; endcase"
        )


def _early_resets(resets: list[Port]) -> Iterable[str]:
    """Pulse resets between the edges (which stand at whole nanoseconds), in the low and in the high phase."""
    for place, port in enumerate(resets):
        on, off = f"{_local(port)} = {_on(port)};", f"{_local(port)} = {_off(port)};"
        again = f"forever begin #{113 + 30 * place} {on} #{1 + 7 * place} {off} end"
        yield f"    initial if (RESET == 4) begin #{2 + place}.5 {on} #1 {off} {again} end"


def _inputs(data: list[Port]) -> Iterable[str]:
    """Drive inputs as clocked logic does; long quiet and busy spells, small values and wide ones in turn."""
    for port in data:
        words = -(-port.width // 32)
        yield "        next; if (cycle < 2 || !cycle[4] || dice[3:0] == 0) begin"
        for word in range(words):
            high = min(port.width, 32 * word + 32) - 1
            mask = " & {32{dice[20]}} & {dice[15:0], dice[31:16]}" if port.width > 1 else ""
            yield f"            next; {_local(port)}[{high}:{32 * word}] <= cycle[5] ? dice[31:0]{mask} : dice >> 3;"
        yield f"            if (DIRTY && dice[12:10] == 0) {_local(port)}[dice[31:8] % {port.width}] <= 1'bx;"
        yield "        end"


def _trace(device: Device, outputs: list[Port], clocks: list[Port]) -> Iterable[str]:
    if not outputs or not clocks:
        return
    values = ", ".join(_local(port) for port in outputs)
    yield (f'    always @({_beat(clocks)}) #4 $display("# {device.name} %0d %0d %b", STYLE, $time, {{{values}}});')


def _on(port: Port) -> str:
    return "1'b0" if port.name.endswith("_n") else "1'b1"


def _off(port: Port) -> str:
    return "1'b1" if port.name.endswith("_n") else "1'b0"


def _local(port: Port) -> str:
    """Name the bench's own signal, plain even where the port is escaped."""
    return "p_" + "".join(c if c.isalnum() else "_" for c in port.name)


def _name(port: Port) -> str:
    return _escaped(port.name)


def _escaped(name: str) -> str:
    return name if name.replace("_", "a").isalnum() else f"\\{name} "


def differences(gold: str, gate: str) -> dict[str, str]:
    """Give the first differing line per device."""
    before, after = ([line for line in side.splitlines() if line.startswith("#")] for side in (gold, gate))
    found: dict[str, str] = {}
    if len(before) != len(after):
        found["bench"] = f"{len(before)} lines of the original, {len(after)} of the rewrite"
    for left, right in zip(sorted(before), sorted(after), strict=False):
        if left != right:
            found.setdefault(left.split(" ")[1], f"original {left} | rewritten {right}")
    return found
