"""Show a rewrite without writing it."""

import difflib
import os

from rewriter.edit.text import CODEC
from rewriter.model.rewrite import FileChange, Rewrite


def unified_diff(rewrite: Rewrite, base: str | None = None) -> str:
    """Give the changes as a unified diff.

    Args:
        rewrite: what changes.
        base: folder that paths are relative to; the nearest common folder of the changed files without.
    """
    if not rewrite.files:
        return ""
    folder = base or os.path.commonpath([os.path.dirname(change.path) for change in rewrite.files])  # noqa: PTH120 (text)
    return "".join(_file_diff(change, os.path.relpath(change.path, folder)) for change in rewrite.files)


def _file_diff(change: FileChange, name: str) -> str:
    lines = difflib.unified_diff(_lines(change.old), _lines(change.new), f"a/{name}", f"b/{name}")
    return "".join(_marked(line) for line in lines)


def _lines(data: bytes) -> list[str]:
    """Split at LF alone, so that other line separators stay inside their line."""
    try:
        text = data.decode("utf-8")
    except UnicodeDecodeError:
        text = data.decode(CODEC)
    lines = text.split("\n")
    return [line + "\n" for line in lines[:-1]] + ([lines[-1]] if lines[-1] else [])


def _marked(line: str) -> str:
    return line if line.endswith("\n") else f"{line}\n\\ No newline at end of file\n"
