"""The cell lemma as the prover runs it; tests/cells proves the shipped texts one by one."""

import pytest

from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.logic.lemma import prove_cells
from tests.cells.cell_texts import BAD_CELLS, mapped

pytestmark = pytest.mark.engine


def shipped(name: str) -> dict[str, str]:
    return prove_cells(render_cells(load_cell_map(name), None))


def test_wrappers_of_each_kind() -> None:
    assert shipped("discrete") == {"stillclock_icg": "proved", "stillclock_icg_n": "proved"}
    assert all("synthesis needs a cell map" in said for said in shipped("behavioural").values())
    assert all("passes every edge" in said for said in shipped("transparent").values())


def test_library_cell_with_and_without_its_model() -> None:
    assert prove_cells(mapped("sky130hd")) == {"stillclock_icg": "proved"}
    said = shipped("sky130hd")["stillclock_icg"]
    assert said.startswith("proved: the simulation model; there is no model of sky130_fd_sc_hd__")


# A cell that never stops is sound, as the transparent map is.
@pytest.mark.parametrize("name", [name for name in BAD_CELLS if name != "never stops"])
def test_bad_cells_are_not_proved(name: str) -> None:
    bad = BAD_CELLS[name]
    text = bad if isinstance(bad, str) else next(iter(bad.values()))
    assert [said for said in prove_cells({"bad.v": text}).values() if not said.startswith("not proved")] == []
