"""Put a rewrite on disk: as a folder of its own, or over the sources."""

import json
import re
from collections.abc import Callable, Mapping
from pathlib import Path
from typing import Any

from rewriter.model.cells import WRAPPERS
from rewriter.model.errors import UserError
from rewriter.model.rewrite import Rewrite
from rewriter.model.run import Run
from rewriter.model.source import RtlSource
from rewriter.report import document, filelist, folder
from rewriter.report.diff import unified
from rewriter.report.inplace import replace_files
from rewriter.report.moves import Moves, plan_moves

RTL_LIST = "rtl.f"
ORIGINAL_LIST = "original.f"
DIFF = "changes.diff"

Verify = Callable[[Path, Mapping[str, bytes]], None]


def write_folder(run: Run, done: Rewrite, place: Path, verify: Verify) -> None:
    """Write DIR, whole or not at all.

    Args:
        run: what the report tells.
        done: its rewrite.
        place: the folder.
        verify: reads the finished folder before it takes its place; gets the bytes expected of each moved file,
            by path below the folder.

    Raises:
        UserError: the folder cannot be written.
    """
    target = folder.guard(place)
    folder.guard_sources(place, run.design.source)
    moves = plan_moves(run.design.source, done)
    files = folder_files(run, done, moves)
    rtl = {name: data for name, data in files.items() if name.startswith(("rtl/", "cell/"))}
    folder.write(target, files, lambda built: verify(built, rtl))


def folder_files(run: Run, done: Rewrite, moves: Moves) -> dict[str, bytes]:
    """Give the bytes of everything in DIR, by path below it."""
    source = run.design.source
    cells = {f"cell/{name}": text.encode() for name, text in done.cell_files.items()} if done.files else {}
    lists = {
        RTL_LIST: filelist.render(moves.arguments(tuple(cells)), "rewritten by stillclock; read with -F"),
        ORIGINAL_LIST: filelist.render(source, "the original RTL, opened up"),
        folder.REPORT: document.render(document.report(run, done)),
    }
    return {
        **{f"rtl/{moves.below(path)}": moves.data(path) for path in moves.paths},
        **cells,
        **{name: text.encode("utf-8", "surrogateescape") for name, text in lists.items()},
        DIFF: unified(done, moves.below),
    }


def guard_cell_file(cell_file: Path) -> None:
    """Check, before the long work, that a cell file may be written.

    Raises:
        UserError: it is something else's file, or has no folder.
    """
    if not cell_file.parent.is_dir():
        raise UserError(f"{cell_file}: its folder does not exist", help="name a file in a folder that exists")
    if cell_file.exists() and not _is_cell_file(cell_file):
        raise UserError(
            f"{cell_file}: exists, and is no cell file of stillclock", help="name a new file, or an earlier --cell-file"
        )


def _is_cell_file(path: Path) -> bool:
    """Say whether every module of a file is a wrapper of ours."""
    modules = re.findall(rb"^\s*module\s+(\w+)", path.read_bytes(), re.MULTILINE) if path.is_file() else []
    return bool(modules) and all(name.decode() in WRAPPERS.values() for name in modules)


def write_in_place(done: Rewrite, source: RtlSource, cell_file: Path) -> None:
    """Edit the sources, and write the cells into one file; all or nothing.

    Raises:
        UserError: a source is not what was read, or something cannot be written.
    """
    guard_cell_file(cell_file)
    for change in done.files:
        if Path(change.path).read_bytes() != change.old:
            raise UserError(f"{change.path}: changed while stillclock was at work", help="run the command again")
    # A cell file that is a source holds the cells of an earlier rewrite; only new ones come here.
    former = source.by_path.get(str(cell_file.resolve()))
    cells = [*([former.data] if former else []), *(text.encode() for text in done.cell_files.values())]
    new = {cell_file: b"\n".join(cells)} if done.cell_files else {}
    replace_files({**{Path(change.path): change.new for change in done.files}, **new})


def read_report(place: Path) -> Mapping[str, Any]:
    """Read DIR/report.json.

    Raises:
        UserError: the folder is none of ours, or its report is of another version.
    """
    try:
        report: Mapping[str, Any] = json.loads((place / folder.REPORT).read_bytes())
        schema = report["schema"]
    except (OSError, ValueError, KeyError, TypeError):
        raise UserError(
            f"{place}: not an output folder of stillclock", help="give what `rewrite --out` wrote, or RTL"
        ) from None
    if schema != document.SCHEMA:
        raise UserError(
            f"{place}: its report has the format {schema}, this version reads {document.SCHEMA}",
            help="run the rewrite again",
        )
    return report
