"""Random register blocks, written as an engineer might; every one is legal, and most hold something."""

from dataclasses import dataclass, field
from random import Random

# One-bit conditions, wide ones whose width matters, and some that read the registers themselves.
CONDITIONS = (
    "c0", "c1", "!c2", "c0 && c1", "c1 || !c2", "c0 & ~c2", "m == 2'd2", "m != n", "n", "m + n", "~m", "m & n", "|d",
    "^d[3:0]", "d > 8'd100", "c0 ? c1 : c2", "r0 != 0", "r0 > r1", "d[m]", "{c0, c1} == n", "r1[0]", "!m", "d - 8'd1",
)  # fmt: skip
VALUES = (
    "d", "~d", "r0 + 1", "r1 - 1", "{r0[0], r1[3:1]}", "d ^ r0", "8'h5a", "0", "r2", "c0 ? d : r1", "{d[3:0], d[7:4]}",
    "d >> 1", "r0 * 3", "m", "{4{c1}}",
)  # fmt: skip
CASES = (
    ("case", "m", ("2'd0", "2'd1", "2'd2", "2'd3", "2'd1, 2'd2")),
    ("case", "m + n", ("0", "3'd2", "3'd4", "1")),
    ("case", "1'b1", ("c0", "c1", "m[0]", "c2")),
    ("case", "n", ("m", "2'd1", "2'd3")),
    ("casez", "d[3:0]", ("4'b1???", "4'b?1??", "4'b??1?", "4'b0??1")),
    ("casex", "{c0, m}", ("3'b1xx", "3'bx01", "3'b0x1")),
)
WIDTHS = {"r0": 4, "r1": 6, "r2": 8, "r3": 5}
HEADER = "clk, rst, c0, c1, c2, m, n, d, r0, r1, r2, r3"


@dataclass(frozen=True)
class Module:
    """One module."""

    name: str
    text: str


@dataclass
class _Writer:
    """Write the statements of one block."""

    dice: Random
    system: bool
    registers: tuple[str, ...]
    temporary: bool
    lines: list[str] = field(default_factory=list[str])

    def pick(self, *choices: str) -> str:
        return self.dice.choice(choices)

    def target(self) -> str:
        name = self.dice.choice(self.registers)
        high = WIDTHS[name] - 1
        return self.pick(name, name, name, f"{name}[{high}:2]", f"{name}[1:0]", f"{name}[{high}]")

    def condition(self) -> str:
        return self.pick(*CONDITIONS, *(("t > 5", "t[0]") if self.temporary else ()))

    def value(self) -> str:
        return self.pick(*VALUES, *(("t",) if self.temporary else ()))

    def line(self, depth: int, text: str) -> None:
        self.lines.append("    " * (depth + 2) + text)

    def statements(self, depth: int) -> None:
        for _ in range(self.dice.randint(1, 2 if depth else 3)):
            self.statement(depth)

    def statement(self, depth: int) -> None:
        kinds = [self.write, self.write, self.hold, self.choice]
        if depth < 4:
            kinds += [self.alone, self.alone, self.chain, self.case, self.case, self.loop]
        self.dice.choice(kinds)(depth)

    def write(self, depth: int) -> None:
        self.line(depth, f"{self.target()} <= {self.value()};")

    def hold(self, depth: int) -> None:
        target = self.target()
        self.line(depth, f"{target} <= {target};")

    def choice(self, depth: int) -> None:
        target = self.target()
        sides = [self.value(), target]
        if self.dice.random() < 0.5:
            sides.reverse()
        self.line(depth, f"{target} <= ({self.condition()}) ? {sides[0]} : {sides[1]};")

    def alone(self, depth: int) -> None:
        self.branch(depth, f"if ({self.condition()})")

    def chain(self, depth: int) -> None:
        self.alone(depth)
        if self.dice.random() < 0.5:
            self.branch(depth, f"else if ({self.condition()})")
        if self.dice.random() < 0.5:
            self.branch(depth, "else")

    def branch(self, depth: int, head: str) -> None:
        self.line(depth, f"{head} begin")
        self.statements(depth + 1)
        self.line(depth, "end")

    def case(self, depth: int) -> None:
        keyword, selector, labels = self.dice.choice(CASES)
        self.line(depth, f"{keyword} ({selector})")
        for label in self.dice.sample(labels, self.dice.randint(1, 3)):
            self.arm(depth, f"{label}:")
        if self.dice.random() < 0.5:
            self.arm(depth, "default:")
        self.line(depth, "endcase")

    def arm(self, depth: int, head: str) -> None:
        if self.dice.randint(0, 2):
            self.line(depth + 1, f"{head} begin")
            self.statements(depth + 2)
            self.line(depth + 1, "end")
        else:
            self.line(depth + 1, f"{head} ;")

    def loop(self, depth: int) -> None:
        """Write bits one by one, under a condition of their own."""
        name = self.dice.choice(self.registers)
        head = f"for ({'int i' if self.system else 'i'} = 0; i < 4; i = i + 1)"
        condition = self.pick("d[i]", "d[i] && c0", "i < 2", "i == m")
        self.line(depth, f"{head} if ({condition}) {name}[i] <= d[i + {self.pick('0', '1')}];")


