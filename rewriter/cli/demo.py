"""`stillclock demo`: the whole job on the project's own demo design, in a fresh folder."""

from importlib.resources.abc import Traversable
from pathlib import Path

import click

from rewriter import resources
from rewriter.cli import console
from rewriter.model.errors import StillclockError, UserError

LIST = "demo.f"


class DemoStoppedError(StillclockError):
    """Report that a step of the demo did not end well; its own messages stand above."""


@click.command("demo", short_help="Do the whole job on a small design of our own.")
@click.option(
    "--out", type=click.Path(path_type=Path), default=Path("stillclock-demo"), metavar="DIR", show_default=True,
    help="A fresh folder.",
)  # fmt: skip
def command(out: Path) -> None:
    """Do the whole job on a small design of our own, in a fresh folder, and say what to look at."""
    if out.exists():
        raise UserError(f"{out}: exists already", help="name a fresh folder with --out")
    sources = out / "rtl"
    _copy(resources.templates().joinpath("demo"), sources)
    arguments = ["-F", str(sources / LIST)]
    result = out / "gated"
    _step("survey", *arguments)
    _step("rewrite", *arguments, "--out", str(result))
    _step("prove", str(result))
    console.result(_what_to_look_at(sources, result))


def _copy(folder: Traversable, target: Path) -> None:
    try:
        target.mkdir(parents=True)
        for item in folder.iterdir():
            if item.is_file():
                (target / item.name).write_bytes(item.read_bytes())
    except OSError as error:
        raise UserError(
            f"{target}: cannot be written: {error.strerror}", help="name another folder with --out"
        ) from None


def _step(name: str, *arguments: str) -> None:
    """Run one command as the user would type it."""
    from rewriter.cli.main import run  # noqa: PLC0415 (main loads this module)

    console.result(f"\n$ stillclock {name} {' '.join(arguments)}")
    status = run((name, *arguments))
    if status:
        failure = DemoStoppedError(f"the demo stopped at `stillclock {name}`", help="the messages above say why")
        failure.status = status
        raise failure


def _what_to_look_at(sources: Path, result: Path) -> str:
    looks = {
        result / "changes.diff": "the change: every line of it belongs to gating",
        result / "report.json": "every register with its verdict, reason and evidence",
        result / "cell": "the wrapper of the gating cell; without a cell map it stops a synthesis run",
        sources: "the original, unchanged",
    }
    width = max(len(str(path)) for path in looks)
    lines = [f"  {path!s:<{width}}  {what}" for path, what in looks.items()]
    following = ["stillclock explain async-load", f"stillclock rewrite -F {sources / LIST} --cell-map sky130hd --diff"]
    return "\n".join(("", "What to look at", *lines, "What to try next", *(f"  {command}" for command in following)))
