"""Rewrite small texts through the real front end, and compile the outcome."""

from dataclasses import dataclass, replace
from pathlib import Path

from rewriter import tools
from rewriter.edit import EditOptions, edit
from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.frontend import elaborate, read
from rewriter.methods.enable import ENABLE
from rewriter.model.design import Design
from rewriter.model.plan import Plan, Policy
from rewriter.model.rewrite import Rewrite
from rewriter.model.source import SourceText
from rewriter.plan import choose, settle

DEFAULTS = EditOptions()


@dataclass(frozen=True)
class Rewritten:
    """A design, what was planned, and what became of its text."""

    design: Design
    plan: Plan
    rewrite: Rewrite
    folder: Path

    def data(self, name: str) -> bytes:
        """Give the new bytes of a file."""
        path = str(self.folder / name)
        changed = {change.path: change.new for change in self.rewrite.files}
        return changed.get(path, self.design.source.by_path[path].data)

    def text(self, name: str) -> str:
        return self.data(name).decode("latin-1")

    @property
    def reasons(self) -> dict[str, str]:
        return {register.name: reason.word for register, reason in self.rewrite.excluded.items()}

    def again(self) -> Design:
        """Elaborate the outcome with slang; text that does not compile raises."""
        changed = {change.path: change.new for change in self.rewrite.files}
        cells = tuple(
            SourceText(str(self.folder / "cells" / name), text.encode())
            for name, text in self.rewrite.cell_files.items()
        )
        return elaborate(self.design.source.with_texts(changed, cells))

    def compile(self) -> None:
        """Compile the outcome with slang and with Icarus (as Verilog-2005 when all files are Verilog).

        Source of the language rules: slang and Icarus read IEEE 1800-2017 and IEEE 1364-2005 independently.
        """
        after = self.again()
        new = [warning for warning in after.warnings if warning not in self.design.warnings]
        assert not new, new
        out = self.folder / "out"
        out.mkdir(exist_ok=True)
        for text in after.source.texts:
            (out / Path(text.path).name).write_bytes(text.data)
        names = [Path(path).name for path in after.source.files]
        standard = "-g2005" if all(name.endswith(".v") for name in names) else "-g2012"
        flags = [standard, "-t", "null", "-s", self.design.top, *(f"-D{d}" for d in self.design.source.defines)]
        ran = tools.run("iverilog", [*flags, *names], folder=out, seconds=60)
        assert ran.ok, ran.stdout + ran.stderr


def rewrite_files(
    folder: Path, files: dict[str, str | bytes], *arguments: str, options: EditOptions = DEFAULTS, min_bits: int = 1
) -> Rewritten:
    """Write files, read them, and rewrite what the method `enable` finds."""
    for name, text in files.items():
        (folder / name).write_bytes(text if isinstance(text, bytes) else text.encode())
    design = read([*files, *arguments], str(folder))
    outcomes = [outcome for module in design.modules for outcome in ENABLE.propose(module, design)]
    plan = choose(settle(outcomes), Policy(min_bits=min_bits), {})
    scale = next((d.timescale for d in design.definitions.values() if d.timescale), None)
    cells = render_cells(load_cell_map("behavioural"), scale)
    return Rewritten(design, plan, edit(design, plan, replace(options, cells=cells)), folder)
