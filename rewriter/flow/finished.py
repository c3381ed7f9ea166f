"""Prove RTL that is already written."""

from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from rewriter import frontend
from rewriter.analysis import temporaries
from rewriter.flow.job import Progress
from rewriter.flow.parts import prove_parts
from rewriter.model.cells import WRAPPERS
from rewriter.model.design import Design, Note
from rewriter.model.errors import UserError
from rewriter.model.evidence import Limits, ProofJob, ProofResult
from rewriter.prove import prove
from rewriter.report.output import ORIGINAL_LIST, RTL_LIST, read_report


@dataclass(frozen=True)
class Proved:
    """The answer, and what was noticed on the way."""

    top: str
    result: ProofResult
    warnings: tuple[Note, ...]


def prove_folder(place: Path, limits: Limits, progress: Progress) -> Proved:
    """Prove the RTL of an output folder against the original; the report gives names and digests only.

    Raises:
        UserError: the folder is none of ours, or its RTL does not compile.
    """
    report = read_report(place)
    progress("reading the original and the rewritten RTL")
    gold = frontend.read(("-F", str(place / ORIGINAL_LIST)))
    gate = frontend.read(("-F", str(place / RTL_LIST)))
    pins: list[Mapping[str, Any]] = report.get("test_pins", [])
    job = ProofJob(
        gold=gold.source,
        gate=gate.source,
        top=gold.top,
        cell_texts=_cell_texts(gate),
        test_port=report.get("test_ports", {}).get(gold.top),
        test_active_low=any(pin["module"] == gold.top and pin["active_low"] for pin in pins),
        limits=limits,
        stubs=gold.stubs,
        temporaries=temporaries.all_of(gold),
    )
    result = prove(job, progress)
    if result.unread and not result.cells:
        ports: Mapping[str, str] = report.get("test_ports", {})
        result = prove_parts(gold, ports, job, result, lambda part: prove(part, progress))
    return Proved(gold.top, result, (*gate.warnings, *_changed(gold, report)))


def prove_rtl(arguments: tuple[str, ...], limits: Limits, progress: Progress) -> Proved:
    """Prove RTL that holds our cells against itself with the cells transparent.

    Raises:
        UserError: it does not compile, or holds no cell of ours.
    """
    progress("reading the RTL")
    design = frontend.read(arguments)
    cells = _cell_texts(design)
    if not cells:
        names = " or ".join(WRAPPERS.values())
        raise UserError(f"the RTL holds no gating cell ({names})", help="give rewritten RTL, its cells included")
    job = ProofJob(
        None,
        design.source,
        design.top,
        cells,
        test_port=None,
        limits=limits,
        stubs=design.stubs,
        temporaries=temporaries.all_of(design),
    )
    return Proved(design.top, prove(job, progress), design.warnings)


def _cell_texts(design: Design) -> dict[str, str]:
    """Give the files in which the wrappers of the design stand."""
    spans = [design.definitions[name].span for name in WRAPPERS.values() if name in design.definitions]
    texts = {span.file: design.source.by_path[span.file].data for span in spans}
    return {Path(file).name: data.decode("utf-8", "replace") for file, data in texts.items()}


def _changed(gold: Design, report: Mapping[str, Any]) -> tuple[Note, ...]:
    """Warn of sources that are not those which were rewritten."""
    digests = {entry["file"]: entry["sha256"] for entry in report["sources"]}
    return tuple(
        Note(
            f"{text.path}: changed since the rewrite; the proof is about the file as it is now",
            help="run the rewrite again",
        )
        for text in gold.source.texts
        if digests.get(text.path) != text.digest
    )
