"""The files that ship with the program: templates and simulation sources."""

from functools import cache
from importlib.resources import files
from importlib.resources.abc import Traversable
from pathlib import Path

from jinja2 import Environment, FunctionLoader, StrictUndefined

_CHECKOUT = Path(__file__).resolve().parent.parent


def templates() -> Traversable:
    """Give the folder of templates (cells, cell maps, benches, reports, the demo)."""
    return _shipped("templates")


def sim() -> Traversable:
    """Give the folder of simulation sources (cell models, bench)."""
    return _shipped("sim")


def read(folder: Traversable, *parts: str) -> str:
    """Read a shipped text file.

    Args:
        folder: what `templates` or `sim` gave.
        parts: the path below it, one name each.
    """
    return folder.joinpath(*parts).read_text(encoding="utf-8")


def cell_model(module: str) -> str | None:
    """Give the functional model of a library's cell, if one ships."""
    file = sim().joinpath("cell_models", f"{module}.v")
    return file.read_text(encoding="utf-8") if file.is_file() else None


def render(name: str, **values: object) -> str:
    """Fill in a whole-file template.

    Args:
        name: path below the templates folder, such as `cells/wrapper.v.j2`.
        values: everything the template names; a missing one is an error of ours.
    """
    return _environment().get_template(name).render(values)


@cache
def _environment() -> Environment:
    return Environment(
        loader=FunctionLoader(lambda name: read(templates(), *name.split("/"))),
        undefined=StrictUndefined,
        trim_blocks=True,
        lstrip_blocks=True,
        keep_trailing_newline=True,
        autoescape=False,  # noqa: S701 (the templates make RTL and plain text, no markup)
    )


def _shipped(name: str) -> Traversable:
    # A checkout (also behind an editable install) is preferred: its files are the ones being edited.
    if (_CHECKOUT / "pyproject.toml").is_file() and (_CHECKOUT / name).is_dir():
        return _CHECKOUT / name
    return files("rewriter").joinpath("_data", name)
