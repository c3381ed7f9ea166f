"""Fixtures of the command line's tests."""

from collections.abc import Callable
from dataclasses import replace
from pathlib import Path

import pytest

from rewriter.flow import loop
from rewriter.model.evidence import CellEvidence, ProofJob, ProofResult
from rewriter.model.reasons import EvidenceKind
from tests.cli.running import Shell

Verdicts = dict[str, CellEvidence]


@pytest.fixture
def shell(capfd: pytest.CaptureFixture[str], tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Shell:
    """Run commands in an empty folder."""
    monkeypatch.chdir(tmp_path)
    return Shell(capfd)


@pytest.fixture
def prover(monkeypatch: pytest.MonkeyPatch) -> Callable[..., list[ProofJob]]:
    """Put a prover in place whose answers the test chooses: the flow is tested, not the engine."""

    def install(answers: dict[str, EvidenceKind], if_gated: str = "", **changes: object) -> list[ProofJob]:
        jobs: list[ProofJob] = []

        def prove(job: ProofJob, progress: Callable[[str], None]) -> ProofResult:
            progress("proving")
            jobs.append(job)
            text = "".join(found.data.decode("latin-1") for found in job.gate.texts)
            cells = tuple(
                CellEvidence("two", "two", f"u_icg_{name}", kind, (name,))
                for name, kind in answers.items()
                if f"u_icg_{name} " in text
            )
            result = ProofResult(cells, (), (), {}, (), (), {}, len(cells), 8 * len(cells))
            return replace(result, **changes) if f"u_icg_{if_gated}" in text else result  # type: ignore[arg-type]

        monkeypatch.setattr(loop, "prove", prove)
        return jobs

    return install
