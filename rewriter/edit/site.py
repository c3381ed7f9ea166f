"""What is known while the blocks of a plan are rewritten."""

from collections.abc import Mapping
from dataclasses import dataclass, field, replace
from functools import cached_property

from rewriter.edit.formula import FormulaWriter, wrapped
from rewriter.edit.names import CELL_FORMS, Names, is_plain, sanitised
from rewriter.edit.skeleton import SkeletonWriter
from rewriter.edit.temporaries import macro_words
from rewriter.edit.text import CannotEditError, Page, copied
from rewriter.model.cells import PORTS, WRAPPERS
from rewriter.model.design import ClockedBlock, Definition, Design, Language, Module
from rewriter.model.plan import Bank, BlockId, Cell, CellRef, Plan
from rewriter.model.rewrite import PlacedCell
from rewriter.model.wake import Skeleton, WakeCondition


@dataclass
class Site:
    """The plan, its names so far, and where everything stands.

    Args:
        design: the original.
        plan: what is to be done.
        test: definition -> expression that carries the test override there.
    """

    design: Design
    plan: Plan
    test: Mapping[str, str]
    names: dict[str, Names] = field(default_factory=dict[str, Names])
    stems: dict[str, str] = field(default_factory=dict[str, str])
    placed: dict[str, PlacedCell] = field(default_factory=dict[str, PlacedCell])

    def __post_init__(self) -> None:
        """Index the plan, and name its cells in the order of the text."""
        self.cells = {cell.id: cell for cell in self.plan.cells}
        self.banks = {bank.name: bank for bank in self.plan.banks}
        self.formulas = FormulaWriter(self.design.source.by_path)
        self._pages: dict[str, Page] = {}
        for cell in sorted(self.plan.cells, key=lambda c: (c.blocks[0].span, c.id)):
            self.stems[cell.id] = self.names_of(cell.definition).reserve(cell.name, CELL_FORMS)

    @cached_property
    def macro_words(self) -> frozenset[str]:
        """Give every word in the text of some macro."""
        return macro_words(self.design.source.texts)

    def page(self, path: str) -> Page:
        """Give the text of a file."""
        if path not in self._pages:
            self._pages[path] = Page(self.design.source.by_path[path])
        return self._pages[path]

    def definition(self, name: str) -> Definition:
        """Give a definition."""
        return self.design.definitions[name]

    def names_of(self, definition: str) -> Names:
        """Give the names of a definition."""
        if definition not in self.names:
            self.names[definition] = Names(self.definition(definition).identifiers)
        return self.names[definition]

    def gclk(self, cell: str) -> str:
        """Give the name of a cell's output."""
        return f"gclk_{self.stems[cell]}"

    def body_of(self, bank: Bank) -> tuple[Module, ClockedBlock]:
        """Find the module body and block in which a bank's condition was read off."""
        where = bank.proposals[0].occurrences[0] if bank.proposals and bank.proposals[0].occurrences else None
        found: list[tuple[Module, ClockedBlock]] = [
            (module, block)
            for module in self.design.modules
            if module.definition == bank.block.definition
            for block in module.blocks
            if block.span == bank.block.span
        ]
        if not found:
            raise KeyError(f"no clocked block at {bank.block.span}")
        exact = [
            (module, block)
            for module, block in found
            if where and module.key == where.module and block.scope == where.scope
        ]
        return (exact or found)[0]

    def fragment(self, cell: Cell, bank: Bank, step: str) -> list[str]:
        """Give the lines that declare a cell, without the place's own indentation, and note it as placed.

        Args:
            cell: to be placed.
            bank: the first one it serves, in whose block the condition is written.
            step: one step of indentation.
        """
        stem = self.stems[cell.id]
        language = self.definition(cell.definition).language
        wake = self._own_condition(cell, bank)
        body, text, branches = self._wake_lines(wake, bank, stem, language, step)
        instance = f"u_icg_{stem}"
        pins = {
            PORTS.clock: self._clock(cell, bank),
            PORTS.wake: f"wake_{stem}",
            PORTS.test: self.test[cell.definition],
            PORTS.output: f"gclk_{stem}",
        }
        connections = ", ".join(f".{pin}({value})" for pin, value in pins.items())
        self.placed[cell.id] = PlacedCell(
            cell.id, cell.definition, cell.scope, instance, f"wake_{stem}", f"gclk_{stem}", text
        )
        return [
            self._comment(cell, branches=branches),
            *body,
            f"wire gclk_{stem};",
            f"{WRAPPERS[cell.edge]} {instance} ({connections});",
        ]

    def _own_condition(self, cell: Cell, bank: Bank) -> WakeCondition:
        """Prefer the condition as the first block spells it: names of a later one may not be declared yet."""
        own = [c for proposal in bank.proposals for c in proposal.conditions if c.key == cell.wake.key]
        return own[0] if own else cell.wake

    def _wake_lines(
        self, wake: WakeCondition, bank: Bank, stem: str, language: Language, step: str
    ) -> tuple[list[str], str, bool]:
        """Give the lines of the wake signal, its condition for reports, and whether it is a copy of branches."""
        if not isinstance(wake.form, Skeleton):
            text = self.formulas.write(wake.form)
            return wrapped(f"wire wake_{stem} =", text, step), text, False
        module, block = self.body_of(bank)
        page = self.page(block.span.file)
        names = self.names_of(bank.block.definition)
        writer = SkeletonWriter(page, module, block, self.formulas, wake, wake.form, stem, names, step)
        lines = writer.lines(language)
        if writer.is_formula:
            return lines, " ".join(line.strip() for line in lines).partition(" = ")[2].rstrip(";"), False
        return lines, wake.text, True

    def _clock(self, cell: Cell, bank: Bank) -> str:
        if isinstance(cell.clock, CellRef):
            return self.gclk(cell.clock.cell)
        _, block = self.body_of(bank)
        if block.clock is None:
            raise CannotEditError("clock-unclear", "the block has no clock", block.span)
        if not block.clock.signal.copyable:
            raise CannotEditError("not-copyable", "the clock comes out of a macro", block.clock.signal.span)
        return copied(self.page(block.span.file).text(block.clock.signal.span))

    def _comment(self, cell: Cell, *, branches: bool) -> str:
        mine = [bank for bank in self.plan.banks if bank.cell == cell.id]
        names = list(dict.fromkeys(_shown(register.name) for bank in mine for register in bank.registers))
        tail = "; the branches are those of its block" if branches else ""
        return f"// stillclock: {_sleepers(names)}{tail}"


def _shown(name: str) -> str:
    return name if is_plain(name) else sanitised(name)


def _sleepers(names: list[str]) -> str:
    if len(names) == 1:
        return f"{names[0]} sleeps unless it is written"
    listed, last = (names[:-1], names[-1]) if len(names) <= 4 else (names[:3], f"{len(names) - 3} more")  # noqa: PLR2004
    return f"{', '.join(listed)} and {last} sleep unless they are written"


def without(plan: Plan, blocks: frozenset[BlockId]) -> Plan:
    """Give the plan without some blocks and whatever served only them."""
    banks = tuple(bank for bank in plan.banks if bank.block not in blocks)
    used = {bank.cell for bank in banks}
    clocks = {cell.id: cell.clock.cell for cell in plan.cells if isinstance(cell.clock, CellRef)}
    for cell in list(used):
        while (cell := clocks.get(cell, "")) and cell not in used:
            used.add(cell)
    cells = tuple(
        replace(cell, blocks=tuple(b for b in cell.blocks if b not in blocks)) for cell in plan.cells if cell.id in used
    )
    return replace(
        plan,
        cells=tuple(cell for cell in cells if cell.blocks),
        banks=banks,
        blocks=tuple(block for block in plan.blocks if block.block not in blocks),
    )
