"""RTL arguments, opened up: lists expanded, paths absolute, every option in its place."""

import glob
from collections.abc import Callable, Sequence
from dataclasses import dataclass, field
from functools import cache
from pathlib import Path

from pyslang.driver import CommandLineOptions, Driver

from rewriter.frontend.command_files import Word, expand
from rewriter.frontend.diagnostics import captured_stderr
from rewriter.model.errors import UserError
from rewriter.model.source import RtlSource

_ALIASES = {
    "--include-directory": "-I",
    "--define-macro": "-D",
    "--undefine-macro": "-U",
    "--libfile": "-v",
    "--libdir": "-y",
    "--libext": "-Y",
    "-top": "--top",
}
_SHORT = ("-I", "-D", "-U", "-G", "-v", "-y", "-Y")
_OWN = {*_SHORT, "--top", "--isystem", "-C"}
_PLUS = {"incdir": "-I", "define": "-D", "libext": "-Y"}
_WILD = ("*", "?", "...")


@dataclass
class Opened:
    """Hold opened-up arguments; words are kept with the files so that errors can point at them."""

    files: list[tuple[str, Word]] = field(default_factory=list[tuple[str, Word]])
    library_files: list[tuple[str, Word]] = field(default_factory=list[tuple[str, Word]])
    library_dirs: list[str] = field(default_factory=list[str])
    library_extensions: list[str] = field(default_factory=list[str])
    include_dirs: list[str] = field(default_factory=list[str])
    defines: list[str] = field(default_factory=list[str])
    undefines: list[str] = field(default_factory=list[str])
    tops: list[str] = field(default_factory=list[str])
    parameters: list[str] = field(default_factory=list[str])
    options: list[str] = field(default_factory=list[str])


def open_arguments(arguments: Sequence[str], folder: str) -> Opened:
    """Sort the arguments, lists included.

    Args:
        arguments: as given on the command line.
        folder: absolute path that relative paths start from.

    Raises:
        UserError: a list is missing or recursive, an option lacks its value, there is no file.
    """
    opened = Opened()
    words = expand(arguments, folder)
    position = 0
    while position < len(words):
        position += _take(words, position, opened)
    if not opened.files:
        raise UserError("no RTL file is given", help="name the files, or a file list with -f")
    return opened


def _take(words: list[Word], position: int, opened: Opened) -> int:
    """Sort the word at `position`; give the number of words used up."""
    word = words[position]
    if word.text.startswith("+"):
        _take_plus(word, opened)
        return 1
    if not word.text.startswith("-"):
        opened.files += _files(word)
        return 1
    name, value = _split_option(word.text)
    used = 1
    if value is None and (name in _OWN or _needs_value(name)):
        if position + 1 == len(words):
            raise word.error(f"{name} needs a value", "see the option in slang's manual")
        word, used = words[position + 1], 2
        value = word.text
    if name in _OWN:
        _store(name, value or "", word, opened)
    else:
        opened.options += [name] if value is None else [f"{name}={value}"] if used == 1 else [name, value]
    return used


def _split_option(text: str) -> tuple[str, str | None]:
    """Split `--name=value`, `-Ivalue` and `-I=value`; the value is None when it is the next word."""
    for short in _SHORT:
        if text.startswith(short) and len(text) > len(short):
            return short, text[len(short) :].removeprefix("=")
    name, equals, value = text.partition("=")
    return _ALIASES.get(name, name), value if equals else None


def _take_plus(word: Word, opened: Opened) -> None:
    name, _, rest = word.text[1:].partition("+")
    if name not in _PLUS:
        opened.options.append(word.text)
        return
    for value in rest.split("+"):
        if value:
            _store(_PLUS[name], value, word, opened)


def _store(name: str, value: str, word: Word, opened: Opened) -> None:
    if name == "-C":
        raise word.error("-C (a list that is a unit of its own) is not supported", "use -f or -F")
    stores: dict[str, Callable[[], None]] = {
        "-I": lambda: opened.include_dirs.extend(_paths(word, value)),
        "-D": lambda: opened.defines.append(value),
        "-U": lambda: opened.undefines.append(value),
        "-G": lambda: opened.parameters.append(value),
        "--top": lambda: opened.tops.extend(part for part in value.split(",") if part),
        "-v": lambda: opened.library_files.extend((path, word) for path in _paths(word, value.rpartition("=")[2])),
        "-y": lambda: opened.library_dirs.extend(_paths(word, value)),
        "-Y": lambda: opened.library_extensions.extend(part for part in value.split(",") if part),
        "--isystem": lambda: opened.options.extend(("--isystem", ",".join(_paths(word, value)))),
    }
    stores[name]()


def _paths(word: Word, value: str) -> list[str]:
    return [word.path(part) for part in value.split(",") if part]


def _files(word: Word) -> list[tuple[str, Word]]:
    path = word.path()
    if not any(mark in word.text for mark in _WILD) or Path(path).exists():
        return [(path, word)]
    found = sorted(glob.glob(path.replace("...", "**"), recursive=True))  # noqa: PTH207 (absolute patterns)
    if not found:
        raise word.error(f"no file matches {word.text}", "check the pattern")
    return [(word.path(name), word) for name in found if Path(name).is_file()]


@cache
def _needs_value(name: str) -> bool:
    """Ask slang itself whether an option takes its value from the next word."""
    with captured_stderr() as captured:
        _parse(Driver(), [name])
    return any(message.startswith("no value provided") for message in captured.messages("error"))


def _parse(driver: Driver, words: Sequence[str]) -> bool:
    driver.addStandardArgs()
    options = CommandLineOptions()
    options.ignoreProgramName = True
    return driver.parseCommandLine(" ".join(map(_quote, words)), options)


def _quote(word: str) -> str:
    return '"' + word.replace("\\", "\\\\").replace('"', '\\"') + '"'


def configure(driver: Driver, words: Sequence[str]) -> list[str]:
    """Give slang's driver its arguments; give the warnings it printed.

    Raises:
        UserError: slang does not know an option or a value; its own words.
    """
    with captured_stderr() as captured:
        fine = _parse(driver, words) and driver.processOptions()
    if not fine:
        errors = captured.messages("error")
        message = errors[0] if errors else "slang refused the arguments"
        raise UserError(message, help="see slang's manual for its options")
    return captured.messages("warning")


def slang_words(source: RtlSource, library_dirs: Sequence[str] = (), extensions: Sequence[str] = ()) -> list[str]:
    """Write opened-up arguments as a command line for slang, independent of the working folder."""
    words = list(source.options)
    for name, values in (
        ("--top", source.tops),
        ("-G", source.parameters),
        ("-D", source.defines),
        ("-U", source.undefines),
        ("-I", source.include_dirs),
        ("-y", library_dirs),
        ("--libext", extensions),
        ("-v", source.library_files),
    ):
        for value in values:
            words += [name, value]
    return words + list(source.files)
