"""report.json and the JSON form of a survey: a versioned format, stable in its order."""

import json
from collections.abc import Mapping
from dataclasses import asdict
from typing import Any

from rewriter import __version__
from rewriter.model.design import Note
from rewriter.model.evidence import CellEvidence, Counterexample, Mismatch, ProofResult
from rewriter.model.rewrite import Edit, Rewrite, TestPin
from rewriter.model.run import Run
from rewriter.model.source import RtlSource
from rewriter.report.diff import count_lines
from rewriter.report.rows import BankRow, CellRow, Rows, rows

FAMILY = "stillclock-report/"
SCHEMA = f"{FAMILY}1"
SURVEY_SCHEMA = "stillclock-survey/1"
PROOF_SCHEMA = "stillclock-proof/1"

Json = dict[str, Any]


def report(run: Run, rewrite: Rewrite) -> Json:
    """Make report.json of a rewrite.

    The text of an edit is UTF-8; a byte that is none stands as a lone surrogate (Python: `surrogateescape`), so
    that the edits, applied to the sources, give the output byte for byte.
    """
    lines = count_lines(rewrite)
    body = _common(run, SCHEMA)
    body["totals"] |= {"lines_added": lines.added, "lines_removed": lines.removed}
    return body | {
        "sources": [{"file": text.path, "sha256": text.digest} for text in run.design.source.texts],
        "test_ports": dict(rewrite.test_ports),
        "test_pins": [_pin(pin) for pin in run.test_pins],
        "edits": [_edit(edit) for edit in rewrite.edits],
    }


def survey(run: Run) -> Json:
    """Make the JSON form of a survey."""
    return _common(run, SURVEY_SCHEMA)


def proof(result: ProofResult) -> Json:
    """Make the JSON form of a proof."""
    return {
        "schema": PROOF_SCHEMA,
        "proved": result.proved,
        "cells": [_evidence(evidence) for evidence in result.cells],
        **_outside(result),
    }


def render(body: Mapping[str, Any]) -> str:
    """Format for people and diffs: indented, ASCII, one line end at the end."""
    return json.dumps(body, indent=1, ensure_ascii=True) + "\n"


def _common(run: Run, schema: str) -> Json:
    table = rows(run)
    return {
        "schema": schema,
        "version": __version__,
        "top": run.design.top,
        "configuration": _configuration(run.design.source),
        "totals": asdict(table.totals) | {"unproved_banks": len(run.unproved_banks)},
        **_sums(table),
        "cells": [_cell(cell) for cell in table.cells],
        "banks": [_bank(run, bank) for bank in table.banks],
        "evidence": _outside(run.proof) if run.proof else None,
        "warnings": [_warning(warning) for warning in run.warnings],
        "seconds": {stage: round(seconds, 3) for stage, seconds in run.seconds.items()},
    }


def _sums(table: Rows) -> Json:
    return {
        "by_method": table.by_method(),
        "by_reason": table.by_reason(),
        "by_module": {
            module: {"gated": gated, "flop_bits": bits} for module, (gated, bits) in table.by_module().items()
        },
    }


def _configuration(source: RtlSource) -> Json:
    return {
        "parameters": list(source.parameters),
        "defines": list(source.defines),
        "undefines": list(source.undefines),
        "include_dirs": list(source.include_dirs),
        "options": list(source.options),
    }


def _cell(cell: CellRow) -> Json:
    return {
        "id": cell.id,
        "name": cell.name,
        "module": cell.module,
        "file": cell.where.file,
        "line": cell.where.line,
        "clock": cell.clock,
        "edge": cell.edge,
        "wake": cell.wake,
        "bits": cell.bits,
        "evidence": cell.kind.value,
        "banks": [bank.name for bank in cell.banks],
    }


def _bank(run: Run, bank: BankRow) -> Json:
    return {
        "name": bank.name,
        "module": bank.module,
        "file": bank.where.file,
        "line": bank.where.line,
        "registers": list(bank.registers),
        "bits": bank.bits,
        "total_bits": bank.total_bits,
        "clock": bank.clock,
        "edge": bank.edge,
        "wake": bank.wake or None,
        "method": bank.method or None,
        "verdict": bank.verdict.value,
        "reason": bank.reason or None,
        "detail": bank.detail,
        "cell": bank.cell or None,
        "evidence": _bank_evidence(run, bank),
        "occurrences": [asdict(occurrence) for occurrence in bank.occurrences],
    }


def _bank_evidence(run: Run, bank: BankRow) -> Json | None:
    if bank.kind is None:
        return None
    return {"kind": bank.kind.value, "cells": [_evidence(evidence) for evidence in run.evidence.get(bank.cell, ())]}


def _evidence(evidence: CellEvidence) -> Json:
    return {
        "module": evidence.module,
        "definition": evidence.definition,
        "cell": evidence.cell,
        "kind": evidence.kind.value,
        "registers": list(evidence.registers),
        "failing": list(evidence.failing),
        "dead": list(evidence.dead),
        "reason": evidence.reason or None,
        "detail": evidence.detail,
        "counterexample": _counterexample(evidence.counterexample),
        "wider": _counterexample(evidence.wider),
    }


def _counterexample(example: Counterexample | None) -> Json | None:
    return None if example is None else asdict(example) | {"signals": dict(example.signals)}


def _outside(result: ProofResult) -> Json:
    """Give what was compared beside the banks."""
    return {
        "registers": result.registers,
        "bits": result.bits,
        "lemma": dict(result.lemma),
        "mismatches": [_mismatch(mismatch) for mismatch in result.mismatches],
        "undecided": list(result.undecided),
        "notes": list(result.notes),
        "unread": [{"module": module, "message": message} for module, message in result.unread],
        "equal_wakes": [list(group) for group in result.equal_wakes],
    }


def _mismatch(mismatch: Mismatch) -> Json:
    return {
        "module": mismatch.module,
        "what": mismatch.what,
        "detail": mismatch.detail,
        "counterexample": _counterexample(mismatch.counterexample),
    }


def _warning(warning: Note) -> Json:
    return {"message": warning.message, "place": warning.place, "help": warning.help}


def _edit(edit: Edit) -> Json:
    return {
        "file": edit.span.file,
        "start": edit.span.start,
        "end": edit.span.end,
        "text": edit.text.decode("utf-8", "surrogateescape"),
        "banks": list(edit.banks),
        "why": edit.why,
    }


def _pin(pin: TestPin) -> Json:
    return {"module": pin.definition, "port": pin.port, "meaning": pin.meaning, "active_low": pin.active_low}
