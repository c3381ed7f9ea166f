"""Places: slang's ranges as byte spans of files, macro uses counted as written."""

import re
from collections import Counter
from dataclasses import dataclass

import pyslang

from rewriter.model.source import Span

_FILE_KINDS = (pyslang.BufferKind.DesignFile, pyslang.BufferKind.LibraryFile, pyslang.BufferKind.IncludeFile)
_END_OF_BODY = re.compile(rb"([ \t)]*)(?://[^\n]*)?(?:\r?\n|\0|$)")


@dataclass
class _Edges:
    """Follow both ends of a range out of macros: whether they are edges of each macro, and parentheses skipped."""

    exact: bool = True
    balance: int = 0


class Locator:
    """Turn slang's locations into files and byte offsets."""

    def __init__(self, manager: pyslang.SourceManager) -> None:
        self._manager = manager
        self._files: dict[int, str] = {}
        self._texts: dict[int, bytes] = {}
        self.paths: list[str] = []
        included: Counter[str] = Counter()
        for buffer in manager.getAllBuffers():
            kind = manager.getBufferKind(buffer)
            if kind in _FILE_KINDS:
                path = str(manager.getFullPath(buffer))
                if path.startswith("<"):  # a define of the command line
                    continue
                self.paths.append(path)
                self._files[buffer.id] = path
                included[path] += kind is pyslang.BufferKind.IncludeFile
        self.shared = frozenset(path for path, times in included.items() if times > 1)

    def span(self, source: pyslang.SourceRange) -> Span:
        """Give the bytes of a range in its file; a macro use counts as a whole."""
        return self.placed(source)[0]

    def plain(self, source: pyslang.SourceRange) -> Span | None:
        """Give the span of a range whose ends are file text, None when an end comes from a macro."""
        start, end = source.start, source.end
        path = self._files.get(start.buffer.id)
        if path is None or self._files.get(end.buffer.id) != path:
            return None
        return Span(path, start.offset, end.offset)

    def placed(self, source: pyslang.SourceRange) -> tuple[Span, bool]:
        """Give the span of a range, and whether the text there is exactly this range (so that it may be copied)."""
        plain = self.plain(source)
        if plain is not None:
            return plain, True
        edges = _Edges()
        first_path, first = self._leave_macros(source.start, edges, at_end=False)
        last_path, last = self._leave_macros(source.end, edges, at_end=True)
        if first_path != last_path or last < first:
            return Span(first_path, first, first), False
        return Span(first_path, first, last), edges.exact and edges.balance == 0

    def macro_at(self, location: pyslang.SourceLocation) -> str | None:
        """Name the outermost macro that a location comes from, None when it is plain file text."""
        name = None
        while location.buffer.id not in self._files:
            name = self._manager.getMacroName(location) or name or "a macro"
            location = self._manager.getExpansionLoc(location)
        return name

    def _leave_macros(self, location: pyslang.SourceLocation, edges: _Edges, *, at_end: bool) -> tuple[str, int]:
        while (path := self._files.get(location.buffer.id)) is None:
            expansion = self._manager.getExpansionRange(location)
            following = expansion.end if at_end else expansion.start
            if following.buffer == location.buffer:
                return "", 0
            if edges.exact:
                edges.exact = self._at_edge(location, edges, at_end=at_end)
            location = following
        return path, location.offset

    def _at_edge(self, location: pyslang.SourceLocation, edges: _Edges, *, at_end: bool) -> bool:
        """Tell whether a location is the first or last of a macro body, parentheses around it aside."""
        if self._manager.isMacroArgLoc(location):
            return False
        original = self._manager.getOriginalLoc(location)
        text = self._text(original.buffer)
        if at_end:
            match = _END_OF_BODY.match(text, original.offset)
            edges.balance -= match[1].count(b")") if match else 0
            return match is not None
        before = text[original.offset - location.offset : original.offset]
        edges.balance += before.count(b"(")
        return not before.strip(b" \t(")

    def _text(self, buffer: pyslang.BufferID) -> bytes:
        if buffer.id not in self._texts:
            self._texts[buffer.id] = self._manager.getSourceText(buffer).encode()
        return self._texts[buffer.id]
