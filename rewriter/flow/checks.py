"""Never trust the own output: read it back, and stop when it is not what was meant."""

import tempfile
from collections.abc import Callable, Mapping
from pathlib import Path

from rewriter import frontend
from rewriter.model.design import Design
from rewriter.model.errors import NoAnswerError, StillclockError, UserError
from rewriter.model.plan import Plan, RegisterId
from rewriter.model.rewrite import Rewrite
from rewriter.model.run import Run
from rewriter.model.source import RtlSource, SourceText
from rewriter.report.diff import unified


class FaultError(StillclockError):
    """Report that stillclock caught itself; nothing is written."""

    status = 3

    def render(self) -> str:
        """Say plainly whose fault it is."""
        return (
            f"internal error: {self.message}\nhelp: this is a fault of stillclock and nothing was written; {self.help}"
        )


def rewritten_source(design: Design, done: Rewrite) -> RtlSource:
    """Give the rewritten RTL as it would be read from disk, cells included."""
    return design.source.with_texts({change.path: change.new for change in done.files}, _cell_files(design, done))


def _cell_files(design: Design, done: Rewrite) -> tuple[SourceText, ...]:
    folder = design.source.files[0].rpartition("/")[0]
    return tuple(SourceText(f"{folder}/{name}", text.encode()) for name, text in done.cell_files.items())


def judge(run: Run, *, allow_unproved: bool) -> None:
    """Stop a run in which something outside the banks is not as before.

    Raises:
        FaultError: it differs.
        NoAnswerError: a limit kept the engine from telling.
    """
    result = run.proof
    if result is None:
        return
    if result.mismatches:
        first = result.mismatches[0]
        shown = f"\n{first.counterexample.table()}" if first.counterexample else ""
        raise _fault(run, f"the rewritten RTL differs in {first.module}: {first.what}, {first.detail}{shown}")
    if result.undecided and not allow_unproved:
        raise NoAnswerError(
            f"the proof is open outside the banks: {'; '.join(result.undecided)}",
            help="raise --query-seconds or --run-seconds, or write all the same with --allow-unproved",
        )


def check(run: Run, done: Rewrite, choose: Callable[[Design], Plan]) -> None:
    """Read a rewrite back: it must compile without new complaints, and leave nothing more to gate.

    Args:
        run: what was done; excluded registers may hold without being gated.
        done: its rewrite.
        choose: plans for a design as the run did.

    Raises:
        FaultError: it does not.
    """
    if not done.files:
        return
    try:
        again = frontend.elaborate(rewritten_source(run.design, done))
    except UserError as error:
        raise _fault(run, f"the rewritten RTL does not compile:\n{error.message}") from error
    if new := _new_warnings(run.design, again, _cell_files(run.design, done)):
        raise _fault(run, f"the rewritten RTL brings a new warning: {new[0]}")
    known = {_name(register) for register in run.excluded}
    for bank in choose(again).banks:
        if any(_name(register) not in known for register in bank.registers):
            raise _fault(run, f"a second run would gate {bank.name} once more")


def _new_warnings(before: Design, after: Design, cells: tuple[SourceText, ...]) -> list[str]:
    """Give warnings that the original does not have; the library's cell in a wrapper is unknown by its nature."""
    known = [warning.message for warning in before.warnings]
    new: list[str] = []
    for warning in after.warnings:
        if warning.message in known:
            known.remove(warning.message)
        elif not any(warning.place.startswith(f"{cell.path}:") for cell in cells):
            new.append(warning.message)
    return new


def verify_folder(built: Path, expected: Mapping[str, bytes]) -> None:
    """Read a finished output folder through its own file list: it must give the RTL that was proved.

    Args:
        built: the folder.
        expected: bytes of its RTL, by path below it.

    Raises:
        FaultError: it does not compile, or the original of a moved file is read in its place.
    """
    try:
        again = frontend.read(("-F", str(built / "rtl.f")))
    except UserError as error:
        raise FaultError(
            f"the output folder does not compile:\n{error.message}", help="report it with the command"
        ) from error
    read = {text.path: text.data for text in again.source.texts}
    for name, data in expected.items():
        if read.get(str(built / name)) != data:
            raise FaultError(f"{name} is not read as it was written", help="report it with the command")


def _name(register: RegisterId) -> tuple[str, tuple[str, ...]]:
    """Name a register in a way that survives a rewrite, unlike its span."""
    return register.block.definition, tuple(part.text for part in register.parts)


def _fault(run: Run, message: str) -> FaultError:
    with tempfile.NamedTemporaryFile("wb", prefix="stillclock-", suffix=".diff", delete=False) as file:
        file.write(unified(run.rewrite, lambda path: path.lstrip("/")) if run.rewrite else b"")
    return FaultError(message, help=f"report it with the change, kept in {file.name}")
