"""`stillclock rewrite`: find, settle, choose, edit, prove, write."""

import os
from dataclasses import dataclass
from pathlib import Path
from typing import Unpack

import click

from rewriter import flow
from rewriter.cli import console, options
from rewriter.cli.arguments import RtlCommand, rtl_arguments
from rewriter.model.reasons import Verdict
from rewriter.model.run import Run
from rewriter.report import document, text
from rewriter.report.diff import unified
from rewriter.report.folder import guard
from rewriter.report.output import guard_cell_file, write_folder, write_in_place

_OPEN = {"undecided", "not-checked"}


class Wishes(options.Gating):
    """All options of the command."""

    out: Path | None
    in_place: bool
    cell_file: Path | None
    diff: bool
    check: bool
    strict: bool
    prove: bool
    allow_unproved: bool
    form: str


@dataclass(frozen=True)
class Sink:
    """Where the change goes: a folder, the sources, or nowhere."""

    out: Path | None
    in_place: bool
    cell_file: Path | None
    diff: bool
    check: bool

    @property
    def writes(self) -> bool:
        """Say whether files change."""
        return self.out is not None or self.in_place

    def validate(self) -> None:
        """Reject options that contradict each other, and destinations that cannot be, before the long work."""
        if self.out is not None and self.in_place:
            raise click.UsageError("--out and --in-place are two destinations; give one")
        if self.check and self.writes:
            raise click.UsageError("--check takes no destination: it changes nothing")
        if self.in_place and self.cell_file is None:
            raise click.UsageError("--in-place needs --cell-file PATH, the file that gets the gating cell")
        if self.cell_file is not None and not self.in_place:
            raise click.UsageError("--cell-file goes with --in-place; --out writes the cell to DIR/cell")
        if self.out is not None:
            guard(self.out)
        if self.cell_file is not None:
            guard_cell_file(self.cell_file)


@click.command("rewrite", cls=RtlCommand, short_help="Gate the banks, prove them, write the RTL.")
@click.option("--out", type=click.Path(path_type=Path), metavar="DIR", help="Write the rewritten RTL to DIR.")
@click.option("--in-place", is_flag=True, help="Edit the sources.")
@click.option(
    "--cell-file", type=click.Path(path_type=Path), metavar="PATH", help="With --in-place: where the cell goes."
)
@click.option("--diff", is_flag=True, help="Print the unified diff; with --out, --in-place or --check, too.")
@click.option("--check", is_flag=True, help="Change nothing; exit 1 when there would be a change.")
@click.option("--strict/--no-strict", help="Exit 1 when a register was refused, 3 when one was left undecided.")
@click.option("--prove/--no-prove", default=True, help="Prove every bank (the default).")
@click.option("--allow-unproved/--no-allow-unproved", help="Keep banks that are not proved, though not disproved.")
@options.format_option
@options.gating_options
@click.pass_context
def command(ctx: click.Context, **wishes: Unpack[Wishes]) -> None:
    """Gate the banks, prove them, write the RTL.

    With neither --out nor --in-place it is a dry run that prints the diff. A bank that is disproved or
    undecided is left out with a warning.
    """
    sink = Sink(wishes["out"], wishes["in_place"], wishes["cell_file"], wishes["diff"], wishes["check"])
    sink.validate()
    job = options.job(rtl_arguments(ctx), wishes, prove=wishes["prove"], allow_unproved=wishes["allow_unproved"])
    if sink.writes and not job.prove and not job.allow_unproved:
        raise click.UsageError("--no-prove writes nothing unless --allow-unproved is given, too")
    with console.progress() as progress:
        run = flow.rewrite(job, progress)
    for warning in run.warnings:
        console.note(warning)
    _deliver(run, sink, wishes["form"])
    ctx.exit(_status(run, sink, strict=wishes["strict"]))


def _deliver(run: Run, sink: Sink, form: str) -> None:
    done = run.rewrite
    if done is None:
        raise AssertionError("a rewrite was asked for")
    if sink.out is not None:
        write_folder(run, done, sink.out, flow.verify_folder)
        console.message(f"written: {sink.out}; compile {sink.out}/rtl.f in place of the sources")
    elif sink.cell_file is not None and done.files:
        write_in_place(done, run.design.source, sink.cell_file)
        if done.cell_files and str(sink.cell_file.resolve()) not in run.design.source.by_path:
            console.message("add this line to the file list:")
            console.result(str(sink.cell_file))
    shows = sink.diff or not (sink.writes or sink.check)
    if form == "json":
        body = document.report(run, done) | ({"diff": _diff(run).decode("utf-8", "replace")} if shows else {})
        console.result(document.render(body))
    elif shows:
        console.result_bytes(_diff(run))
    console.message(text.rewrite(run))


def _diff(run: Run) -> bytes:
    return unified(run.rewrite, _shown) if run.rewrite else b""


def _shown(path: str) -> str:
    """Show a path from the working folder where it lies below it, so that `patch -p1` finds the file."""
    below = os.path.relpath(path)
    return path.lstrip("/") if below.startswith("..") else below


def _status(run: Run, sink: Sink, *, strict: bool) -> int:
    changes = run.rewrite is not None and bool(run.rewrite.files)
    words = {refusal.reason.word for refusal in run.plan.refusals if refusal.verdict is Verdict.REFUSED}
    if (sink.check and changes) or (strict and words - _OPEN):
        return 1
    return 3 if strict and (words or run.unproved_banks) else 0
