"""The cell lemma: a bank behind the wrapper equals a bank with an enable, proved by temporal induction."""

from pathlib import Path

import pytest

from rewriter.model.cells import EXACT, FILES, WRAPPERS
from rewriter.model.design import Edge
from tests.cells.cell_texts import BAD_CELLS, LIBRARIES, invented, mapped, wrapper
from tests.support.simulators import write, yosys

EDGES = [pytest.param(edge, id=edge.value) for edge in Edge]

pytestmark = pytest.mark.engine


def lemma(folder: Path, texts: dict[str, str], edge: Edge, define: str, *, keeps_condition: bool = False) -> bool:
    """Prove the lemma of a wrapper; with `keeps_condition`, the gated bank has its enable in the body as well.

    A flop of the bank's own edge would pass, since the engine lets it change in the same step as the clock, where
    silicon gives a glitch. So the cell, below the lemma, must hold no flop.
    """
    active = "posedge" if edge is Edge.RISING else "negedge"
    body = "if (en | te) " if keeps_condition else ""
    text = f"""
    module lemma(input clk, en, te, d);
        reg plain, gated; wire gclk;
        {WRAPPERS[edge]} dut (.clk(clk), .wake(en), .test(te), .gclk(gclk));
        always @({active} clk) if (en | te) plain <= d;
        always @({active} gclk) {body}gated <= d;
        reg first = 1;
        always @($global_clock) first <= 0;
        always @* if (first) assume (plain == gated);
        always @* assert (plain == gated);
    endmodule
    """
    files = write(folder, texts | {"lemma.sv": text})
    no_flop = "select -assert-none t:$*ff* lemma %d;" if define != "ORDINARY" else ""
    ran = yosys(
        folder,
        f"read_verilog -formal -sv -D{define} {' '.join(files)}; hierarchy -check -top lemma; proc; {no_flop} flatten; "
        "clk2fflogic; opt_clean; sat -tempinduct -prove-asserts -set-assumes -maxsteps 8 -verify lemma",
    )
    said = ran.stdout + ran.stderr
    if "Assertion failed: selection is not empty: t:$*ff*" in said:
        return False
    proved, refuted = "Induction step proven: SUCCESS!" in said, "model found for base case: FAIL!" in said
    assert proved != refuted, said
    assert proved == ran.ok, said
    return proved


@pytest.mark.parametrize("edge", EDGES)
def test_behavioural_wrapper(tmp_path: Path, edge: Edge) -> None:
    assert lemma(tmp_path, wrapper("behavioural", edge), edge, EXACT)


@pytest.mark.parametrize("edge", EDGES)
def test_first_edge_is_harmless_while_the_body_keeps_its_condition(tmp_path: Path, edge: Edge) -> None:
    assert lemma(tmp_path, wrapper("behavioural", edge), edge, "ORDINARY", keeps_condition=True)


@pytest.mark.parametrize("edge", EDGES)
def test_first_edge_is_why_proofs_need_the_exact_wrapper(tmp_path: Path, edge: Edge) -> None:
    assert not lemma(tmp_path, wrapper("behavioural", edge), edge, "ORDINARY")


@pytest.mark.parametrize("edge", EDGES)
def test_discrete_wrapper(tmp_path: Path, edge: Edge) -> None:
    assert lemma(tmp_path, wrapper("discrete", edge), edge, "SYNTHESIS")


@pytest.mark.parametrize("name", LIBRARIES)
def test_mapped_wrapper_with_its_model(tmp_path: Path, name: str) -> None:
    assert lemma(tmp_path, mapped(name), Edge.RISING, "SYNTHESIS")


@pytest.mark.parametrize("edge", EDGES)
def test_map_with_both_edges(tmp_path: Path, edge: Edge) -> None:
    assert lemma(tmp_path, invented(tmp_path), edge, "SYNTHESIS")


@pytest.mark.parametrize("edge", EDGES)
def test_transparent_wrapper_needs_the_condition_in_the_body(tmp_path: Path, edge: Edge) -> None:
    texts = wrapper("transparent", edge)
    assert lemma(tmp_path, texts, edge, "SYNTHESIS", keeps_condition=True)
    assert not lemma(tmp_path, texts, edge, "SYNTHESIS")


@pytest.mark.parametrize("edge", EDGES)
@pytest.mark.parametrize("fault", BAD_CELLS)
def test_bad_cell_is_rejected(tmp_path: Path, fault: str, edge: Edge) -> None:
    assert not lemma(tmp_path, {FILES[edge]: BAD_CELLS[fault][edge]}, edge, EXACT)


@pytest.mark.parametrize("edge", EDGES)
def test_synthesis_without_a_map_stops_and_says_why(tmp_path: Path, edge: Edge) -> None:
    files = write(tmp_path, wrapper("behavioural", edge))
    ran = yosys(tmp_path, f"read_verilog {files[0]}; hierarchy -check -top {WRAPPERS[edge]}")
    assert not ran.ok
    assert "stillclock_needs_a_cell_map" in ran.stdout + ran.stderr


@pytest.mark.parametrize("name", ["behavioural", "discrete", "transparent", *LIBRARIES])
def test_the_prover_reads_a_design_with_its_wrappers_as_black_boxes(tmp_path: Path, name: str) -> None:
    """read_slang defines SYNTHESIS; STILLCLOCK_SIMULATION spares it the cell that the map names."""
    design = """
    module bank(input clk, en, test_en, d, output logic q);
        wire gclk;
        stillclock_icg u_icg (.clk(clk), .wake(en), .test(test_en), .gclk(gclk));
        always_ff @(posedge gclk) if (en) q <= d;
    endmodule
    """
    files = write(tmp_path, wrapper(name, Edge.RISING) | {"bank.sv": design})
    ran = yosys(
        tmp_path,
        f"read_slang -j 1 --top bank -D STILLCLOCK_SIMULATION --blackboxed-module stillclock_icg {' '.join(files)}; "
        "hierarchy -check -top bank; select -assert-count 1 bank/t:stillclock_icg",
    )
    assert ran.ok, ran.stdout + ran.stderr
