"""Which files move into the output folder, and what the include path becomes."""

import os
import posixpath
import re
from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import cached_property

from rewriter.model.rewrite import Rewrite
from rewriter.model.source import RtlSource, SourceText

_INCLUDE = re.compile(rb"`include\b[ \t]*(?:\"(?P<quoted>[^\"\n]*)\"|<(?P<angled>[^>\n]*)>|(?P<macro>`\w+))")


@dataclass(frozen=True)
class Moves:
    """The moved files.

    Args:
        source: as read.
        changed: new bytes of the edited files, by path.
        root: nearest common folder of the moved files.
        paths: moved files, sorted: the edited ones, those that include an edited one, and headers that
            a moved file would otherwise find elsewhere.
    """

    source: RtlSource
    changed: Mapping[str, bytes]
    root: str
    paths: tuple[str, ...]

    def below(self, path: str) -> str:
        """Give the path of a moved file or folder below `root`."""
        return posixpath.relpath(path, self.root)

    def data(self, path: str) -> bytes:
        """Give the new bytes of a moved file."""
        return self.changed.get(path, self.source.by_path[path].data)

    @cached_property
    def folders(self) -> tuple[str, ...]:
        """Give the old folders of the moved files."""
        return tuple(sorted({posixpath.dirname(path) for path in self.paths}))

    def arguments(self, cells: tuple[str, ...], prefix: str = "rtl") -> RtlSource:
        """Give the RTL arguments over the output folder; its own paths are relative to it.

        Args:
            cells: paths of the cell files, relative to the output folder.
            prefix: name of the folder of moved files.
        """
        moved = set(self.paths)
        place = {path: posixpath.join(prefix, self.below(path)) for path in self.paths}
        return replace(
            self.source,
            files=(*(place.get(file, file) for file in self.source.files), *cells),
            library_files=tuple(place.get(file, file) for file in self.source.library_files),
            include_dirs=self._include_dirs(moved, prefix),
            texts=(),
        )

    def _include_dirs(self, moved: set[str], prefix: str) -> tuple[str, ...]:
        """Put the new home of each include folder before the old one, and the moved files' old folders last."""
        found: list[str] = []
        for folder in self.source.include_dirs:
            if any(_inside(path, folder) for path in moved):
                found.append(posixpath.normpath(posixpath.join(prefix, self.below(folder))))
            found.append(folder)
        return tuple(dict.fromkeys((*found, *self.folders)))


def plan_moves(source: RtlSource, rewrite: Rewrite) -> Moves:
    """Say which files move."""
    changed = {change.path: change.new for change in rewrite.files}
    includes = {text.path: _included_names(text) for text in source.texts}
    moved = set(changed)
    while True:
        more = _includers(moved, includes, source) | _shadowed(moved, includes, source)
        if more <= moved:
            break
        moved |= more
    folders = {posixpath.dirname(path) for path in moved}
    # An include folder above the common one must not lose the names below it.
    above = {folder for folder in source.include_dirs if any(_inside(path, folder) for path in _headers(moved, source))}
    root = posixpath.commonpath(folders | above) if moved else "/"
    return Moves(source, changed, root, tuple(sorted(moved)))


def _inside(path: str, folder: str) -> bool:
    return path.startswith(folder.rstrip("/") + "/")


def _headers(moved: set[str], source: RtlSource) -> set[str]:
    """Give the moved files that were read because another file includes them."""
    return moved - set(source.files) - set(source.library_files)


def _included_names(text: SourceText) -> tuple[str | None, ...]:
    """Give the names in include directives, active or not; None where a macro gives the name."""
    found = (match["quoted"] or match["angled"] for match in _INCLUDE.finditer(text.data))
    return tuple(name.decode("utf-8", "surrogateescape") if name is not None else None for name in found)


def _includers(moved: set[str], includes: Mapping[str, tuple[str | None, ...]], source: RtlSource) -> set[str]:
    """Give the files that include a moved header, judged by the file's name: one too many does no harm."""
    names = {posixpath.basename(path) for path in moved}
    through_macro = bool(_headers(moved, source))
    return {
        path
        for path, included in includes.items()
        if any(through_macro if name is None else posixpath.basename(name) in names for name in included)
    }


def _shadowed(moved: set[str], includes: Mapping[str, tuple[str | None, ...]], source: RtlSource) -> set[str]:
    """Give headers beside a moved file that it would find elsewhere, once its old folder comes last."""
    found: set[str] = set()
    for path in moved:
        folder = posixpath.dirname(path)
        for name in includes.get(path, ()):
            if name is None:
                continue
            beside = posixpath.normpath(posixpath.join(folder, name))
            if beside in source.by_path and _found_elsewhere(name, beside, moved, source):
                found.add(beside)
    return found


def _found_elsewhere(name: str, beside: str, moved: set[str], source: RtlSource) -> bool:
    others = (*source.include_dirs, *sorted({posixpath.dirname(path) for path in moved}))
    for other in others:
        candidate = posixpath.normpath(posixpath.join(other, name))
        if os.path.exists(candidate):  # noqa: PTH110 (names from the RTL; nothing is opened)
            return not os.path.samefile(candidate, beside)  # noqa: PTH121
    return False
