"""Prove modules on their own where the engine cannot read what stands above them."""

from collections.abc import Callable, Mapping
from dataclasses import replace

from rewriter.model.design import Design, Module
from rewriter.model.evidence import CellEvidence, Mismatch, ProofJob, ProofResult
from rewriter.model.source import RtlSource

Prove = Callable[[ProofJob], ProofResult]


def prove_parts(
    design: Design, test_ports: Mapping[str, str], whole: ProofJob, unread: ProofResult, prove: Prove
) -> ProofResult:
    """Prove every gated module body below an unreadable top, with the parameters it has there and its ports free.

    What lies between the modules is not compared, and neither the override nor the clock domains above them are
    traced; the notes say so.

    Args:
        design: the original.
        test_ports: definitions that hold or pass on the override; others are as they were.
        whole: the job whose top the engine could not read.
        unread: its answer.
        prove: asks the engine.
    """
    cells: list[CellEvidence] = []
    mismatches: list[Mismatch] = []
    undecided: list[str] = []
    failed = list(unread.unread)
    for module in design.modules:
        if module.definition not in test_ports or module.key == design.top:
            continue
        answer = prove(_job(whole, module, test_ports))
        failed += [(module.key, message) for path, message in answer.unread if path == module.definition]
        for path in module.instances:
            cells += [
                replace(e, module=path, detail=e.detail or f"on its own: the engine cannot read {design.top}")
                for e in answer.cells
                if e.module == module.definition
            ]
            mismatches += [replace(m, module=path) for m in answer.mismatches if m.module == module.definition]
        undecided += answer.undecided
    note = f"the engine cannot read {design.top}: modules below it are proved on their own, what joins them is not"
    return replace(
        unread,
        cells=tuple(cells),
        mismatches=tuple(mismatches),
        undecided=tuple(undecided),
        unread=tuple(failed),
        notes=(*unread.notes, note),
    )


def _job(whole: ProofJob, module: Module, test_ports: Mapping[str, str]) -> ProofJob:
    return replace(
        whole,
        gold=_below(whole.gold, module) if whole.gold else None,
        gate=_below(whole.gate, module),
        top=module.definition,
        test_port=test_ports[module.definition],
        test_active_low=False,
    )


def _below(source: RtlSource, module: Module) -> RtlSource:
    return replace(source, tops=(module.definition,), parameters=module.parameters)
