"""Read small designs from strings."""

from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import TypeVar

import pytest

from rewriter.frontend import read
from rewriter.model.design import ClockedBlock, Design, Module
from rewriter.model.source import Span
from rewriter.model.statement import Statement

S = TypeVar("S", bound=Statement)


@dataclass(frozen=True)
class Sample:
    """A design with short ways to look at it."""

    design: Design

    @property
    def top(self) -> Module:
        return self.design.modules[0]

    @property
    def block(self) -> ClockedBlock:
        return self.top.blocks[0]

    def module(self, definition: str) -> Module:
        return next(m for m in self.design.modules if m.definition == definition)

    def text(self, span: Span) -> str:
        return self.design.source.by_path[span.file].slice(span).decode("latin-1")

    def reasons(self, block: int = 0) -> tuple[str, ...]:
        return tuple(trap.reason for trap in self.top.blocks[block].traps)

    def first(self, kind: type[S], block: int = 0) -> S:
        return next(s for s in self.top.blocks[block].body.walk() if isinstance(s, kind))

    def all(self, kind: type[S], block: int = 0) -> list[S]:
        return [s for s in self.top.blocks[block].body.walk() if isinstance(s, kind)]


Reader = Callable[..., Sample]


@pytest.fixture
def sample(tmp_path: Path) -> Reader:
    """Write a text to a file and read it."""

    def make(text: str | bytes, *options: str, name: str = "t.sv") -> Sample:
        path = tmp_path / name
        path.write_bytes(text if isinstance(text, bytes) else text.encode())
        return Sample(read([str(path), *options], str(tmp_path)))

    return make
