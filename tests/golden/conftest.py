"""Every golden case is rewritten once per session."""

from collections.abc import Callable
from pathlib import Path

import pytest

from rewriter.model.errors import StillclockError
from tests.golden.cases import Case, Outcome, all_cases, rewrite, wrappers

GoldenBytes = Callable[[Path, bytes], None]


@pytest.fixture
def golden_bytes(request: pytest.FixtureRequest) -> GoldenBytes:
    """Compare bytes with a golden file, whatever their encoding; a missing file fails, and says how to make it."""

    def compare(path: Path, data: bytes) -> None:
        if request.config.getoption("--update"):
            path.write_bytes(data)
        assert path.is_file(), f"{path.name} is missing: run pytest --update, then review what it wrote"
        shown = data.decode("utf-8", "replace"), path.read_bytes().decode("utf-8", "replace")
        assert shown[0] == shown[1], f"{path.name} differs: run pytest --update if that is right, then review it"
        assert data == path.read_bytes()

    return compare


class Bench:
    """Rewrite cases on request and keep what came out."""

    def __init__(self, folder: Path) -> None:
        self.folder = folder
        self.cells = folder / "cells"
        self.cells.mkdir()
        wrappers(self.cells)
        self._known: dict[str, Outcome] = {}

    def outcome(self, case: Case) -> Outcome:
        if case.name not in self._known:
            self._known[case.name] = rewrite(case, self.folder / case.name, self.cells)
        return self._known[case.name]

    def changed(self) -> list[Outcome]:
        """Give the cases in which something is gated."""
        return [found for found in map(self._outcome_or_none, all_cases()) if found and found.changed]

    def _outcome_or_none(self, case: Case) -> Outcome | None:
        """Leave out a case that cannot be rewritten; the tests of that case tell of it."""
        try:
            return self.outcome(case)
        except StillclockError:
            return None


@pytest.fixture(scope="session")
def rewritten(tmp_path_factory: pytest.TempPathFactory) -> Bench:
    """Give all cases, rewritten."""
    return Bench(tmp_path_factory.mktemp("cases"))
