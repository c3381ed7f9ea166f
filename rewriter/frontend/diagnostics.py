"""What slang prints: its own text for errors in the RTL, and its complaints about arguments."""

import os
import sys
import tempfile
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass

import pyslang

from rewriter.model.errors import UserError

MINIMUM = (12, 1)


def check_version() -> None:
    """Refuse an older pyslang: there, symbols have no hash, and results differ without a word.

    Raises:
        UserError: pyslang is older than 12.1.
    """
    found = tuple(int(part) for part in pyslang.__version__.split(".")[:2])
    if found < MINIMUM:
        raise UserError(f"pyslang {pyslang.__version__} is too old", help="pip install 'pyslang>=12.1,<13'")


@dataclass
class Captured:
    """Hold what was written to the standard error stream below Python."""

    text: str = ""

    def messages(self, severity: str) -> list[str]:
        """Give the messages of a severity (`error`, `warning`), their prefix removed."""
        prefix = f"{severity}: "
        return [line[len(prefix) :] for line in self.text.splitlines() if line.startswith(prefix)]


@contextmanager
def captured_stderr() -> Iterator[Captured]:
    """Catch what slang's command line parser writes straight to file descriptor 2."""
    captured = Captured()
    sys.stderr.flush()
    saved = os.dup(2)
    with tempfile.TemporaryFile() as sink:
        os.dup2(sink.fileno(), 2)
        try:
            yield captured
        finally:
            os.dup2(saved, 2)
            os.close(saved)
            sink.seek(0)
            captured.text = sink.read().decode("utf-8", "replace")
