"""What the user can choose about the text of a rewrite."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from rewriter.model.rewrite import TestPin


@dataclass(frozen=True)
class EditOptions:
    """Choose names and pins.

    Args:
        test_port: wanted name of the test override; `test_en_2`, … where it is taken.
        test_pins: existing pins that carry the override instead of a new port.
        cells: name -> text of the wrapper modules (see cells.render_cells); they go into the rewrite as they are.
    """

    test_port: str = "test_en"
    test_pins: tuple[TestPin, ...] = ()
    cells: Mapping[str, str] = field(default_factory=dict[str, str])