def module(name: str, dice: Random) -> Module:
    """Draw one module of one or two blocks."""
    system = dice.random() < 0.5
    registers = dice.sample(sorted(WIDTHS), 4)
    cut = dice.randint(1, 4)
    parts = [tuple(part) for part in (registers[:cut], registers[cut:]) if part]
    blocks = [_block(dice, part, system=system, number=number) for number, part in enumerate(parts)]
    return Module(name, _module(name, blocks, system=system))


def _module(name: str, blocks: list[str], *, system: bool) -> str:
    outputs = [
        f"output {'logic' if system else 'reg'} [{width - 1}:0] {register}" for register, width in WIDTHS.items()
    ]
    inputs = ["input clk, rst, c0, c1, c2", "input [1:0] m, n", "input [7:0] d"]
    if system:
        head = [f"module {name} (", ",\n".join(f"    {port}" for port in [*inputs, *outputs]), ");"]
    else:
        head = [f"module {name} ({HEADER});", *(f"    {port};" for port in [*inputs, *outputs]), "    integer i;"]
    return "\n".join([*head, *blocks, "endmodule", ""])


def _block(dice: Random, registers: tuple[str, ...], *, system: bool, number: int) -> str:
    """Draw a block with a reset of one of four kinds, and perhaps a temporary."""
    writer = _Writer(dice, system, registers, temporary=dice.randint(0, 3) == 0)
    reset = dice.choice(("none", "sync", "async", "last"))
    edge = dice.choice(("posedge", "posedge", "posedge", "negedge"))
    event = f"{edge} clk or posedge rst" if reset == "async" else f"{edge} clk"
    label = f" : block_{number}" if writer.temporary else ""
    lines = [f"    {'always_ff' if system else 'always'} @({event}) begin{label}"]
    if writer.temporary:
        lines.append(f"        {'logic' if system else 'reg'} [3:0] t;")
    clears = [f"{name} <= {dice.randrange(2 ** WIDTHS[name])};" for name in registers]
    start = writer.pick("m + n", "d[3:0]", "{n, m}", "d[7:4] - r0")
    depth = 1 if reset in ("sync", "async") else 0
    if writer.temporary:
        writer.line(depth, f"t = {start};")
        if dice.random() < 0.5:
            writer.line(depth, f"if ({writer.pick('c0', 'm[1]')}) t = t + 1;")
    writer.statements(depth)
    for name in registers:
        if not any(line.lstrip().startswith(name) for line in writer.lines):
            writer.line(depth, f"if ({writer.condition()}) {name} <= {writer.value()};")
    body = writer.lines
    if reset in ("sync", "async"):
        lines += ["        if (rst) begin", *(f"            {clear}" for clear in clears), "        end else begin"]
        lines += [*body, "        end"]
    else:
        lines += body
    if reset == "last":
        lines += ["        if (rst) begin", *(f"            {clear}" for clear in clears), "        end"]
    return "\n".join([*lines, "    end"])


def top(found: list[Module]) -> str:
    """Write a top module over all of them; each has outputs of its own, the inputs are shared."""
    ports = ["input clk, rst, c0, c1, c2", "input [1:0] m, n", "input [7:0] d"]
    lines: list[str] = []
    for module in found:
        ports += [f"output [{width - 1}:0] {module.name}_{register}" for register, width in WIDTHS.items()]
        outputs = ", ".join(f".{register}({module.name}_{register})" for register in WIDTHS)
        inputs = ", ".join(f".{name}({name})" for name in ("clk", "rst", "c0", "c1", "c2", "m", "n", "d"))
        lines.append(f"    {module.name} u_{module.name} ({inputs}, {outputs});")
    return "\n".join(
        ["module random_top (", ",\n".join(f"    {port}" for port in ports), ");", *lines, "endmodule", ""]
    )
