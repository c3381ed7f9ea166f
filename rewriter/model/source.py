"""Source text: files as bytes, and half-open byte spans into them."""

import hashlib
from dataclasses import dataclass, replace
from functools import cached_property


@dataclass(frozen=True, order=True)
class Span:
    """Locate a piece of source text.

    Args:
        file: absolute path of the file.
        start: first byte (0-based).
        end: first byte after the piece (half open).
    """

    file: str
    start: int
    end: int

    def covers(self, other: "Span") -> bool:
        """Say whether `other` lies wholly inside this span."""
        return self.file == other.file and self.start <= other.start and other.end <= self.end


@dataclass(frozen=True)
class SourceText:
    """Hold one file as it was read; offsets everywhere are offsets into `data`."""

    path: str
    data: bytes

    @cached_property
    def digest(self) -> str:
        """Give the SHA-256 of the bytes, in hexadecimal."""
        return hashlib.sha256(self.data).hexdigest()

    def slice(self, span: Span) -> bytes:
        """Give the bytes of a span of this file."""
        return self.data[span.start : span.end]

    def line_column(self, offset: int) -> tuple[int, int]:
        """Give the 1-based line and column (bytes) of an offset."""
        line = self.data.count(b"\n", 0, offset) + 1
        return line, offset - (self.data.rfind(b"\n", 0, offset) + 1) + 1


@dataclass(frozen=True)
class RtlSource:
    """Hold the RTL arguments, opened up: every list expanded, every path absolute.

    Args:
        files: compilation units, in order.
        library_files: files given with -v, or found through -y.
        include_dirs: include path, in order.
        defines: `NAME=VALUE` each.
        undefines: macro names.
        tops: top modules; one after elaboration.
        parameters: `NAME=VALUE` each, as given with -G.
        options: all other slang options, verbatim and in order.
        texts: every file that was read, headers included.
    """

    files: tuple[str, ...]
    library_files: tuple[str, ...] = ()
    include_dirs: tuple[str, ...] = ()
    defines: tuple[str, ...] = ()
    undefines: tuple[str, ...] = ()
    tops: tuple[str, ...] = ()
    parameters: tuple[str, ...] = ()
    options: tuple[str, ...] = ()
    texts: tuple[SourceText, ...] = ()

    @cached_property
    def by_path(self) -> dict[str, SourceText]:
        """Index the texts by path."""
        return {text.path: text for text in self.texts}

    def with_texts(self, changed: dict[str, bytes], added: tuple[SourceText, ...] = ()) -> "RtlSource":
        """Give the same arguments over changed bytes; `added` files are compiled after the others."""
        texts = tuple(SourceText(t.path, changed.get(t.path, t.data)) for t in self.texts)
        files = self.files + tuple(t.path for t in added)
        return replace(self, files=files, texts=texts + added)
