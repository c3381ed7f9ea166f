"""The settings file, stillclock.toml: the same names as the options, without the dashes."""

import difflib
import re
import tomllib
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from pathlib import Path
from typing import NoReturn, cast

from rewriter.model.errors import Place, UserError

NAME = "stillclock.toml"

_TOML_PLACE = re.compile(r" \(at (?:line (\d+), column (\d+)|end of document)\)$")


@dataclass(frozen=True)
class _Key:
    """What a setting must be: `says` for the message, `fits` for the check."""

    says: str
    fits: Callable[[object], bool]


def _is_texts(value: object) -> bool:
    return isinstance(value, list) and all(isinstance(item, str) for item in cast("list[object]", value))


def _is_number(value: object) -> bool:
    return isinstance(value, int | float) and not isinstance(value, bool)


_FLAG = _Key("true or false", lambda value: isinstance(value, bool))
_TEXT = _Key("a text in quotes", lambda value: isinstance(value, str) and bool(value))
_TEXTS = _Key('a list of texts, such as ["a", "b"]', _is_texts)
_COUNT = _Key("a whole number", lambda value: isinstance(value, int) and not isinstance(value, bool))
_NUMBER = _Key("a number", _is_number)

KEYS: Mapping[str, _Key] = {
    "allow-unproved": _FLAG,
    "cell-map": _TEXT,
    "min-bits": _COUNT,
    "off": _TEXTS,
    "one-clock-per-variable": _FLAG,
    "query-seconds": _NUMBER,
    "run-seconds": _NUMBER,
    "strict": _FLAG,
    "test-pin": _TEXTS,
    "test-port": _TEXT,
}


def load(path: Path | None) -> dict[str, object]:
    """Read the settings as defaults of the options.

    Args:
        path: the file; None takes stillclock.toml of the working folder, if there is one.

    Returns:
        Values by the option's parameter name (`min_bits`).

    Raises:
        UserError: the file cannot be read, a key is unknown, or a value has the wrong type.
    """
    file = path if path is not None else Path(NAME)
    if path is None and not file.is_file():
        return {}
    text = _read(file)
    values = _parse(file, text)
    for key, value in values.items():
        if key not in KEYS:
            _unknown(file, text, key)
        if not KEYS[key].fits(value):
            raise UserError(f"`{key}` must be {KEYS[key].says}", place=_place(file, text, key))
    return {key.replace("-", "_"): _absolute(file, key, value) for key, value in values.items()}


def _absolute(file: Path, key: str, value: object) -> object:
    """Take the path of a cell map from the folder of the settings; the name of a shipped map stays a name."""
    if key == "cell-map" and (file.parent / str(value)).is_file():
        return str(file.parent / str(value))
    return value


def _read(file: Path) -> str:
    try:
        return file.read_text(encoding="utf-8")
    except UnicodeDecodeError:
        raise UserError(f"{file}: not a text file", help="settings are TOML in UTF-8") from None
    except OSError as error:
        raise UserError(f"{file}: {error.strerror}", help="name a settings file that can be read") from None


def _parse(file: Path, text: str) -> Mapping[str, object]:
    try:
        return tomllib.loads(text)
    except tomllib.TOMLDecodeError as error:
        said = str(error)
        found = _TOML_PLACE.search(said)
        line, column = (int(found[1]), int(found[2])) if found and found[1] else (text.count("\n") + 1, 1)
        raise UserError(
            f"not TOML: {said[: found.start()] if found else said}",
            place=_line(file, text, line, column),
            help="settings are lines such as `min-bits = 8`",
        ) from None


def _unknown(file: Path, text: str, key: str) -> NoReturn:
    near = difflib.get_close_matches(key, KEYS, 1)
    guess = f"did you mean `{near[0]}`? " if near else ""
    raise UserError(
        f"there is no setting `{key}`", place=_place(file, text, key), help=f"{guess}known: {', '.join(KEYS)}"
    )


def _place(file: Path, text: str, key: str) -> Place:
    """Point at a key; TOML's parser does not say where it stood."""
    for number, line in enumerate(text.split("\n"), 1):
        if found := re.match(rf"\s*\[?\s*[\"']?({re.escape(key)})\b", line):
            return _line(file, text, number, found.start(1) + 1)
    return _line(file, text, 1, 1)


def _line(file: Path, text: str, line: int, column: int) -> Place:
    lines = text.split("\n")
    return Place(str(file), line, column, lines[line - 1].rstrip("\r") if line <= len(lines) else "")
