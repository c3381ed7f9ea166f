"""Temporaries of a block: who needs their values, and where they may be computed."""

import re
from collections import Counter
from collections.abc import Callable, Iterable
from dataclasses import dataclass
from functools import cached_property

from rewriter.edit.skeleton import local_declaration
from rewriter.edit.text import Page, word_counts
from rewriter.model.design import ClockedBlock, ConnectionStyle, Definition, Module
from rewriter.model.source import SourceText
from rewriter.model.statement import Assign, Block, Case, If, Loop, Opaque, Statement, Target

_DEFINE = re.compile(r"`define\b(?:\\\r?\n|[^\n])*")


@dataclass(frozen=True)
class Temporaries:
    """The variables that a block writes with `=`, loop variables included.

    Args:
        page: file of the block.
        definition: whose text holds it.
        module, block: a body that holds it.
        macro_words: every word in the text of some macro.
    """

    page: Page
    definition: Definition
    module: Module
    block: ClockedBlock
    macro_words: frozenset[str]

    @cached_property
    def written(self) -> frozenset[str]:
        """Give the paths of all of them."""
        return frozenset(t.variable for t in self._targets()) | self._loops

    @cached_property
    def local(self) -> frozenset[str]:
        """Give those that the block declares itself: they come along with their declarations."""
        inside = frozenset(target.variable for target in self._targets() if target.is_local)
        return inside | (self._loops & self.declared_inside)

    @cached_property
    def declared_inside(self) -> frozenset[str]:
        """Give the paths of what some begin-end of the block declares."""
        blocks = (s for s in self.block.body.walk() if isinstance(s, Block))
        return frozenset(name for block in blocks for declaration in block.declarations for name in declaration.names)

    @cached_property
    def private(self) -> frozenset[str]:
        """Give those of the module that no other text mentions, so that they may be computed on any clock."""
        if any(instance.style is ConnectionStyle.WILDCARD for instance in self.definition.instances):
            return frozenset()
        return frozenset(path for path in self.written - self.local if self._is_private(path))

    @cached_property
    def _loops(self) -> frozenset[str]:
        return frozenset(n for s in self.block.body.walk() if isinstance(s, Loop) for n in s.outer_variables)

    @cached_property
    def _mentioned(self) -> Counter[str]:
        """Count the words of the definition outside the block."""
        span = self.definition.span
        before = self.page.data[span.start : self.block.span.start]
        return word_counts(before) + word_counts(self.page.data[self.block.span.end : span.end])

    def _is_private(self, path: str) -> bool:
        variable, name = self.module.variables.get(path), simple(path)
        if variable is None or variable.is_port or variable.is_net or self.definition.span.file != self.page.path:
            return False
        outside = any(n == path or n.startswith(f"{path}.") for n in self.module.external_references)
        only_declared = self._mentioned[name] == 1
        return only_declared and not outside and name not in self.macro_words

    def _targets(self) -> Iterable[Target]:
        return (target for s in self.block.body.walk() if isinstance(s, Assign) and s.blocking for target in s.targets)

    def closure(self, prune: Callable[[frozenset[str]], Statement | None], start: Iterable[str]) -> frozenset[str]:
        """Give the temporaries that a pruned block needs.

        Args:
            prune: gives the block with the assignments of given temporaries.
            start: those that are needed in any case.
        """
        needed = frozenset(start)
        while True:
            pruned = prune(needed)
            reads = frozenset[str]().union(*(reads_of(s) for s in pruned.walk())) if pruned else frozenset[str]()
            more = needed | (reads & self.written)
            if more == needed:
                return needed
            needed = more

    def declarations(self, paths: Iterable[str]) -> dict[str, str]:
        """Declare variables of the module anew, by name.

        Raises:
            CannotEditError: `not-copyable`, a type is not known.
        """
        wanted = sorted(path for path in paths if path not in self.local)
        return {simple(path): local_declaration(self.module.variables.get(path), path) for path in wanted}


def simple(path: str) -> str:
    """Give a variable's name without its scope."""
    return path.rsplit(".", 1)[-1]


def macro_words(texts: Iterable[SourceText]) -> frozenset[str]:
    """Give every word in the text of some macro."""
    return frozenset(
        word for text in texts for found in _DEFINE.finditer(Page(text).data) for word in word_counts(found[0])
    )


def feeds(statement: Assign, needed: frozenset[str]) -> bool:
    """Say whether an assignment computes one of some temporaries."""
    return statement.blocking and any(target.variable in needed for target in statement.targets)


def reads_of(statement: Statement) -> frozenset[str]:
    """Give what a statement itself reads, the statements below it left aside."""
    match statement:
        case If():
            return statement.condition.reads()
        case Case():
            labels = (label.reads() for item in statement.items for label in item.labels)
            return statement.selector.reads().union(*labels)
        case Loop():
            return statement.reads | frozenset(statement.outer_variables)
        case Assign():
            indices = (index.reads() for target in statement.targets for index in target.indices)
            return statement.rhs.reads().union(*indices)
        case Opaque():
            return statement.reads.union(*(index.reads() for target in statement.writes for index in target.indices))
        case _:
            return frozenset()
