"""Edit the sources where they stand, all of them or none."""

import os
import tempfile
from collections.abc import Mapping
from pathlib import Path

from rewriter.model.errors import UserError


def replace_files(files: Mapping[Path, bytes]) -> None:
    """Replace the bytes of files, all or none; modes stay.

    New bytes are written beside each file first, since a full disk shows then; only renames follow. What was
    renamed before a failure is put back.

    Raises:
        UserError: a file cannot be written; nothing has changed.
    """
    ready: dict[Path, Path] = {}
    former: dict[Path, bytes | None] = {}
    try:
        for path, data in files.items():
            # A symbolic link stays one: the file it points at is edited.
            target = path.resolve()
            former[target] = target.read_bytes() if target.exists() else None
            ready[target] = _beside(target, data)
        for target, new in ready.items():
            new.replace(target)
    except BaseException as failure:
        _undo(ready, former)
        if isinstance(failure, OSError):
            name = failure.filename or "a source"
            raise UserError(
                f"{name}: cannot be written: {failure.strerror}", help="nothing was changed; use --out DIR instead"
            ) from None
        raise


def _beside(target: Path, data: bytes) -> Path:
    if target.exists() and not os.access(target, os.W_OK):
        raise PermissionError(13, os.strerror(13), str(target))
    handle, name = tempfile.mkstemp(prefix=f".{target.name}.", dir=target.parent)
    new = Path(name)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(data)
        new.chmod(target.stat().st_mode if target.exists() else 0o644)
    except BaseException:
        new.unlink(missing_ok=True)
        raise
    return new


def _undo(ready: Mapping[Path, Path], former: Mapping[Path, bytes | None]) -> None:
    for target, new in ready.items():
        if new.exists():
            new.unlink()
            continue
        old = former[target]
        if old is None:
            target.unlink(missing_ok=True)
        else:
            target.write_bytes(old)
