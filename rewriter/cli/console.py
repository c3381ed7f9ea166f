"""What people see: results on stdout, messages and progress on stderr."""

import os
import sys
from collections.abc import Callable, Generator
from contextlib import contextmanager

import click
from rich.console import Console

from rewriter.model.design import Note
from rewriter.model.errors import StillclockError


class ReaderGoneError(Exception):
    """Report that nobody reads the results any more (`… | head`); click would take a broken pipe for a failure."""


def result(text: str) -> None:
    """Print a result."""
    result_bytes((text if text.endswith("\n") or not text else f"{text}\n").encode("utf-8", "backslashreplace"))


def result_bytes(data: bytes) -> None:
    """Print a result whose bytes matter (a diff of files in any encoding)."""
    try:
        sys.stdout.flush()
        sys.stdout.buffer.write(data)
        sys.stdout.buffer.flush()
    except BrokenPipeError:
        raise ReaderGoneError from None


def message(text: str) -> None:
    """Print a message that is no result."""
    sys.stderr.write(f"{text}\n")


def note(warning: Note) -> None:
    """Print a warning with its place and way out."""
    head = f"{warning.place}: " if warning.place else ""
    message(f"{head}warning: {warning.message}" + (f"\nhelp: {warning.help}" if warning.help else ""))


def error(failure: StillclockError) -> None:
    """Print an error as its class formats it."""
    message(failure.render())


def styled() -> bool:
    """Say whether results may carry colour: on a terminal only, and NO_COLOR wins."""
    return sys.stdout.isatty() and not os.environ.get("NO_COLOR")


class Progress:
    """Show the step that runs; on anything but a terminal it stays silent."""

    def __init__(self, console: Console) -> None:
        self._status = console.status("") if console.is_terminal else None

    def __call__(self, step: str) -> None:
        """Show a step."""
        if self._status is not None:
            # Names of modules can hold brackets, which would read as markup.
            self._status.update(step.replace("[", r"\["))

    def start(self) -> None:
        """Begin to show."""
        if self._status is not None:
            self._status.start()

    def stop(self) -> None:
        """Clear the line."""
        if self._status is not None:
            self._status.stop()


@contextmanager
def progress() -> Generator[Progress]:
    """Give something to report steps to while a long job runs."""
    shown = Progress(Console(stderr=True))
    shown.start()
    try:
        yield shown
    finally:
        shown.stop()


def heading() -> Callable[[str], str]:
    """Give how headings are shown: bold where results may carry colour."""
    return (lambda text: click.style(text, bold=True)) if styled() else str
