"""The options that several commands share."""

import re
from collections.abc import Callable
from typing import Any, TypedDict

import click

from rewriter.edit.cells import load_cell_map
from rewriter.flow import Job
from rewriter.model.cells import CellMap
from rewriter.model.evidence import Limits
from rewriter.model.rewrite import TestPin

Command = Callable[..., Any]


class Bounds(TypedDict):
    """The options of `limit_options`."""

    query_seconds: float
    run_seconds: float


class Gating(Bounds):
    """The options of `gating_options`."""

    cell_map: CellMap
    min_bits: int
    one_clock_per_variable: bool
    test_port: str
    test_pin: tuple[TestPin, ...]
    off: tuple[str, ...]


_PIN = re.compile(r"(?P<module>[^=.\s]+)\.(?P<port>[^=.\s]+)=(?P<meaning>scan-enable|test-mode)(?P<low>,active-low)?\Z")
_NAME = re.compile(r"[A-Za-z_][A-Za-z0-9_$]*\Z")


def _test_pins(ctx: click.Context, param: click.Parameter, value: tuple[str, ...]) -> tuple[TestPin, ...]:
    """Read `MODULE.PORT=scan-enable|test-mode[,active-low]`."""
    return tuple(_test_pin(text, ctx, param) for text in value)


def _test_pin(text: str, ctx: click.Context, param: click.Parameter) -> TestPin:
    found = _PIN.match(text)
    if found is None:
        raise click.BadParameter(f"`{text}` is not MODULE.PORT=scan-enable|test-mode[,active-low]", ctx, param)
    return TestPin(found["module"], found["port"], found["meaning"], active_low=found["low"] is not None)


def _port_name(ctx: click.Context, param: click.Parameter, value: str) -> str:
    if not _NAME.match(value):
        raise click.BadParameter(f"`{value}` is not a plain Verilog name (letters, digits, _ and $)", ctx, param)
    return value


def _cell_map(ctx: click.Context, param: click.Parameter, value: str) -> CellMap:
    """Read a cell map by shipped name or path; its reader complains with line and column."""
    del ctx, param
    return load_cell_map(value)


def format_option(command: Command) -> Command:
    """Add `--format`."""
    return click.option(
        "--format", "form", type=click.Choice(["text", "json"]), default="text", help="How results are printed."
    )(command)


def limit_options(command: Command) -> Command:
    """Add the limits of the proof."""
    command = click.option(
        "--run-seconds",
        type=click.FloatRange(min=0, min_open=True),
        default=Limits.run_seconds,
        show_default=True,
        help="Limit of the proof as a whole.",
    )(command)
    return click.option(
        "--query-seconds",
        type=click.FloatRange(min=0, min_open=True),
        default=Limits.query_seconds,
        show_default=True,
        help="Limit of the proof of one bank.",
    )(command)


def settings_option(command: Command) -> Command:
    """Add `--settings`; its value is read before the options are parsed (RtlCommand.parse_args)."""
    return click.option(
        "--settings",
        metavar="FILE",
        expose_value=False,
        help="Settings; stillclock.toml of the working folder without. Options override them.",
    )(command)


def gating_options(command: Command) -> Command:
    """Add what decides which banks are gated, and how."""
    options = (
        click.option(
            "--cell-map",
            callback=_cell_map,
            default="behavioural",
            show_default=True,
            metavar="FILE|NAME",
            help="What the cells become in synthesis: a TOML file, or the name of a shipped map.",
        ),
        click.option(
            "--min-bits",
            type=click.IntRange(min=1),
            default=4,
            show_default=True,
            help="Fewest register bits per cell.",
        ),
        click.option(
            "--one-clock-per-variable",
            is_flag=True,
            help="Leave parts of a variable that would run on several clocks (linters warn of those).",
        ),
        click.option(
            "--test-port",
            callback=_port_name,
            default="test_en",
            show_default=True,
            help="Name of the port that carries the test override.",
        ),
        click.option(
            "--test-pin",
            callback=_test_pins,
            multiple=True,
            metavar="MODULE.PORT=MEANING[,active-low]",
            help="An existing port that carries the override; MEANING is scan-enable or test-mode. Repeatable.",
        ),
        click.option(
            "--off",
            multiple=True,
            metavar="MODULE[.REGISTER]",
            help="Leave a module or register alone. Repeatable.",
        ),
    )
    for option in reversed(options):
        command = option(command)
    return settings_option(limit_options(command))


def job(arguments: tuple[str, ...], wishes: Gating, *, prove: bool, allow_unproved: bool = False) -> Job:
    """Put the options of a command together."""
    return Job(
        arguments=arguments,
        cell_map=wishes["cell_map"],
        min_bits=wishes["min_bits"],
        one_clock_per_variable=wishes["one_clock_per_variable"],
        test_port=wishes["test_port"],
        test_pins=wishes["test_pin"],
        off=wishes["off"],
        limits=limits(wishes),
        prove=prove,
        allow_unproved=allow_unproved,
    )


def limits(wishes: Bounds) -> Limits:
    """Give the limits of the proof."""
    return Limits(wishes["query_seconds"], wishes["run_seconds"])
