"""Put edits into texts."""

from collections.abc import Iterable, Mapping
from itertools import pairwise

from rewriter.model.rewrite import Edit


class EditConflictError(RuntimeError):
    """Two edits want the same bytes: a fault of ours, never of the user."""

    def __init__(self, first: Edit, second: Edit) -> None:
        super().__init__(f"edits overlap: {_name(first)} and {_name(second)}")


def arranged(edits: Iterable[Edit]) -> tuple[Edit, ...]:
    """Sort edits by place.

    Raises:
        EditConflictError: two of them overlap, or insert at the same place.
    """
    ordered = tuple(sorted(edits))
    for first, second in pairwise(ordered):
        if first.span.file != second.span.file:
            continue
        if second.span.start < first.span.end or second.span.start == first.span.start:
            raise EditConflictError(first, second)
    return ordered


def apply(edits: Iterable[Edit], texts: Mapping[str, bytes]) -> dict[str, bytes]:
    """Give the new bytes of every file that an edit touches.

    Args:
        edits: in any order.
        texts: old bytes by path.

    Raises:
        EditConflictError: two edits overlap.
        ValueError: an edit reaches outside its file.
    """
    by_file: dict[str, list[Edit]] = {}
    for edit in arranged(edits):
        by_file.setdefault(edit.span.file, []).append(edit)
    return {path: _applied(group, texts[path]) for path, group in by_file.items()}


def _applied(edits: list[Edit], old: bytes) -> bytes:
    if edits and not 0 <= edits[-1].span.end <= len(old):
        raise ValueError(f"an edit reaches outside its file: {_name(edits[-1])}")
    pieces: list[bytes] = []
    done = 0
    for edit in edits:
        pieces += [old[done : edit.span.start], edit.text]
        done = edit.span.end
    return b"".join([*pieces, old[done:]])


def _name(edit: Edit) -> str:
    banks = f" for {', '.join(edit.banks)}" if edit.banks else ""
    return f"{edit.why}{banks} at {edit.span.file}:{edit.span.start}-{edit.span.end}"
