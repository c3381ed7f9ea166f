"""Errors a user can act on."""

from dataclasses import dataclass

from rewriter.model.source import SourceText, Span


@dataclass(frozen=True)
class Place:
    """Point at a line of a file for a message (1-based line and column)."""

    file: str
    line: int
    column: int
    text: str = ""

    @classmethod
    def of(cls, source: SourceText, span: Span) -> "Place":
        """Make the place of a span."""
        line, column = source.line_column(span.start)
        text = source.data.split(b"\n")[line - 1].decode("utf-8", "replace").rstrip("\r")
        return cls(source.path, line, column, text)


class StillclockError(Exception):
    """Carry a message, a place and a way out; `status` is the exit status."""

    status = 2

    def __init__(self, message: str, *, place: Place | None = None, help: str = "") -> None:  # noqa: A002 (the word shown)
        super().__init__(message)
        self.message = message
        self.place = place
        self.help = help

    def render(self) -> str:
        """Format as `file:line:col: error: message`, the line, a caret, and a `help:` line."""
        head = f"{self.place.file}:{self.place.line}:{self.place.column}: " if self.place else ""
        lines = [f"{head}error: {self.message}"]
        if self.place and self.place.text:
            tabs = "".join("\t" if c == "\t" else " " for c in self.place.text[: self.place.column - 1])
            lines += [self.place.text, f"{tabs}^"]
        if self.help:
            lines.append(f"help: {self.help}")
        return "\n".join(lines)


class UserError(StillclockError):
    """Report bad input or usage (exit status 2)."""


class NoAnswerError(StillclockError):
    """Report that a limit was hit or an outside program is missing (exit status 3)."""

    status = 3


class CompileError(UserError):
    """Report RTL that does not compile; `message` is what slang printed, shown as it is."""

    def render(self) -> str:
        """Give slang's own text, then the help line."""
        return self.message.rstrip("\n") + (f"\nhelp: {self.help}" if self.help else "")
