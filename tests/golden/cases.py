"""Golden cases: a folder each, with an input, what is expected of its registers, and the output as it was reviewed.

input.sv | input.v      `// expect: REGISTER gated|left|refused [reason][: part of the detail]` lines say what must
                        come out, whatever the golden files say
args                    further arguments, one a line: `{case}` is the folder, `{cells}` a wrapper of ours;
                        --prove asks the engine; --off, --cell-map, --min-bits, --test-pin, --test-port as on the
                        command line
expected.sv | .v        the rewritten input (written by pytest --update, then reviewed)
expected.json           every register with its verdict
"""

import json
import re
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path
from typing import Any

from rewriter import flow
from rewriter.edit.cells import load_cell_map, render_cells
from rewriter.model.rewrite import TestPin
from rewriter.model.run import Run
from rewriter.report.rows import rows

FOLDER = Path(__file__).parent.parent / "cases"
_EXPECT = re.compile(
    r"// expect: (?P<register>.+?)\s+(?P<verdict>gated|left|refused)(?: (?P<word>[a-z-]+))?(?:: (?P<detail>.+))?$"
)


@dataclass(frozen=True)
class Expectation:
    """One `// expect:` line."""

    register: str
    verdict: str
    word: str
    detail: str


@dataclass(frozen=True)
class Case:
    """One folder below tests/cases."""

    folder: Path

    @property
    def name(self) -> str:
        return f"{self.folder.parent.name}/{self.folder.name}"

    @cached_property
    def input(self) -> Path:
        (found,) = self.folder.glob("input.*")
        return found

    @property
    def expected(self) -> Path:
        return self.folder / f"expected{self.input.suffix}"

    @cached_property
    def arguments(self) -> tuple[str, ...]:
        args = self.folder / "args"
        return tuple(args.read_text(encoding="utf-8").split()) if args.is_file() else ()

    @cached_property
    def expectations(self) -> tuple[Expectation, ...]:
        lines = self.input.read_text(encoding="latin-1").splitlines()
        found = (_EXPECT.match(line.removeprefix("\xef\xbb\xbf")) for line in lines)
        return tuple(Expectation(**{key: value or "" for key, value in m.groupdict().items()}) for m in found if m)

    def rtl_arguments(self, cells: Path) -> tuple[str, ...]:
        """Give what goes to slang besides the input."""
        texts = [a for a in self.arguments if not a.startswith(_OWN)]
        cell = str(cells / "stillclock_icg.v")
        return tuple(a.replace("{case}", str(self.folder)).replace("{cells}", cell) for a in texts)

    def option(self, name: str) -> list[str]:
        return [a.split("=", 1)[1] for a in self.arguments if a.startswith(f"--{name}=")]

    def job(self, arguments: tuple[str, ...]) -> flow.Job:
        """Make the job of the case over other arguments."""
        return flow.Job(
            arguments,
            load_cell_map(next(iter(self.option("cell-map")), "behavioural")),
            min_bits=int(next(iter(self.option("min-bits")), 4)),
            test_port=next(iter(self.option("test-port")), "test_en"),
            test_pins=tuple(_pin(text) for text in self.option("test-pin")),
            off=tuple(self.option("off")),
            prove="--prove" in self.arguments,
            allow_unproved="--prove" not in self.arguments,
        )


_OWN = ("--prove", "--off=", "--cell-map=", "--min-bits=", "--test-pin=", "--test-port=")


def all_cases() -> list[Case]:
    """Find every case, in order of names."""
    return [Case(path.parent) for path in sorted(FOLDER.glob("*/*/input.*"))]


def _pin(text: str) -> TestPin:
    place, _, meaning = text.partition("=")
    definition, _, port = place.partition(".")
    kind, _, polarity = meaning.partition(",")
    return TestPin(definition, port, kind, polarity == "active-low")


@dataclass(frozen=True)
class Outcome:
    """A case as the program rewrote it, beside the files that a tool needs to read it again."""

    case: Case
    run: Run
    text: bytes
    folder: Path

    @property
    def changed(self) -> bool:
        return self.text != self.case.input.read_bytes()

    @property
    def cells(self) -> tuple[Path, ...]:
        """Give the wrapper files, none when the source brings its own."""
        names = self.run.rewrite.cell_files if self.run.rewrite and self.changed else ()
        return tuple(self.folder / name for name in sorted(names))

    @property
    def input(self) -> Path:
        return self.folder / self.case.input.name

    def registers(self) -> list[dict[str, Any]]:
        """Give every register with its verdict, free of paths."""
        return [
            {
                "registers": list(row.registers),
                "module": row.module,
                "bits": row.bits,
                "total_bits": row.total_bits,
                "clock": row.clock,
                "edge": row.edge,
                "wake": row.wake,
                "verdict": row.verdict.value,
                "reason": row.reason,
                "detail": row.detail.replace(f"{self.case.folder}/", ""),
            }
            for row in rows(self.run).banks
        ]

    def json(self) -> str:
        return json.dumps(self.registers(), indent=1, ensure_ascii=False) + "\n"


def rewrite(case: Case, folder: Path, cells: Path) -> Outcome:
    """Run a case without the engine, and write its output and whatever it includes into a folder."""
    run = flow.rewrite(case.job((str(case.input), *case.rtl_arguments(cells), f"-I{case.folder}")), lambda _: None)
    changes = {change.path: change.new for change in run.rewrite.files} if run.rewrite else {}
    folder.mkdir(parents=True)
    for path in case.folder.iterdir():
        if path.suffix in {".v", ".sv", ".vh", ".svh"} and not path.name.startswith("expected"):
            (folder / path.name).write_bytes(changes.get(str(path), path.read_bytes()))
    if run.rewrite:
        for name, text in run.rewrite.cell_files.items():
            (folder / name).write_text(text, encoding="utf-8")
    assert set(changes) <= {str(case.input)}, "only the input of a case may change"
    return Outcome(case, run, (folder / case.input.name).read_bytes(), folder)


def wrappers(folder: Path) -> Path:
    """Write the wrappers of the behavioural map into a folder, for sources that bring their own."""
    for name, text in render_cells(load_cell_map("behavioural"), None).items():
        (folder / name).write_text(text, encoding="utf-8")
    return folder


def unmet(outcome: Outcome) -> Iterator[str]:
    """Say which `// expect:` lines did not come true."""
    found = outcome.registers()
    for wish in outcome.case.expectations:
        mine = [row for row in found if wish.register.strip() in [name.strip() for name in row["registers"]]]
        met = any(
            row["verdict"] == wish.verdict and wish.word in ("", row["reason"]) and wish.detail in row["detail"]
            for row in mine
        )
        if not met:
            seen = [(r["registers"], r["verdict"], r["reason"], r["detail"]) for r in mine or found]
            yield f"{outcome.case.name}: {wish} did not come true: {seen}"
