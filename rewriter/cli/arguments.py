"""Part our own options from the RTL arguments, which go to slang's driver untouched and in order."""

import difflib
from collections.abc import Sequence
from dataclasses import dataclass
from itertools import pairwise
from pathlib import Path

import click

from rewriter.cli import settings
from rewriter.model.errors import UserError

_META = "rewriter.rtl"


@dataclass(frozen=True)
class Split:
    """Own options, and everything else."""

    own: tuple[str, ...]
    rtl: tuple[str, ...]


def split(arguments: Sequence[str], options: Sequence[click.Option]) -> Split:
    """Part the arguments of a command.

    Own options are long only, so that none of them can swallow `-Ifoo`, `-f`, `+incdir+x` or a value of
    slang's. They may stand anywhere before `--`; what follows `--` is RTL.

    Args:
        arguments: what follows the command's name.
        options: the command's own options.
    """
    takes_value = {name: not _is_flag(option) for option in options for name in (*option.opts, *option.secondary_opts)}
    own: list[str] = []
    rtl: list[str] = []
    rest = iter(arguments)
    for argument in rest:
        if argument == "--":
            rtl.extend(rest)
            break
        name, equals, _ = argument.partition("=")
        if name not in takes_value:
            rtl.append(argument)
            continue
        own.append(argument)
        if takes_value[name] and not equals:
            # A missing value is click's to complain about; `--out --check` is a missing value, too.
            value = next(rest, None)
            if value is not None:
                own.append(value)
            if value in takes_value:
                raise click.UsageError(f"{name} needs a value, but `{value}` follows")
    return Split(tuple(own), tuple(rtl))


def _is_flag(option: click.Option) -> bool:
    return option.is_flag or option.count


def guess(rtl: Sequence[str], options: Sequence[click.Parameter], message: str) -> str:
    """Guess which own option a word meant that slang did not know; empty when there is no near one.

    Args:
        rtl: the RTL arguments.
        options: the command's own options.
        message: the complaint; it names the word, or what followed it and was taken for a file.
    """
    names = [name for option in options for name in (*option.opts, *option.secondary_opts)]
    for argument, follower in pairwise((*rtl, "")):
        word = argument.partition("=")[0]
        blamed = word in message or (follower and follower in message)
        if word.startswith("--") and blamed and (near := difflib.get_close_matches(word, names, 1, 0.75)):
            return f"`{word}` is no option of slang; did you mean `{near[0]}`?"
    return ""


class RtlCommand(click.Command):
    """A command that takes RTL arguments beside its own options, and settings from stillclock.toml."""

    def parse_args(self, ctx: click.Context, args: list[str]) -> list[str]:
        """Keep the RTL arguments aside, and let the settings stand in for options that are not given."""
        options = [parameter for parameter in self.get_params(ctx) if isinstance(parameter, click.Option)]
        try:
            parted = split(args, options)
            ctx.meta[_META] = parted.rtl
            if "--help" not in parted.own:
                ctx.default_map = settings.load(_settings_file(parted.own))
            return super().parse_args(ctx, list(parted.own))
        except click.UsageError as error:
            error.ctx = error.ctx or ctx  # so that the message can name the command
            raise

    def invoke(self, ctx: click.Context) -> object:
        """Run the command; a word that slang did not know may have meant an option of ours."""
        try:
            return super().invoke(ctx)
        except UserError as error:
            if meant := guess(rtl_arguments(ctx), self.get_params(ctx), error.message):
                error.help = meant
            raise

    def collect_usage_pieces(self, ctx: click.Context) -> list[str]:
        """Show where the RTL arguments go."""
        return [*super().collect_usage_pieces(ctx), "RTL..."]


def rtl_arguments(ctx: click.Context) -> tuple[str, ...]:
    """Give the RTL arguments of the running command."""
    return ctx.meta[_META]


def _settings_file(own: Sequence[str]) -> Path | None:
    """Find the settings named on the command line before click parses them: they are its defaults."""
    for index, argument in enumerate(own):
        name, equals, value = argument.partition("=")
        if name == "--settings" and (equals or index + 1 < len(own)):
            return Path(value if equals else own[index + 1])
    return None
