"""File lists: the original one opened up, and the one that replaces it."""

import re
from collections.abc import Iterator

from rewriter.model.errors import UserError
from rewriter.model.source import RtlSource

_PLAIN = re.compile(r"[A-Za-z0-9_./+=:,@%^~-]+\Z")
_EXPANDED = re.compile(r"\$(?:[A-Za-z_({])")


def render(source: RtlSource, title: str) -> str:
    """Write RTL arguments as a file list that slang, and other tools for the common forms, can read.

    Raises:
        UserError: a name holds text that a file list cannot carry.
    """
    return "".join(f"{line}\n" for line in (f"// {title}", *_entries(source)))


def _entries(source: RtlSource) -> Iterator[str]:
    yield from (_word(f"+incdir+{folder}") for folder in source.include_dirs)
    yield from (_word(f"+define+{define}") for define in source.defines)
    yield from (f"-U {_word(name)}" for name in source.undefines)
    yield from _options(source.options)
    yield from (f"-G {_word(parameter)}" for parameter in source.parameters)
    yield from (f"--top {_word(top)}" for top in source.tops)
    yield from (f"-v {_word(file)}" for file in source.library_files)
    yield from (_word(file) for file in source.files)


def _options(options: tuple[str, ...]) -> Iterator[str]:
    """Yield one line per option, its value beside it."""
    line: list[str] = []
    for option in options:
        if option.startswith(("-", "+")) and line:
            yield " ".join(line)
            line = []
        line.append(_word(option))
    if line:
        yield " ".join(line)


def _word(text: str) -> str:
    """Quote a word where it needs it."""
    if _EXPANDED.search(text) or not text.isprintable():
        # slang expands variables in lists, and knows no way to write a dollar sign that is none.
        raise UserError(
            f"`{text}` cannot be written into a file list",
            help="rename it: lists expand what follows a dollar sign, and end a word at a line end",
        )
    if _PLAIN.match(text) and "//" not in text:
        return text
    escaped = text.replace("\\", "\\\\").replace('"', '\\"')
    return f'"{escaped}"'
