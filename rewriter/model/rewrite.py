"""The rewrite: edits, files, and the cells as they were named in the text."""

from collections.abc import Mapping
from dataclasses import dataclass

from rewriter.model.design import Note
from rewriter.model.plan import RegisterId
from rewriter.model.reasons import Reason
from rewriter.model.source import Span


@dataclass(frozen=True, order=True)
class Edit:
    """Replace the bytes of `span` by `text`.

    Args:
        span: half open; empty for an insertion.
        text: what stands there afterwards.
        banks: for which banks.
        why: `clock`, `cell`, `split`, `test-port`, `test-connection` or `wrap`.
    """

    span: Span
    text: bytes
    banks: tuple[str, ...]
    why: str


@dataclass(frozen=True)
class PlacedCell:
    """A cell as it stands in the rewritten text.

    Args:
        cell: id of the plan's cell; `definition` and `scope` as there.
        instance: name within its scope (`u_icg_q`).
        wake, gclk: names of its wake signal and gated clock.
        wake_text: the wake condition as written.
    """

    cell: str
    definition: str
    scope: str
    instance: str
    wake: str
    gclk: str
    wake_text: str


@dataclass(frozen=True)
class FileChange:
    """Old and new bytes of one file."""

    path: str
    old: bytes
    new: bytes


@dataclass(frozen=True)
class Rewrite:
    """Everything that changes; no file is touched yet.

    Args:
        files: changed files.
        edits: sorted, without overlap; applied to the old bytes they give the new ones.
        cells: placed cells.
        cell_files: name -> text of the wrapper modules.
        test_ports: definition -> name of the input that carries the test override there.
        excluded: registers that could not be edited, with the reason (they go back to choose).
    """

    files: tuple[FileChange, ...]
    edits: tuple[Edit, ...]
    cells: tuple[PlacedCell, ...]
    cell_files: Mapping[str, str]
    test_ports: Mapping[str, str]
    excluded: Mapping[RegisterId, Reason]
    warnings: tuple[Note, ...] = ()


@dataclass(frozen=True)
class TestPin:
    """An existing pin the user named: `MODULE.PORT=scan-enable|test-mode[,active-low]`."""

    __test__ = False

    definition: str
    port: str
    meaning: str
    active_low: bool = False
