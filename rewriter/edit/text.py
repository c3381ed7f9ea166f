"""Source text as characters that map one to one to bytes, and what may be copied from it."""

import re
from collections import Counter
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property

from rewriter.model.source import SourceText, Span

CODEC = "latin-1"
"""Maps every byte to one character and back, so that offsets and foreign encodings survive."""

WIDTH = 100
"""Columns after which inserted text is broken."""

DIRECTIVE = re.compile(
    r"`(?:ifdef|ifndef|elsif|else|endif|define|undef|undefineall|include|line|timescale|default_nettype|pragma"
    r"|resetall|celldefine|endcelldefine|begin_keywords|end_keywords|nounconnected_drive|unconnected_drive)\b"
)
COMMENT = re.compile(r"//[^\n]*|/\*.*?\*/", re.DOTALL)
LEXEMES = re.compile(
    r"(?P<comment>//[^\r\n]*|/\*.*?\*/)|(?P<string>\"(?:\\.|[^\"\\])*\")|(?P<escaped>\\[^\s]+)", re.DOTALL
)


_INDENT = re.compile(r"[ \t]*")
_WORDS = re.compile(
    LEXEMES.pattern
    + r"|(?P<macro>`[\w$]+)|(?P<number>'[sS]?[bBoOdDhH]\s*[\w?]+)|(?P<member>(?:\.|::)\s*[A-Za-z_][\w$]*)"
    r"|(?P<word>[A-Za-z_$][\w$]*)",
    re.DOTALL,
)


class CannotEditError(Exception):
    """Say why registers cannot be rewritten; `word` is a reason word."""

    def __init__(self, word: str, detail: str, span: Span | None = None) -> None:
        super().__init__(f"{word}: {detail}")
        self.word = word
        self.detail = detail
        self.span = span


@dataclass(frozen=True)
class Page:
    """One file as characters; offsets are byte offsets."""

    source: SourceText

    @cached_property
    def data(self) -> str:
        """Give the whole text."""
        return self.source.data.decode(CODEC)

    @property
    def path(self) -> str:
        """Give the file's path."""
        return self.source.path

    @cached_property
    def newline(self) -> str:
        """Give the line end the file uses."""
        first = self.data.find("\n")
        return "\r\n" if first > 0 and self.data[first - 1] == "\r" else "\n"

    def text(self, span: Span) -> str:
        """Give the text of a span."""
        return self.data[span.start : span.end]

    def line_start(self, offset: int) -> int:
        """Give the offset of the first character of a line."""
        start = self.data.rfind("\n", 0, offset) + 1
        return start + 3 if start == 0 and self.data.startswith("\xef\xbb\xbf") and offset >= len("BOM") else start

    def line_end(self, offset: int) -> int:
        """Give the offset just before a line's end (before CR LF)."""
        end = self.data.find("\n", offset)
        end = len(self.data) if end < 0 else end
        return end - 1 if end > offset and self.data[end - 1] == "\r" else end

    def indent(self, offset: int) -> str:
        """Give the white space that starts a line."""
        found = _INDENT.match(self.data, self.line_start(offset))
        return found[0] if found else ""

    def opens_line(self, offset: int) -> bool:
        """Say whether only white space precedes an offset on its line."""
        return not self.data[self.line_start(offset) : offset].strip(" \t")

    def rest_is_comment(self, offset: int) -> bool:
        """Say whether nothing but white space and comments that end on this line follow on it."""
        rest = self.data[offset : self.line_end(offset)]
        return re.fullmatch(r"[ \t]*(?:/\*[^\n]*?\*/[ \t]*)*(?://.*)?", rest) is not None

    def unit(self, span: Span) -> str:
        """Guess one step of indentation from the lines of a span: the first one that is deeper than its first line."""
        outer = self.indent(span.start)
        for line in self.text(span).split("\n")[1:]:
            inner = line[: len(line) - len(line.lstrip(" \t"))]
            if len(inner) > len(outer) and inner.startswith(outer) and line.strip():
                return inner[len(outer) :] if len(inner) - len(outer) <= len("8 spaces") else "    "
        return "\t" if outer.endswith("\t") else "    "


def copied(text: str) -> str:
    """Make a piece of source fit to stand elsewhere on one line.

    Comments go, line breaks become single spaces, and a name that starts with a backslash keeps the space that ends it.

    Raises:
        CannotEditError: `not-copyable`, a compiler directive stands inside.
    """
    if DIRECTIVE.search(text):
        raise CannotEditError("not-copyable", "a compiler directive stands inside the condition")
    marked = LEXEMES.sub(lambda found: "\0" if found["comment"] else found[0], text)
    plain = re.sub(r"[ \t]*\0[ \t]*", " ", marked)
    lines = [line.strip() for line in re.split(r"[ \t\r\f]*\\?\n[ \t\r\f]*", plain)]
    joined = " ".join(line for line in lines if line)
    return joined + " " if re.search(r"\\\S+\Z", joined) else joined


def words(text: str) -> frozenset[str]:
    """Give the names in a piece of source: no comments, strings, numbers, members or macros."""
    return frozenset(word_counts(text))


def word_counts(text: str) -> Counter[str]:
    """Count the names in a piece of source."""
    return Counter(found["word"] for found in _WORDS.finditer(text) if found["word"])


def renamed(text: str, names: Mapping[str, str]) -> str:
    """Replace names in a piece of source."""
    return _WORDS.sub(lambda found: names.get(found["word"], found["word"]) if found["word"] else found[0], text)


def indented(lines: list[str], step: str) -> list[str]:
    """Put one step of indentation before every line."""
    return [step + line for line in lines]
