"""`stillclock survey`: what holds, and when it must wake."""

from typing import Unpack

import click

from rewriter import flow
from rewriter.cli import console, options
from rewriter.cli.arguments import RtlCommand, rtl_arguments
from rewriter.report import document, text


@click.command("survey", cls=RtlCommand, short_help="Say what holds, and when it must wake.")
@options.format_option
@click.option("--prove", is_flag=True, help="Prove the wake conditions; nothing is written.")
@options.gating_options
@click.pass_context
def command(ctx: click.Context, form: str, *, prove: bool, **wishes: Unpack[options.Gating]) -> None:
    """Say what holds, and when it must wake.

    Rows by cell, then registers that are not gated, by reason; totals by method and module. Without --prove
    no engine runs, and the conditions are marked unproved.
    """
    job = options.job(rtl_arguments(ctx), wishes, prove=prove)
    with console.progress() as progress:
        run = flow.survey(job, progress)
    for warning in run.warnings:
        console.note(warning)
    if form == "json":
        console.result(document.render(document.survey(run)))
    else:
        console.result(text.survey(run, console.heading()))
