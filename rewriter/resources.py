"""The files that ship with the program: templates and simulation sources."""

from importlib.resources import files
from importlib.resources.abc import Traversable
from pathlib import Path

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


def _shipped(name: str) -> Traversable:
    # A checkout (also behind an editable install) is preferred: its files are the ones being edited.
    if (_CHECKOUT / "pyproject.toml").is_file() and (_CHECKOUT / name).is_dir():
        return _CHECKOUT / name
    return files("rewriter").joinpath("_data", name)
