"""Options and fixtures that every test shares."""

from collections.abc import Callable
from pathlib import Path

import pytest

Golden = Callable[[Path, str], None]


def pytest_addoption(parser: pytest.Parser) -> None:
    """Add `--update`, which writes golden files instead of comparing them."""
    parser.addoption("--update", action="store_true", help="write the golden files anew, then review the diff")


@pytest.fixture
def golden(request: pytest.FixtureRequest) -> Golden:
    """Compare a text with a golden file; a missing file fails, and says how to make it."""

    def compare(path: Path, text: str) -> None:
        if request.config.getoption("--update"):
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_text(text, encoding="utf-8", newline="")
        assert path.is_file(), f"{path.name} is missing: run pytest --update, then review what it wrote"
        with path.open(encoding="utf-8", newline="") as file:
            assert text == file.read(), f"{path.name} differs: run pytest --update if that is right, then review it"

    return compare
