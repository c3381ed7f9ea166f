"""The unified diff of a rewrite, made from its edits: exact, and small where a general comparison would wander."""

import difflib
from bisect import bisect_right
from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass
from itertools import accumulate

from rewriter.model.rewrite import Edit, FileChange, Rewrite

CONTEXT = 3


@dataclass(frozen=True)
class _Change:
    """Replace the lines [start, end) of the old file, 0-based, by `new`."""

    start: int
    end: int
    new: tuple[bytes, ...]


@dataclass(frozen=True)
class LineCounts:
    """Lines that a diff adds and removes."""

    added: int
    removed: int


def unified(rewrite: Rewrite, name: Callable[[str], str]) -> bytes:
    """Make the unified diff of all changed files.

    Args:
        rewrite: what changes.
        name: gives the name under which a file is shown, without the leading `a/` and `b/`.

    Returns:
        Bytes, since the files may be in any encoding; `patch -p1` takes them.
    """
    return b"".join(_file_diff(change, rewrite.edits, name(change.path)) for change in rewrite.files)


def count_lines(rewrite: Rewrite) -> LineCounts:
    """Count the lines that the diff adds and removes, the wrapper files aside."""
    changes = [change for file in rewrite.files for change in _changes(file, rewrite.edits)]
    return LineCounts(sum(len(c.new) for c in changes), sum(c.end - c.start for c in changes))


def apply_edits(old: bytes, edits: Sequence[Edit], base: int = 0) -> bytes:
    """Replace the spans of one file's edits.

    Args:
        old: the file from offset `base` on.
        edits: sorted, without overlap.
        base: offset of `old` in the file.
    """
    pieces: list[bytes] = []
    position = 0
    for edit in edits:
        pieces += [old[position : edit.span.start - base], edit.text]
        position = edit.span.end - base
    return b"".join((*pieces, old[position:]))


def _file_diff(change: FileChange, edits: Sequence[Edit], name: str) -> bytes:
    old = _lines(change.old)
    head = f"--- a/{name}\n+++ b/{name}\n".encode("utf-8", "surrogateescape")
    return head + b"".join(_hunk(old, group, shift) for group, shift in _groups(_changes(change, edits)))


def _lines(data: bytes) -> list[bytes]:
    """Split after line feeds alone, as patch does; a lone carriage return ends no line."""
    pieces = data.split(b"\n")
    lines = [piece + b"\n" for piece in pieces[:-1]]
    return [*lines, pieces[-1]] if pieces[-1] else lines


def _changes(file: FileChange, edits: Sequence[Edit]) -> tuple[_Change, ...]:
    """Compare line by line, within the lines that edits touch."""
    old = _lines(file.old)
    starts = [0, *accumulate(len(line) for line in old)]
    own = [edit for edit in edits if edit.span.file == file.path]
    found: list[_Change] = []
    for first, last, inside in _regions(own, starts, len(old)):
        base = starts[first]
        new = _lines(apply_edits(b"".join(old[first:last]), inside, base))
        matcher = difflib.SequenceMatcher(None, old[first:last], new, autojunk=False)
        found += [
            _Change(first + a, first + b, tuple(new[c:d]))
            for tag, a, b, c, d in matcher.get_opcodes()
            if tag != "equal"
        ]
    return tuple(found)


def _regions(edits: Sequence[Edit], starts: Sequence[int], lines: int) -> Iterator[tuple[int, int, list[Edit]]]:
    """Yield the line ranges [first, last) that edits touch, with their edits; ranges that meet are one."""
    first, last, inside = 0, 0, list[Edit]()
    for edit in edits:
        begin = min(bisect_right(starts, edit.span.start) - 1, max(lines - 1, 0))
        end = min(bisect_right(starts, edit.span.end), lines)
        if inside and begin <= last:
            last = max(last, end)
            inside.append(edit)
            continue
        if inside:
            yield first, last, inside
        first, last, inside = begin, end, [edit]
    if inside:
        yield first, last, inside


def _groups(changes: Sequence[_Change]) -> Iterator[tuple[list[_Change], int]]:
    """Yield the changes of each hunk, with how far the hunks before it have moved the lines."""
    group: list[_Change] = []
    shift = moved = 0
    for change in changes:
        if group and change.start - group[-1].end > 2 * CONTEXT:
            yield group, shift
            group, shift = [], moved
        group.append(change)
        moved += len(change.new) - (change.end - change.start)
    if group:
        yield group, shift


def _hunk(old: Sequence[bytes], group: Sequence[_Change], shift: int) -> bytes:
    first = max(group[0].start - CONTEXT, 0)
    last = min(group[-1].end + CONTEXT, len(old))
    body: list[bytes] = []
    position = first
    for change in group:
        body += [b" " + line for line in old[position : change.start]]
        body += [b"-" + line for line in old[change.start : change.end]]
        body += [b"+" + line for line in change.new]
        position = change.end
    body += [b" " + line for line in old[position:last]]
    length = last - first
    new_length = length + sum(len(c.new) - (c.end - c.start) for c in group)
    head = f"@@ -{_range(first, length)} +{_range(first + shift, new_length)} @@\n".encode()
    return head + b"".join(
        line if line.endswith(b"\n") else line + b"\n\\ No newline at end of file\n" for line in body
    )


def _range(start: int, length: int) -> str:
    return f"{start + 1 if length else start},{length}"
