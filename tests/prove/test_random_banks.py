"""The prover's verdicts on random banks, against every state and input tried in Icarus Verilog (outside source)."""

import random
from pathlib import Path

import pytest

from rewriter.model.reasons import EvidenceKind
from tests.prove.harbour import answer
from tests.support.simulators import icarus, write

pytestmark = [pytest.mark.engine, pytest.mark.simulator]

BANKS = 60
STATE, INPUT = 3, 4  # bits of the bank and of its inputs


class Maker:
    """Writes random clocked bodies and wake conditions over `q` and `i`."""

    def __init__(self, seed: int) -> None:
        self.source = random.Random(seed)  # noqa: S311 (stimulus, no secrets)

    def term(self) -> str:
        name, width = self.source.choice((("q", STATE), ("i", INPUT), ("i", INPUT)))
        return f"{self.source.choice(('', '!'))}{name}[{self.source.randrange(width)}]"

    def condition(self) -> str:
        terms = [self.term() for _ in range(self.source.randint(1, 3))]
        return "".join(f"{t} {self.source.choice(('&&', '||'))} " for t in terms[1:]) + terms[0]

    def value(self) -> str:
        return self.source.choice(("i[2:0]", "q + 3'd1", "~q", "q ^ i[3:1]", "3'd5", "{q[0], i[1:0]}"))

    def statement(self, depth: int) -> tuple[str, str]:
        """Give a statement, and the condition under which it writes."""
        kind = self.source.randrange(6) if depth else 0
        if kind <= 1:
            bit = self.source.randrange(STATE)
            whole = f"q <= {self.value()};"
            return (whole, "1'b1") if kind else (f"q[{bit}] <= {self.term()};", "1'b1")
        if kind == 5:
            arms = [self.statement(depth - 1) for _ in range(2)]
            text = f"case (i[1:0]) 2'd0: {arms[0][0]} 2'd2: {arms[1][0]} default: ; endcase"
            return text, f"(i[1:0] == 0 && ({arms[0][1]}) || i[1:0] == 2 && ({arms[1][1]}))"
        one, when_one = self.statement(depth - 1)
        condition = self.condition()
        if kind == 2:
            return f"if ({condition}) begin {one} end", f"(({condition}) && ({when_one}))"
        two, when_two = self.statement(depth - 1)
        return (
            f"if ({condition}) begin {one} end else begin {two} end",
            f"(({condition}) ? ({when_one}) : ({when_two}))",
        )

    def bank(self) -> tuple[str, str]:
        """Give a body and a wake condition, right or (mostly) nearly right."""
        body, wake = self.statement(3)
        spoil = self.source.randrange(4)
        if spoil == 0:
            wake = f"({wake}) && {self.term()}"
        elif spoil == 1:
            wake = f"({wake}) || {self.term()}"
        elif spoil == 2:
            wake = self.condition()
        # Every bit is written somewhere: a bit that is not has the value x, and may be anything.
        return f"if (&i) q <= 3'd0; {body}", f"(&i) || {wake}"


def module(number: int, body: str, wake: str, *, gated: bool) -> str:
    cell = f"stillclock_icg u_icg (.clk(clk), .wake({wake}), .test(test_en), .gclk(g));" if gated else "assign g = clk;"
    port = ", input wire test_en" if gated else ""
    return f"""module bank{number} (input wire clk, input wire [{INPUT - 1}:0] i, output reg [{STATE - 1}:0] q{port});
    wire g; wire wake = {wake}; {cell}
    always @(posedge g) begin {body} end
endmodule
"""


def top(*, gated: bool) -> str:
    port, pin = (", input wire test_en", ", .test_en(test_en)") if gated else ("", "")
    instances = "\n".join(f"bank{n} b{n} (.clk(clk), .i(i), .q(q[{n * STATE} +: {STATE}]){pin});" for n in range(BANKS))
    return f"""module lamp (input wire clk, input wire [{INPUT - 1}:0] i, output wire [{BANKS * STATE - 1}:0] q{port});
{instances}
endmodule
"""


def bench() -> str:
    """Put every bank into every state, with every input, and print those that change though they do not wake."""
    duts = "\n".join(f"bank{n} b{n} (.clk(clk), .i(i), .q());" for n in range(BANKS))
    deposits = " ".join(f"b{n}.q = s;" for n in range(BANKS))
    checks = "\n".join(f'if (!w[{n}] && b{n}.q !== s) $display("changed {n}");' for n in range(BANKS))
    wakes = " ".join(f"w[{n}] = b{n}.wake;" for n in range(BANKS))
    return f"""module bench; reg clk; reg [{INPUT - 1}:0] i; reg [{STATE - 1}:0] s; reg [{BANKS - 1}:0] w; integer n;
    {duts}
    initial for (n = 0; n < {1 << (STATE + INPUT)}; n = n + 1) begin
        clk = 0; #1; {{s, i}} = n; {deposits} #1; {wakes} clk = 1; #1;
        {checks}
    end
endmodule
"""


@pytest.mark.parametrize("seed", [11, 12, 13])
def test_verdicts_agree_with_exhaustive_simulation(tmp_path: Path, seed: int) -> None:
    maker = Maker(seed)
    banks = [maker.bank() for _ in range(BANKS)]
    gold = "".join(module(n, *bank, gated=False) for n, bank in enumerate(banks)) + top(gated=False)
    gate = "".join(module(n, *bank, gated=True) for n, bank in enumerate(banks)) + top(gated=True)
    printed = icarus(tmp_path, write(tmp_path, {"gold.v": gold, "bench.v": bench()}))
    changed = {int(line.split()[1]) for line in printed.splitlines() if line.startswith("changed")}
    result = answer(gold, gate)
    disproved = {int(c.definition.removeprefix("bank")) for c in result.cells if c.kind is EvidenceKind.DISPROVED}
    proved = {int(c.definition.removeprefix("bank")) for c in result.cells if c.kind is EvidenceKind.PROVED}
    assert disproved | proved == set(range(BANKS))
    assert disproved == changed
    assert len(changed) > BANKS // 10 < len(proved)  # both kinds occur
    assert not result.mismatches
