"""`stillclock explain`: what a word of the reports means."""

import difflib
from textwrap import fill, indent

import click

from rewriter.cli import console
from rewriter.model.errors import UserError
from rewriter.model.reasons import PAGES, ReasonPage, Verdict

_WIDTH = 100
_GROUPS = (
    (Verdict.LEFT, "Left: sound, but not worth a cell or not wanted"),
    (Verdict.REFUSED, "Refused: not shown to be sound"),
    (None, "Methods and evidence"),
)


@click.command("explain", short_help="Say what a word of the reports means.")
@click.argument("word", nargs=-1)
def command(word: tuple[str, ...]) -> None:
    """Say what a reason, method or evidence means, and what to do; without a WORD, list them all."""
    console.result(_page(_find(" ".join(word))) if word else _list())


def _find(word: str) -> ReasonPage:
    # Evidence is shown with spaces (`proved under top`) in reports.
    page = PAGES.get(word.strip().lower().replace(" ", "-").replace("_", "-"))
    if page is None:
        near = ", ".join(f"`{found}`" for found in difflib.get_close_matches(word, PAGES, 3, 0.5))
        raise UserError(
            f"there is no word `{word}`",
            help=f"did you mean {near}?" if near else "`stillclock explain` lists them",
        )
    return page


def _list() -> str:
    width = max(map(len, PAGES))
    parts = [
        "\n".join((title, *(f"  {page.word:<{width}}  {_first_line(page, width)}" for page in _of(verdict))))
        for verdict, title in _GROUPS
    ]
    return "\n\n".join(parts)


def _of(verdict: Verdict | None) -> list[ReasonPage]:
    return [page for page in PAGES.values() if page.verdict is verdict]


def _first_line(page: ReasonPage, width: int) -> str:
    room = _WIDTH - width - 4
    return page.summary if len(page.summary) <= room else page.summary[: room - 1] + "…"


def _page(page: ReasonPage) -> str:
    kind = page.verdict.value if page.verdict else "method or evidence"
    parts = [f"{page.word} ({kind})", fill(page.summary, _WIDTH)]
    if page.example:
        parts.append(f"Example:\n{indent(page.example, '  ')}")
    return "\n\n".join((*parts, fill(f"What to do: {page.what_to_do}", _WIDTH)))
