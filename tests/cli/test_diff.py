"""The unified diff. Outside check: GNU patch applies it and gets the new bytes."""

import shutil
import subprocess
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from rewriter.model.rewrite import Edit, FileChange, Rewrite
from rewriter.model.source import Span
from rewriter.report.diff import LineCounts, apply_edits, count_lines, unified

FILE = "/src/a.v"


def rewrite(old: bytes, *edits: tuple[int, int, bytes]) -> Rewrite:
    made = tuple(Edit(Span(FILE, start, end), text, ("q",), "clock") for start, end, text in edits)
    change = FileChange(FILE, old, apply_edits(old, made))
    return Rewrite((change,), made, (), {}, {}, {})


def diff(done: Rewrite) -> bytes:
    return unified(done, lambda _: "a.v")


def patched(folder: Path, old: bytes, text: bytes) -> bytes:
    program = shutil.which("patch")
    assert program, "GNU patch is missing: apt-get install patch"
    target = folder / "a.v"
    target.write_bytes(old)
    subprocess.run([program, "--binary", "-s", "-p1", "--fuzz=0"], input=text, cwd=folder, check=True)
    return target.read_bytes()


def test_reads_like_a_diff() -> None:
    old = b"".join(b"line %d\n" % number for number in range(1, 31))
    start = old.index(b"line 5\n")
    done = rewrite(old, (start, start, b"new\n"), (old.index(b"line 20"), old.index(b"line 20") + 7, b"LINE 20"))
    assert diff(done).decode() == (
        "--- a/a.v\n+++ b/a.v\n"
        "@@ -2,6 +2,7 @@\n line 2\n line 3\n line 4\n+new\n line 5\n line 6\n line 7\n"
        "@@ -17,7 +18,7 @@\n line 17\n line 18\n line 19\n-line 20\n+LINE 20\n line 21\n line 22\n line 23\n"
    )
    assert count_lines(done) == LineCounts(2, 1)


@pytest.mark.parametrize(
    "old, edits",
    [
        (b"a\r\nb\r\nc\r\n", ((3, 4, b"B"),)),
        (b"a\nb", ((3, 3, b"c"),)),
        (b"a\nb", ((3, 3, b"c\n"),)),
        (b"a\nb\n", ((1, 2, b""),)),
        (b"a\nb\n", ((0, 4, b""),)),
        (b"caf\xe9 /*\n*/ q\n", ((8, 8, b"\xfc"),)),
        (b"one\x0cline\nx\x85y\n", ((10, 11, b"z"),)),
        (b"a\n\nb\n", ((2, 2, b"n\n"), (3, 3, b"m\n"))),
    ],
)
def test_patch_takes_it(tmp_path: Path, old: bytes, edits: tuple[tuple[int, int, bytes], ...]) -> None:
    done = rewrite(old, *edits)
    assert patched(tmp_path, old, diff(done)) == done.files[0].new


@st.composite
def rewrites(draw: st.DrawFn) -> Rewrite:
    lines = draw(st.lists(st.sampled_from([b"", b"a", b"bb", b"end", b"\tq <= d;"]), min_size=1, max_size=40))
    old = b"\n".join(lines)
    cuts = sorted(draw(st.lists(st.integers(0, len(old)), max_size=8, unique=True)))
    edits: list[tuple[int, int, bytes]] = []
    for start, end in zip(cuts[::2], cuts[1::2], strict=False):
        edits.append((start, draw(st.sampled_from([start, end])), draw(st.sampled_from([b"", b"x", b"x\ny\n", b"\n"]))))
    return rewrite(old, *edits)


@settings(deadline=None)  # it starts a program
@given(done=rewrites())
def test_any_diff_turns_old_into_new(tmp_path_factory: pytest.TempPathFactory, done: Rewrite) -> None:
    change = done.files[0]
    text = diff(done)
    if change.old == change.new:
        assert b"@@" not in text
    elif change.new:  # patch removes a file that becomes empty
        assert patched(tmp_path_factory.mktemp("patch"), change.old, text) == change.new
