"""The bit-level meaning of the engine's cells, against Icarus Verilog (an outside simulator of IEEE 1800)."""

import random
from pathlib import Path

import pytest

from rewriter.logic.aig import Aig
from rewriter.logic.cone import Cone
from rewriter.logic.elaborate import elaborate
from rewriter.model.source import RtlSource, SourceText
from tests.support.simulators import icarus, write

pytestmark = [pytest.mark.engine, pytest.mark.simulator]

INPUTS = {"a": 5, "b": 4, "s": 5, "t": 3, "w": 13, "k": 1}
SIGNED = {"s", "t"}
# u and v are x in some bits when k is 1.
HEAD = """
    wire [4:0] u = k ? {a[4:3], 1'bx, a[1:0]} : a;
    wire signed [2:0] v = k ? {t[2], 2'bx1} : t;
"""
BINARY = ("+", "-", "*", "/", "%", "&", "|", "^", "~^", "<<", ">>", "<<<", ">>>", "<", "<=", ">", ">=", "==", "!=",
          "&&", "||", "===", "!==")  # fmt: skip
UNARY = ("-", "~", "!", "&", "|", "^", "~&", "~|", "~^")
PAIRS = (("a", "b"), ("s", "t"), ("b", "a"), ("t", "s"), ("a", "t"), ("w", "b"), ("u", "b"), ("b", "u"), ("v", "s"))
MORE = (
    "w[b]", "w[t +: 2]", "w[b -: 3]", "w[s]", "u[t]", "{2{a}} ^ w", "k ? a : b", "b[0] ? u : a", "u[2] ? a : a",
    "u[2] ? a : b", "2 ** b", "$signed(a) >>> b", "$signed(u) >>> 1", "a[4] ? (b[0] ? s : t) : v",
)  # fmt: skip


def expressions() -> list[str]:
    # A product with x is left out: the engine knows that its top bits are 0 whatever x is, Icarus does not.
    found = [f"{x} {op} {y}" for op in BINARY for x, y in PAIRS if op != "*" or not {x, y} & {"u", "v"}]
    found += [f"{op}{x}" for op in UNARY for x in ("a", "s", "u", "v")]
    return [*found, *MORE]


def design(found: list[str]) -> str:
    ports = ", ".join(
        f"input wire {'signed ' if name in SIGNED else ''}[{width - 1}:0] {name}" for name, width in INPUTS.items()
    )
    body = "\n".join(f"    assign y{i} = {text};" for i, text in enumerate(found))
    outputs = ", ".join(f"output wire [9:0] y{i}" for i in range(len(found)))
    return f"module words ({ports}, {outputs});{HEAD}{body}\nendmodule\n"


def bench(found: list[str], vectors: list[dict[str, int]]) -> str:
    declared = "\n".join(f"reg [{width - 1}:0] {name};" for name, width in INPUTS.items())
    wires = "\n".join(f"wire [9:0] y{i};" for i in range(len(found)))
    names = ", ".join(f".{n}({n})" for n in [*INPUTS, *(f"y{i}" for i in range(len(found)))])
    shows = " ".join(f'$display("%b", y{i});' for i in range(len(found)))
    steps = "\n".join(
        " ".join(f"{name} = {value};" for name, value in vector.items()) + f" #1; {shows}" for vector in vectors
    )
    return f"module bench; {declared}\n{wires}\nwords dut({names});\ninitial begin\n{steps}\nend\nendmodule\n"


def test_cells_mean_what_icarus_computes(tmp_path: Path) -> None:
    source = random.Random(7)  # noqa: S311 (stimulus, no secrets)
    found = expressions()
    vectors = [{name: source.getrandbits(width) for name, width in INPUTS.items()} for _ in range(60)]
    vectors += [dict.fromkeys(INPUTS, 0), {name: (1 << width) - 1 for name, width in INPUTS.items()}]
    text = design(found)
    rows = icarus(tmp_path, write(tmp_path, {"words.sv": text, "bench.sv": bench(found, vectors)})).split()
    done = elaborate(
        {"gold": RtlSource(("/w/words.sv",), texts=(SourceText("/w/words.sv", text.encode()),))}, "words", 60
    )
    assert done.sides, done.message
    module = done.sides[0].modules["words"]
    aig = Aig()
    values: dict[int, tuple[str, int]] = {}

    def leaf(net: int, cone: Cone) -> tuple[int, int]:
        del cone
        lit = aig.variable()
        name = next(n for n in module.names[net] if n.variable in INPUTS)
        values[lit >> 1] = (name.variable, name.place)
        return lit, 0

    cone = Cone(aig, module, leaf, {})
    words = [cone.word(module.ports[f"y{i}"].bits) for i in range(len(found))]
    wrong: list[str] = []
    for number, vector in enumerate(vectors):
        state = {node: vector[name] >> place & 1 for node, (name, place) in values.items()}
        for i, expression in enumerate(found):
            value = aig.simulate(words[i].value, state)
            unknown = aig.simulate(words[i].unknown, state)
            ours = "".join("x" if u else str(v) for v, u in zip(value, unknown, strict=True))[::-1]
            theirs = rows[number * len(found) + i].replace("z", "x")
            exact = not set("uv") & set(expression)
            agree = ours == theirs if exact else all(o in ("x", t) for o, t in zip(ours, theirs, strict=True))
            if not agree:
                wrong.append(f"{expression} at {vector}: {ours}, Icarus {theirs}")
    assert not wrong, "\n".join(wrong[:20])
