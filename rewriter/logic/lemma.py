"""Prove a clock-gating cell once: a register behind it does what an enabled register does."""

import re
import tempfile
from collections.abc import Mapping
from functools import lru_cache
from pathlib import Path

from rewriter.logic import engine
from rewriter.logic.engine import MOUNT
from rewriter.model.cells import EXACT, FALLING, NEEDS_MAP, PORTS, RISING

_EDGES = {RISING: "posedge", FALLING: "negedge"}

_BENCH = """module lemma(input clk, input wake, input test, input d);
  reg enabled, gated;
  wire gclk;
  {cell} u(.{p.clock}(clk), .{p.wake}(wake), .{p.test}(test), .{p.output}(gclk));
  always @({edge} clk) if (wake | test) enabled <= d;
  always @({edge} gclk) gated <= d;
  reg first = 1;
  always @($global_clock) first <= 0;
  always @* if (first) assume (enabled == gated);
  always @* assert ({goal});
endmodule
"""
_GATES = "enabled == gated"
_PASSES = "gclk == clk"

# A flip-flop at the cell's own edge would pass, since the engine lets it change in the same step as the clock, where
# silicon gives a glitch: a cell must hold none.
_SCRIPT = """read_verilog -formal -sv {defines} {files}
hierarchy -check -top lemma
proc
select -assert-none t:$*ff* lemma %d
flatten
clk2fflogic
opt_clean
sat -tempinduct -prove-asserts -set-assumes -maxsteps 8 -verify lemma"""

PROVED = "proved"
_ALWAYS = "passes every edge, which is sound while gated blocks keep their conditions"
_MISSING = re.compile(r"Module `\\?(\w+)' referenced in module .* is not part of the design")
_MODULE = re.compile(r"\bmodule\s+(\w+)")


_SECONDS = 120.0
"""Limit of each run of the engine; a cell is small."""


def prove_cells(texts: Mapping[str, str]) -> dict[str, str]:
    """Prove every wrapper that some texts define.

    Args:
        texts: text by name; wrappers, and models of what they instantiate.

    Returns:
        By wrapper module: `proved`, `proved: …` with a condition, `not proved: …`, or `not checked: …`.
    """
    ordered = tuple(text for _, text in sorted(texts.items()))
    found = {name for text in ordered for name in _MODULE.findall(text)}
    return {cell: _prove(cell, ordered) for cell in _EDGES if cell in found}


@lru_cache(maxsize=64)
def _prove(cell: str, texts: tuple[str, ...]) -> str:
    """Prove a wrapper as simulation sees it, and as synthesis does where what it instantiates is at hand."""
    simulated = _run(cell, texts, (EXACT,), _GATES)
    if simulated:
        passes = not _run(cell, texts, (EXACT,), _PASSES)
        return f"{PROVED}: {_ALWAYS}" if passes else f"not proved: {simulated}"
    synthesised = _run(cell, texts, (EXACT, "SYNTHESIS"), _GATES) if any("SYNTHESIS" in t for t in texts) else ""
    if not synthesised:
        return PROVED
    missing = _MISSING.search(synthesised)
    if not missing:
        return f"not proved: as synthesised, {synthesised}"
    why = "synthesis needs a cell map" if missing[1] == NEEDS_MAP else f"there is no model of {missing[1]} to check"
    return f"{PROVED}: the simulation model; {why}"


def _run(cell: str, texts: tuple[str, ...], defines: tuple[str, ...], goal: str) -> str:
    """Run one proof; gives nothing when it holds, else why not."""
    with tempfile.TemporaryDirectory(prefix="stillclock-") as name:
        folder = Path(name)
        bench = _BENCH.format(cell=cell, edge=_EDGES[cell], goal=goal, p=PORTS)
        files: list[str] = []
        for number, text in enumerate((*texts, bench)):
            (folder / f"{number}.sv").write_text(text, encoding="utf-8")
            files.append(f"{MOUNT}/{number}.sv")
        script = _SCRIPT.format(defines=" ".join(f"-D{d}" for d in defines), files=" ".join(files))
        ran = engine.run(script, folder, _SECONDS)
    if ran.ok:
        return ""
    errors = [line.split("ERROR: ", 1)[1] for line in ran.messages.splitlines() if "ERROR: " in line]
    text = errors[0] if errors else "the engine failed"
    if "selection is not empty" in text:
        return "the cell holds a flip-flop"
    return "a register behind the cell does not do what an enabled register does" if "proof did fail" in text else text
