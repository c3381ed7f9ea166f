"""Copy the texts of a design to where the engine sees them, and turn its messages back."""

import re
from dataclasses import dataclass, field
from pathlib import Path, PurePosixPath

from rewriter.logic.engine import MOUNT
from rewriter.model.cells import FALLING, PORTS, RISING
from rewriter.model.source import RtlSource

WRAPPERS = (RISING, FALLING)

_INPUTS = ", ".join(f"input wire {name}" for name in (PORTS.clock, PORTS.wake, PORTS.test))
_STUB = f"({_INPUTS}, output wire {PORTS.output}); endmodule"
_WRAPPER = re.compile(rb"\bmodule\s+(%s|%s)\b.*?\bendmodule\b" % (FALLING.encode(), RISING.encode()), re.DOTALL)
_MODULE = re.compile(r"\bmodule\s+(\w+)")
_PLAIN = re.compile(r"[\w./+\-]+\Z")

# Promises to a synthesis tool, not part of what IEEE 1800 says the text does. The engine takes them at their word
# (and, Yosys 0.70, drops the arm of a parallel case that does nothing), so both sides are read without them.
_PROMISE = re.compile(rb"\b(full|parallel)_case\b")

_ASCII = bytes(range(128)) + b"?" * 128
# Options of slang's driver that the engine does not know: it is given stubs for unknown modules.
_NOT_THE_ENGINES = frozenset(("--ignore-unknown-modules",))


@dataclass
class Stage:
    """One side's texts in the work folder.

    Args:
        folder: the work folder.
        side: its name, `gold` or `gate`.
        source: what is staged.
        stubs: modules without source, ports and parameters only.
        mended: declarations whose initial value was dropped, as text.
    """

    folder: Path
    side: str
    source: RtlSource
    stubs: str = ""
    mended: list[str] = field(default_factory=list[str])

    def write(self) -> None:
        """Write the mirrored tree, with the bodies of our own cells left out."""
        found: set[str] = set()
        for text in self.source.texts:
            data = text.data
            if any(name.encode() in data for name in WRAPPERS):
                found.update(name.decode() for name in _WRAPPER.findall(data))
                data = _WRAPPER.sub(_without_body, data)
            data = _PROMISE.sub(_without_promise, _plain(data))
            path = self._path(text.path)
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_bytes(data)
        stubs = self.stubs + "".join(f"\nmodule {name} {_STUB}\n" for name in WRAPPERS if name not in found)
        (self.folder / self.side / "stillclock_stubs.sv").write_text(stubs, encoding="utf-8")
        for directory in self.source.include_dirs:
            self._path(directory).mkdir(parents=True, exist_ok=True)

    def arguments(self, top: str, extra: tuple[str, ...]) -> Path:
        """Write the engine's argument file.

        Args:
            top: top module.
            extra: further options.
        """
        source = self.source
        words = [*extra, "--top", top]
        for name in (*WRAPPERS, *_MODULE.findall(self.stubs)):
            words += ["--blackboxed-module", name]
        for option, values in (("-D", source.defines), ("-U", source.undefines), ("-G", source.parameters)):
            for value in values:
                words += [option, value]
        for directory in source.include_dirs:
            words += ["-I", self.seen(directory)]
        for library in source.library_files:
            words += ["-v", self.seen(library)]
        words += [
            *(option for option in source.options if option not in _NOT_THE_ENGINES),
            *(self.seen(file) for file in source.files),
        ]
        words.append(f"{MOUNT}/{self.side}/stillclock_stubs.sv")
        path = self.folder / f"{self.side}.f"
        path.write_text("\n".join(_quoted(word) for word in words) + "\n", encoding="utf-8")
        return path

    def seen(self, path: str) -> str:
        """Give the path under which the engine sees a file of the design."""
        return f"{MOUNT}/{self.side}{PurePosixPath(path).as_posix()}"

    def readable(self, messages: str) -> str:
        """Turn the engine's paths back into the design's."""
        return re.sub(rf"/?{MOUNT[1:]}/{self.side}(?=/)", "", messages)

    def mend(self, messages: str) -> bool:
        """Drop the initial values of declarations that the engine cannot read, in the copies only.

        An initial value of a variable matters at time 0 alone, and the proof is about clock edges.

        Returns:
            Whether anything was changed.
        """
        changed = False
        for file, line in sorted(_net_initialisers(messages), reverse=True):
            path = self._path(file)
            before = path.read_bytes()
            after = self._without_initialiser(before, line)
            if after != before:
                path.write_bytes(after)
                changed = True
        return changed

    def _without_initialiser(self, data: bytes, line: int) -> bytes:
        for found in _INITIALISED.finditer(data):
            first = data.count(b"\n", 0, found.start()) + 1
            if first <= line <= first + found[0].count(b"\n"):
                self.mended.append(" ".join(found[1].decode("utf-8", "replace").split()))
                return data[: found.start(2)] + b"\n" * found[2].count(b"\n") + data[found.end(2) :]
        return data

    def _path(self, path: str) -> Path:
        return self.folder / self.side / PurePosixPath(path).relative_to("/")


_INITIALISED = re.compile(rb"(?<!automatic )(\b(?:logic|reg|bit|var)\b[^=;]*?)(=[^;]*);")
_MESSAGE = re.compile(rf"^/?{MOUNT[1:]}/\w+(/.*?):(\d+)(?::\d+)?: .*(?:error|ERROR)")


def _net_initialisers(messages: str) -> set[tuple[str, int]]:
    return {
        (found[1], int(found[2]))
        for line in messages.splitlines()
        if "design initialization" in line and (found := _MESSAGE.match(line))
    }


def _plain(data: bytes) -> bytes:
    """Replace the bytes of a text that is no UTF-8 one for one, so that none swallows what follows it."""
    try:
        data.decode("utf-8")
    except UnicodeDecodeError:
        return data.translate(_ASCII)
    return data


def _without_promise(found: re.Match[bytes]) -> bytes:
    return found[1] + b"_cas_"  # same length; an attribute that no tool knows


def _without_body(found: re.Match[bytes]) -> bytes:
    # The line count stays, so that messages keep their places.
    return b"module " + found[1] + b" " + _STUB.encode() + b"\n" * found[0].count(b"\n")


def _quoted(word: str) -> str:
    if _PLAIN.match(word):
        return word
    # Single quotes keep everything, `$` included; a single quote itself needs double ones.
    return '"\'"'.join(f"'{part}'" for part in word.split("'"))
