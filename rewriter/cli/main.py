"""The entry point: find the command, run it, and turn every failure into a message and an exit status."""

import importlib
import os
import signal
import sys
import traceback
from collections.abc import Sequence
from pathlib import Path
from types import FrameType

import click

from rewriter import __version__
from rewriter.cli import console
from rewriter.model.errors import StillclockError

COMMANDS = ("survey", "rewrite", "prove", "explain", "demo")

USAGE_STATUS = 2
NO_ANSWER = 3
DEBUG = "STILLCLOCK_DEBUG"


class LazyGroup(click.Group):
    """Load a command's module when it is asked for, so that `explain` does not wait for engines."""

    def list_commands(self, ctx: click.Context) -> list[str]:
        """Name the commands in the order in which a person meets them."""
        del ctx
        return list(COMMANDS)

    def get_command(self, ctx: click.Context, cmd_name: str) -> click.Command | None:
        """Import rewriter.cli.NAME and take its `command`."""
        del ctx
        if cmd_name not in COMMANDS:
            return None
        command: click.Command = importlib.import_module(f"rewriter.cli.{cmd_name}").command
        return command


class InterruptedBySignalError(BaseException):
    """Unwind on a signal, so that half-written output is removed; no handler of ours may swallow it."""

    def __init__(self, number: int) -> None:
        super().__init__(number)
        self.number = number


@click.command(cls=LazyGroup, context_settings={"help_option_names": ["--help"], "max_content_width": 100})
@click.version_option(__version__, prog_name="stillclock", message="%(prog)s %(version)s")
def stillclock() -> None:
    """Rewrite RTL so that registers which only hold their value stop being clocked, and prove it.

    RTL arguments are those of every RTL flow: files, -f and -F lists, -I, +incdir+, -D, +define+, -y, -v,
    +libext+, -G, --top; options that are not ours go to slang's driver as they are. Our own options are
    long and may stand anywhere before `--`.

    Exit status: 0 done, or nothing to do; 1 the answer is no; 2 bad input or usage; 3 no answer.
    """


def main(arguments: Sequence[str] | None = None) -> None:
    """Run the command line and leave with its exit status."""
    for number in (signal.SIGTERM, signal.SIGHUP):
        signal.signal(number, _interrupt)
    sys.exit(run(sys.argv[1:] if arguments is None else arguments))


def run(arguments: Sequence[str]) -> int:
    """Run one command and give its exit status; whatever happens, no traceback reaches the user."""
    try:
        status = stillclock.main(list(arguments), prog_name="stillclock", standalone_mode=False)
        sys.stdout.flush()
    except (Exception, KeyboardInterrupt, InterruptedBySignalError) as failure:  # noqa: BLE001 (told, each in its way)
        return _tell(failure)
    return status if isinstance(status, int) else 0


def _tell(failure: BaseException) -> int:
    """Tell what went wrong, and give the exit status."""
    status = USAGE_STATUS
    match failure:
        case StillclockError():
            console.error(failure)
            status = failure.status
        case click.exceptions.NoArgsIsHelpError():
            console.message(failure.format_message())
        case click.ClickException():
            console.message(f"error: {failure.format_message()}")
            if isinstance(failure, click.UsageError) and failure.ctx is not None:
                console.message(f"help: `{failure.ctx.command_path} --help` lists the options")
        case console.ReaderGoneError():
            # Python would complain once more when it flushes stdout at exit.
            os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
            status = 128 + signal.SIGPIPE
        case KeyboardInterrupt() | click.Abort() | InterruptedBySignalError():
            console.message("interrupted")
            status = 128 + getattr(failure, "number", signal.SIGINT)
        case MemoryError() | RecursionError():
            what = "out of memory" if isinstance(failure, MemoryError) else "the RTL is nested too deeply"
            console.message(f"error: {what}\nhelp: take a smaller part with --top")
            status = NO_ANSWER
        case _:
            _keep_traceback(failure)
            status = NO_ANSWER
    return status


def _keep_traceback(fault: BaseException) -> None:
    """Own up to a fault, and keep the traceback where the user asked for it."""
    console.message(f"internal error: {type(fault).__name__}: {fault}")
    file = os.environ.get(DEBUG, "")
    if not file:
        console.message(f"help: this is a fault of stillclock; {DEBUG}=FILE keeps what its authors need in FILE")
        return
    try:
        Path(file).write_text("".join(traceback.format_exception(fault)), encoding="utf-8")
        console.message(f"help: this is a fault of stillclock; what its authors need stands in {file}")
    except OSError as error:
        console.message(f"help: {DEBUG}={file} could not be written: {error.strerror}")


def _interrupt(number: int, frame: FrameType | None) -> None:
    del frame
    raise InterruptedBySignalError(number)
