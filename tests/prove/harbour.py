"""Small designs around a harbour light, given as text, and what the prover says about them."""

from dataclasses import replace

from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.model.evidence import CellEvidence, Limits, Mismatch, ProofJob, ProofResult
from rewriter.model.source import RtlSource, SourceText
from rewriter.prove import prove

CELLS = render_cells(load_cell_map("behavioural"), None)
FILE = "/design/harbour.sv"


def source(text: str, *defines: str) -> RtlSource:
    """Make a design of one file."""
    return RtlSource((FILE,), defines=defines, texts=(SourceText(FILE, text.encode()),))


def with_cells(text: str, *defines: str) -> RtlSource:
    """Make a design of one file and the cells."""
    cells = tuple(SourceText(f"/design/{name}", cell.encode()) for name, cell in CELLS.items())
    return source(text, *defines).with_texts({}, cells)


def job(gold: str | None, gate: str, top: str = "lamp") -> ProofJob:
    """Make a job; the override is `test_en` when the text has one."""
    port = "test_en" if "test_en" in gate else None
    return ProofJob(source(gold) if gold is not None else None, with_cells(gate), top, CELLS, port)


def answer(gold: str | None, gate: str, top: str = "lamp", **changes: object) -> ProofResult:
    """Prove a rewrite; `changes` are fields of the job."""
    return prove(replace(job(gold, gate, top), **changes))  # pyright: ignore[reportArgumentType]


def cell(result: ProofResult, name: str) -> CellEvidence:
    """Give the evidence of the one cell of that name."""
    (found,) = [c for c in result.cells if c.cell == name]
    return found


def mismatch(result: ProofResult, what: str) -> Mismatch:
    """Give the one mismatch of that name."""
    (found,) = [m for m in result.mismatches if m.what == what]
    return found


NO_TIME = Limits(query_seconds=0.0)
