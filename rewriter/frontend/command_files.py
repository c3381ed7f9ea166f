"""Arguments and file lists, split into words as slang does it; every word remembers where it was written."""

import os
import re
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, replace
from pathlib import Path

from rewriter.model.errors import Place, UserError

_VARIABLE = re.compile(r"\$(?:\((\w+)\)|\{(\w+)\}|(\w+))")
_PLAIN = re.compile(r"[^\s\\\"'$]+(?=\s|\Z)")
_PIECE = re.compile(r"[^\s\\\"'$]+")
_LISTS = {"-f": False, "-F": True}


@dataclass(frozen=True)
class Word:
    """Hold one argument: its text, the folder its relative paths start from, and its place in a list."""

    text: str
    folder: str
    place: Place | None = None

    def path(self, text: str | None = None) -> str:
        """Give `text` (the word itself by default) as an absolute path, links resolved as slang does it."""
        return os.path.realpath(os.path.join(self.folder, self.text if text is None else text))  # noqa: PTH118 (many)

    def error(self, message: str, help_line: str = "") -> UserError:
        """Make an error that points at this word when it stands in a list."""
        return UserError(message, place=self.place, help=help_line)


def expand(arguments: Sequence[str], folder: str) -> list[Word]:
    """Open up every `-f` and `-F` list, however deep, and give all words in order."""
    return list(_expand([Word(text, folder) for text in arguments], ()))


def _expand(words: Sequence[Word], open_lists: tuple[str, ...]) -> Iterator[Word]:
    position = 0
    while position < len(words):
        word = words[position]
        position += 1
        flag, name = word.text[:2], word.text[2:].removeprefix("=")
        if flag not in _LISTS:
            yield word
            continue
        if not name:
            if position == len(words):
                raise word.error(f"{word.text} needs the name of a file list", "write `-f LIST`")
            word, name = words[position], words[position].text
            position += 1
        yield from _open_list(replace(word, text=name), relative=_LISTS[flag], open_lists=open_lists)


def _open_list(word: Word, *, relative: bool, open_lists: tuple[str, ...]) -> Iterator[Word]:
    path = word.path()
    if path in open_lists:
        raise word.error(f"the file list {word.text} includes itself", "remove the line that closes the circle")
    text = read_bytes(word, path, "file list").decode("utf-8", "replace")
    folder = str(Path(path).parent) if relative else word.folder
    yield from _expand(list(split(text, path, folder, os.environ)), (*open_lists, path))


def read_bytes(word: Word, path: str, what: str) -> bytes:
    """Read a file that the user named, or say why that is impossible.

    Raises:
        UserError: missing, a folder, unreadable, or no text.
    """
    try:
        data = Path(path).read_bytes()
    except FileNotFoundError:
        raise word.error(
            f"no such {what}: {path}",
            "check the path; paths in a -f list start from the working folder, in a -F list from the list's own folder",
        ) from None
    except IsADirectoryError:
        raise word.error(f"{path} is a folder, not a {what}", "name the files in it") from None
    except OSError as reason:
        raise word.error(f"cannot read the {what} {path}: {reason.strerror}", "check its permissions") from None
    if b"\0" in data:
        raise word.error(f"{path} is no text: it holds a zero byte", "UTF-16 and binary files are not read")
    return data


@dataclass
class _Splitter:
    """Split one list; the position moves through `text`."""

    text: str
    environment: Mapping[str, str]
    at: int = 0

    def skip_blanks(self) -> None:
        """Move over white space and comments."""
        while self.at < len(self.text):
            if self.text[self.at].isspace():
                self.at += 1
            elif self.text[self.at] == "#" or self.text.startswith("//", self.at):
                self._skip_to("\n")
            elif self.text.startswith("/*", self.at):
                self._skip_to("*/")
            else:
                return

    def _skip_to(self, end: str) -> None:
        found = self.text.find(end, self.at)
        self.at = len(self.text) if found < 0 else found + len(end)

    def word(self) -> str:
        """Read one word: quotes, backslashes and environment variables resolved."""
        plain = _PLAIN.match(self.text, self.at)
        if plain:
            self.at = plain.end()
            return plain[0]
        parts: list[str] = []
        while self.at < len(self.text) and not self.text[self.at].isspace():
            parts.append(self._piece())
        return "".join(parts)

    def _piece(self) -> str:
        piece = _PIECE.match(self.text, self.at)
        if piece:
            self.at = piece.end()
            return piece[0]
        character = self.text[self.at]
        self.at += 1
        if character == "\\":
            return self._escaped()
        if character == "$":
            return self._variable()
        return self._quoted(character) if character in "\"'" and self._closes(character) else character

    def _closes(self, quote: str) -> bool:
        """Tell a quotation from the lone quote of a number such as 8'h1A."""
        return quote == '"' or self.text.find("'", self.at, self._line_end()) >= 0

    def _line_end(self) -> int:
        found = self.text.find("\n", self.at)
        return len(self.text) if found < 0 else found

    def _escaped(self) -> str:
        self.at += 1
        return self.text[self.at - 1 : self.at]

    def _variable(self) -> str:
        match = _VARIABLE.match(self.text, self.at - 1)
        if match is None:
            return "$"
        self.at = match.end()
        return self.environment.get(match[match.lastindex or 0], "")

    def _inside(self, character: str) -> str:
        """Resolve what double quotes leave its meaning."""
        if character == "\\":
            return self._escaped()
        return self._variable() if character == "$" else character

    def _quoted(self, quote: str) -> str:
        parts: list[str] = []
        while self.at < len(self.text) and self.text[self.at] != quote:
            character = self.text[self.at]
            self.at += 1
            parts.append(self._inside(character) if quote == '"' else character)
        self.at += 1
        return "".join(parts)


def split(text: str, path: str, folder: str, environment: Mapping[str, str]) -> Iterator[Word]:
    """Split the text of a list into words.

    Args:
        text: what the list holds.
        path: of the list, for messages.
        folder: where relative paths in it start.
        environment: variables for `$NAME`, `$(NAME)` and `${NAME}`.
    """
    splitter = _Splitter(text, environment)
    lines = text.splitlines()
    while True:
        splitter.skip_blanks()
        start = splitter.at
        if start >= len(text):
            return
        line = text.count("\n", 0, start) + 1
        column = start - text.rfind("\n", 0, start)
        yield Word(splitter.word(), folder, Place(path, line, column, lines[line - 1]))
