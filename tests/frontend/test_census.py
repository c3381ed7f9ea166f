"""Real cores: how many bits their clocked blocks hold, that every part's text is where it is said to be, and speed.

Source of the figures: a count made independently of this code from slang's trees (register bits, default
parameters, +define+SYNTHESIS); picorv32's and VexRiscv's array bits agree with their register files and caches.
"""

import sysconfig
from collections.abc import Callable
from pathlib import Path

import pytest

from rewriter.frontend import read
from rewriter.model.design import Design
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Block, Case, If, Loop, Statement

LISTS = Path(__file__).parents[1] / "cores" / "lists"
pytestmark = pytest.mark.core


@pytest.fixture
def core(monkeypatch: pytest.MonkeyPatch) -> Callable[[str], Design]:
    monkeypatch.setenv("SITE", sysconfig.get_path("purelib"))
    return lambda name: read(["-f", str(LISTS / f"{name}.f")])


@pytest.mark.parametrize(
    "name,flops,arrays,blocks",
    [
        ("picorv32", 1234, 1024, 9),
        ("ibex", 2016, 0, 74),
        ("cv32e40p", 2613, 0, 60),
        ("vexriscv_full", 2287, 72192, 17),  # 75 bits more than the other count, which leaves out some unread registers
    ],
)
def test_census(core: Callable[[str], Design], name: str, flops: int, arrays: int, blocks: int) -> None:
    design = core(name)
    assert (design.flop_bits, design.array_bits) == (flops, arrays)
    assert sum(len(m.blocks) * len(m.instances) for m in design.modules) == blocks
    assert design.black_boxes == ()
    assert not [trap for m in design.modules for block in m.blocks for trap in block.traps]


@pytest.mark.parametrize(
    "name,cells",
    [
        ("picorv32", set[str]()),
        ("vexriscv_full", set[str]()),
        ("ibex", {"prim_generic_clock_gating"}),
        ("cv32e40p", {"cv32e40p_clock_gate"}),
    ],
)
def test_existing_gating_cells(core: Callable[[str], Design], name: str, cells: set[str]) -> None:
    assert {name for name, d in core(name).definitions.items() if d.cell_like} == cells


@pytest.mark.parametrize("name", ["picorv32", "picorv32_axi_wb", "vexriscv_min", "ibex", "cv32e40p", "cv32e40x"])
def test_every_part_stands_where_it_is_said_to(core: Callable[[str], Design], name: str) -> None:
    design = core(name)
    texts = design.source.by_path

    def text(span: Span) -> str:
        return texts[span.file].slice(span).decode()

    for block in (block for module in design.modules for block in module.blocks):
        assert text(block.keyword_span) == block.keyword
        for statement in block.body.walk():
            assert block.span.covers(statement.span)
            assert all(statement.span.covers(child.span) for child in statement.children())
            _check(statement, text)


def _check(statement: Statement, text: Callable[[Span], str]) -> None:
    whole = text(statement.span)
    if isinstance(statement, If):
        assert text(statement.head).endswith(")")
        assert text(statement.condition.span) in text(statement.head)
        assert statement.condition.width > 0
        assert statement.else_keyword is None or text(statement.else_keyword) == "else"
    elif isinstance(statement, Case):
        assert statement.keyword in text(statement.head)
        assert whole.endswith("endcase") and text(statement.tail) == "endcase"  # noqa: PT018 (one fact)
    elif isinstance(statement, Block):
        assert "begin" in text(statement.begin)
        assert text(statement.end).startswith("end")
    elif isinstance(statement, Loop):
        assert text(statement.head).startswith(("for", "repeat"))
    elif isinstance(statement, Assign):
        assert whole.endswith(";")
        assert all(text(target.span) in whole for target in statement.targets)
