"""What slang prints: its own text for errors in the RTL, and its complaints about arguments."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

import os
import sys
import tempfile
from collections.abc import Generator
from contextlib import contextmanager
from dataclasses import dataclass
from importlib.metadata import version

from rewriter.model.errors import UserError

MINIMUM = (12, 1)


def check_version() -> None:
    """Refuse an older pyslang: there, symbols have no hash, and results differ without a word.

    Raises:
        UserError: pyslang is older than 12.1.
    """
    installed = version("pyslang")
    if tuple(int(part) for part in installed.split(".")[:2]) < MINIMUM:
        raise UserError(f"pyslang {installed} is too old", help="pip install 'pyslang>=12.1,<13'")


@dataclass
class Captured:
    """Hold what was written to the standard error stream below Python."""

    text: str = ""

    def messages(self, severity: str) -> list[str]:
        """Give the messages of a severity (`error`, `warning`), their prefix removed."""
        prefix = f"{severity}: "
        return [line[len(prefix) :] for line in self.text.splitlines() if line.startswith(prefix)]


@contextmanager
def captured_stderr() -> Generator[Captured]:
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
