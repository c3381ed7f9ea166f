"""The output folder: built beside its place, then put there in one step."""

import ctypes
import json
import os
import shutil
import tempfile
from collections.abc import Callable, Mapping
from pathlib import Path
from typing import Any

from rewriter.model.errors import UserError
from rewriter.model.source import RtlSource
from rewriter.report.document import FAMILY

REPORT = "report.json"

_EXCHANGE = 2  # RENAME_EXCHANGE of renameat2(2)
_HERE = -100  # AT_FDCWD


def guard(folder: Path) -> Path:
    """Check, before the long work, that an output folder may be written.

    Returns:
        The folder's absolute path, symbolic links followed.

    Raises:
        UserError: it is something else's, or cannot be written.
    """
    place = folder.resolve()
    if place.exists() and not is_ours(place):
        raise UserError(
            f"{folder}: exists, and is not an output folder of stillclock",
            help="name a new folder, or an earlier --out",
        )
    parent = next(above for above in place.parents if above.exists())
    if not parent.is_dir():
        raise UserError(f"{folder}: {parent} is not a folder", help="name a folder that can be made")
    if not os.access(parent, os.W_OK | os.X_OK):
        raise UserError(f"{folder}: no permission to write in {parent}", help="name another folder")
    return place


def guard_sources(folder: Path, source: RtlSource) -> None:
    """Check that no source would be replaced along with an output folder.

    Raises:
        UserError: a source stands in it.
    """
    place = folder.resolve()
    for text in source.texts:
        if Path(text.path).resolve().is_relative_to(place):
            raise UserError(
                f"{folder}: the source {text.path} stands in the output folder",
                help="name another folder: this one would be replaced as a whole",
            )


def is_ours(folder: Path) -> bool:
    """Say whether a folder is empty, or holds a report of ours."""
    if not folder.is_dir():
        return False
    if not any(folder.iterdir()):
        return True
    try:
        report: Any = json.loads((folder / REPORT).read_bytes())
    except (OSError, ValueError):
        return False
    return isinstance(report, dict) and str(report.get("schema", "")).startswith(FAMILY)  # pyright: ignore[reportUnknownMemberType, reportUnknownArgumentType]


def write(place: Path, files: Mapping[str, bytes], verify: Callable[[Path], None]) -> None:
    """Write an output folder, whole or not at all.

    Args:
        place: what `guard` gave.
        files: bytes by path below the folder.
        verify: looks at the finished folder before it takes its place; what it raises leaves the former one.

    Raises:
        UserError: the system would not let it be written.
    """
    try:
        place.parent.mkdir(parents=True, exist_ok=True)
        built = Path(tempfile.mkdtemp(prefix=f".{place.name}.", dir=place.parent))
    except OSError as error:
        raise _failure(place, error) from None
    try:
        for name, data in files.items():
            _write_file(built, name, data)
        built.chmod(0o777 & ~_umask())
        verify(built)
        _put(built, place)
    except OSError as error:
        raise _failure(place, error) from None
    finally:
        # Holds what was built when something went wrong, and the former folder when all went well.
        shutil.rmtree(built, ignore_errors=True)


def _failure(place: Path, error: OSError) -> UserError:
    return UserError(f"{place}: cannot be written: {error.strerror}", help="nothing was changed; name another folder")


def _write_file(folder: Path, name: str, data: bytes) -> None:
    path = folder / name
    # Names come from the RTL's own paths; none may lead out of the folder.
    if not path.resolve().is_relative_to(folder.resolve()):
        raise UserError(f"{name}: leads out of the output folder", help="give the sources by plain paths")
    path.parent.mkdir(parents=True, exist_ok=True)
    path.write_bytes(data)


def _umask() -> int:
    mask = os.umask(0)
    os.umask(mask)
    return mask


def _put(built: Path, place: Path) -> None:
    """Put the new folder in its place in one step of the system, so that there is no moment without a folder."""
    if not place.exists():
        built.rename(place)
    elif not _exchange(built, place):
        old = built.with_name(f"{built.name}.old")
        place.rename(old)
        try:
            built.rename(place)
        except BaseException:
            old.rename(place)
            raise
        shutil.rmtree(old, ignore_errors=True)


def _exchange(one: Path, other: Path) -> bool:
    """Swap two folders; says no where the system or the file system cannot."""
    renameat2 = getattr(ctypes.CDLL(None, use_errno=True), "renameat2", None)
    if renameat2 is None:
        return False
    return renameat2(_HERE, os.fsencode(one), _HERE, os.fsencode(other), _EXCHANGE) == 0
