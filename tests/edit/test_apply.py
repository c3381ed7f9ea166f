"""Edits and bytes: nothing outside the spans moves, and edits never overlap."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from rewriter.edit import EditConflictError, apply
from rewriter.edit.apply import arranged
from rewriter.model.rewrite import Edit
from rewriter.model.source import Span


def an_edit(start: int, end: int, text: bytes = b"", *, file: str = "a.v", bank: str = "q") -> Edit:
    return Edit(Span(file, start, end), text, (bank,), "clock")


@st.composite
def texts_and_edits(draw: st.DrawFn) -> tuple[bytes, list[Edit]]:
    old = draw(st.binary(max_size=60))
    cuts = sorted(draw(st.sets(st.integers(0, len(old)), max_size=8)))
    pairs = zip(cuts[::2], cuts[1::2], strict=False)
    return old, [an_edit(start, end, draw(st.binary(max_size=5))) for start, end in pairs]


@given(texts_and_edits(), st.randoms())
def test_bytes_outside_the_spans_are_unchanged(case: tuple[bytes, list[Edit]], random: object) -> None:
    old, edits = case
    shuffled = list(edits)
    random.shuffle(shuffled)  # pyright: ignore[reportAttributeAccessIssue, reportUnknownMemberType]
    new = apply(shuffled, {"a.v": old}).get("a.v", old)
    position = done = 0
    for edit in edits:
        between = old[done : edit.span.start]
        assert new[position : position + len(between)] == between
        position += len(between)
        assert new[position : position + len(edit.text)] == edit.text
        position += len(edit.text)
        done = edit.span.end
    assert new[position:] == old[done:]


@given(st.integers(0, 20), st.integers(1, 20), st.integers(0, 20), st.integers(1, 20))
def test_overlapping_edits_are_rejected(start: int, length: int, other: int, other_length: int) -> None:
    first, second = an_edit(start, start + length), an_edit(other, other + other_length, b"x")
    overlap = start < other + other_length and other < start + length
    if overlap:
        with pytest.raises(EditConflictError):
            arranged([first, second])
    else:
        assert len(arranged([first, second])) == 2


def test_a_conflict_names_both() -> None:
    with pytest.raises(EditConflictError, match=r"clock for p at a\.v:2-5 and clock for q at a\.v:4-6"):
        apply([an_edit(4, 6), an_edit(2, 5, bank="p")], {"a.v": b"0123456789"})


def test_two_insertions_at_one_place_have_no_order() -> None:
    with pytest.raises(EditConflictError):
        apply([an_edit(3, 3, b"a"), an_edit(3, 3, b"b")], {"a.v": b"0123456789"})


def test_an_edit_outside_its_file_is_a_fault() -> None:
    with pytest.raises(ValueError, match="reaches outside its file"):
        apply([an_edit(8, 12)], {"a.v": b"0123456789"})
