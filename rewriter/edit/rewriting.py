"""From a plan to a rewrite."""

from collections.abc import Mapping
from dataclasses import dataclass

from rewriter.edit.apply import apply, arranged
from rewriter.edit.blocks import rewrite_block
from rewriter.edit.options import EditOptions
from rewriter.edit.site import Site, without
from rewriter.edit.text import CannotEditError
from rewriter.edit.thread import Threads, thread
from rewriter.model.design import Design, Note
from rewriter.model.plan import BlockId, Plan, RegisterId
from rewriter.model.reasons import Reason
from rewriter.model.rewrite import Edit, FileChange, Rewrite
from rewriter.model.source import Span


@dataclass(frozen=True)
class _Attempt:
    """Edits of one try, and the blocks that failed."""

    site: Site
    threads: Threads
    edits: tuple[Edit, ...]
    failed: Mapping[BlockId, Reason]


def edit(design: Design, plan: Plan, options: EditOptions) -> Rewrite:
    """Write a plan into the text.

    A block that cannot be edited is left alone with all its banks, and the others are tried again: the
    result is consistent in any case, and `excluded` tells choose what to do without.

    Args:
        design: the original.
        plan: what is to be done.
        options: names, pins and the wrappers' text.

    Raises:
        UserError: a test pin or port name that cannot be.
        EditConflictError: a fault of ours.
    """
    excluded: dict[RegisterId, Reason] = {}
    while True:
        attempt = _attempt(design, plan, options)
        if not attempt.failed:
            return _rewrite(design, attempt, options, excluded)
        for bank in plan.banks:
            if bank.block in attempt.failed:
                excluded |= dict.fromkeys(bank.registers, attempt.failed[bank.block])
        plan = without(plan, frozenset(attempt.failed))


def _attempt(design: Design, plan: Plan, options: EditOptions) -> _Attempt:
    threads = thread(design, (cell.definition for cell in plan.cells), options)
    failed: dict[BlockId, Reason] = {
        block.block: threads.blocked[block.block.definition]
        for block in plan.blocks
        if block.block.definition in threads.blocked
    }
    site = Site(design, plan, threads.expression)
    edits = list(threads.edits)
    for block in sorted(plan.blocks, key=lambda b: b.block.span):
        if failed:
            break  # the rest of the plan is tried again without these
        try:
            edits += rewrite_block(site, block)
        except CannotEditError as error:
            failed[block.block] = Reason(error.word, error.detail, _place(design, error.span or block.block.span))
    return _Attempt(site, threads, tuple(edits), failed)


def _rewrite(design: Design, attempt: _Attempt, options: EditOptions, excluded: Mapping[RegisterId, Reason]) -> Rewrite:
    edits = arranged(attempt.edits)
    old = {path: text.data for path, text in design.source.by_path.items()}
    new = apply(edits, old)
    files = tuple(FileChange(path, old[path], data) for path, data in sorted(new.items()) if data != old[path])
    cells = tuple(attempt.site.placed[cell.id] for cell in attempt.site.plan.cells if cell.id in attempt.site.placed)
    return Rewrite(
        files=files,
        edits=edits,
        cells=cells,
        cell_files=dict(options.cells) if cells else {},
        test_ports=attempt.threads.ports,
        excluded=dict(excluded),
        warnings=(*attempt.threads.warnings, *_generated(design, attempt.site.plan)),
    )


def _generated(design: Design, plan: Plan) -> list[Note]:
    """Warn about files that say they are generated: the next generation would undo the edit."""
    names = sorted({cell.definition for cell in plan.cells if design.definitions[cell.definition].generated})
    files = sorted({design.definitions[name].span.file for name in names})
    return [
        Note("this file says that it is generated; the rewrite is lost when it is made again", path) for path in files
    ]


def _place(design: Design, span: Span) -> str:
    source = design.source.by_path.get(span.file)
    if source is None:
        return span.file
    line, column = source.line_column(span.start)
    return f"{span.file}:{line}:{column}"
