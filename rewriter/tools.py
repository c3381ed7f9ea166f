"""Outside programs: find them, run them within a time limit, and say what to do when one is missing."""

import os
import shutil
import signal
import subprocess
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from pathlib import Path

from rewriter.model.errors import NoAnswerError

_INSTALL = {
    "iverilog": "apt-get install iverilog",
    "vvp": "apt-get install iverilog",
    "verilator": "apt-get install verilator",
    "make": "apt-get install make",
    "g++": "apt-get install g++",
}


class MissingProgramError(NoAnswerError):
    """Report an outside program that is not installed (exit status 3)."""

    def __init__(self, program: str) -> None:
        how = _INSTALL.get(program)
        way = f"install it with `{how}`" if how else "install it"
        super().__init__(f"the program `{program}` is not on the PATH", help=f"{way}, then run the command again")
        self.program = program


class TimeLimitError(NoAnswerError):
    """Report an outside program that was stopped at its time limit (exit status 3)."""

    def __init__(self, program: str, seconds: float) -> None:
        super().__init__(f"`{program}` was stopped after {seconds:g} s", help="give it more time or a smaller job")
        self.program = program
        self.seconds = seconds


@dataclass(frozen=True)
class Ran:
    """What a program left behind: its exit status and both of its streams as text."""

    status: int
    stdout: str
    stderr: str

    @property
    def ok(self) -> bool:
        """Tell whether the program ended with status 0."""
        return self.status == 0


def find(program: str) -> str:
    """Give the full path of a program.

    Raises:
        MissingProgramError: it is not on the PATH.
    """
    path = shutil.which(program)
    if path is None:
        raise MissingProgramError(program)
    return path


def run(
    program: str,
    arguments: Sequence[str],
    *,
    folder: Path,
    seconds: float,
    environment: Mapping[str, str] | None = None,
) -> Ran:
    """Run a program to its end, whatever its exit status.

    Args:
        program: its name on the PATH.
        arguments: passed one by one; no shell is involved.
        folder: working folder.
        seconds: time limit; the program is ended when it is reached.
        environment: replaces the whole environment when given.

    Raises:
        MissingProgramError: the program is not installed.
        TimeLimitError: the limit was reached.
    """
    with subprocess.Popen(
        [find(program), *arguments],
        cwd=folder,
        env=environment,
        stdin=subprocess.DEVNULL,
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
        errors="replace",
        start_new_session=True,  # so that what the program started ends with it
    ) as process:
        try:
            stdout, stderr = process.communicate(timeout=seconds)
        except subprocess.TimeoutExpired:
            raise TimeLimitError(program, seconds) from None
        finally:
            if process.poll() is None:
                os.killpg(process.pid, signal.SIGKILL)
    return Ran(process.wait(), stdout, stderr)
