"""`stillclock prove`: a finished rewrite against its original, or RTL with our cells against itself."""

from pathlib import Path
from typing import Unpack

import click

from rewriter import flow
from rewriter.cli import console, options
from rewriter.cli.arguments import RtlCommand, rtl_arguments
from rewriter.model.evidence import ProofResult
from rewriter.model.reasons import EvidenceKind
from rewriter.report import document, text


@click.command("prove", cls=RtlCommand, short_help="Prove a finished rewrite, or RTL that holds our cells.")
@options.format_option
@options.limit_options
@options.settings_option
@click.pass_context
def command(ctx: click.Context, form: str, **limits: Unpack[options.Bounds]) -> None:
    """Prove a finished rewrite, or RTL that holds our cells.

    With the output folder of `rewrite`: its RTL against the original, from the files alone. With RTL that
    holds the cells: against itself with the cells transparent, so that a register added to a gated block by
    hand cannot break silently.
    """
    arguments = rtl_arguments(ctx)
    bounds = options.limits(limits)
    with console.progress() as progress:
        if len(arguments) == 1 and Path(arguments[0]).is_dir():
            proved = flow.prove_folder(Path(arguments[0]), bounds, progress)
        else:
            proved = flow.prove_rtl(arguments, bounds, progress)
    for warning in proved.warnings:
        console.note(warning)
    if form == "json":
        console.result(document.render(document.proof(proved.result)))
    else:
        console.result(text.proof(proved.result, proved.top))
    ctx.exit(_status(proved.result))


def _status(result: ProofResult) -> int:
    if result.mismatches or any(cell.kind is EvidenceKind.DISPROVED for cell in result.cells):
        return 1
    return 0 if result.proved else 3
