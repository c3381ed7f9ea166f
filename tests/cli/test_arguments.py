"""Own options and RTL arguments are told apart without losing or reordering a word."""

import click
import pytest
from hypothesis import given
from hypothesis import strategies as st

from rewriter.cli.arguments import Split, guess, split

OPTIONS = (
    click.Option(["--out"]),
    click.Option(["--check"], is_flag=True),
    click.Option(["--strict/--no-strict"]),
    click.Option(["--test-pin"], multiple=True),
)


@pytest.mark.parametrize(
    "rtl",
    [
        ["-Ifoo", "a.sv"],
        ["-f", "list.f"],
        ["-F", "list.f"],
        ["-DX", "-DY=1", "-D", "Z=2"],
        ["+incdir+inc+inc2", "+define+A=1"],
        ["-y", "lib", "+libext+.v", "-v", "cells.v"],
        ["-GWIDTH=8", "-G", "X=32'h1A"],
        ["--top", "core", "--std", "1364-2005", "--allow-use-before-declare"],
        ["-o", "a.sv"],  # no short option of ours may swallow it
        ["-check", "a.sv"],
    ],
)
def test_rtl_arguments_pass_in_order(rtl: list[str]) -> None:
    assert split(rtl, OPTIONS) == Split((), tuple(rtl))


def test_own_options_may_stand_anywhere() -> None:
    parted = split(
        ["-f", "--check", "list.f", "--out", "dir", "--top", "t", "--test-pin=a.b=scan-enable", "x.sv"], OPTIONS
    )
    assert parted.own == ("--check", "--out", "dir", "--test-pin=a.b=scan-enable")
    assert parted.rtl == ("-f", "list.f", "--top", "t", "x.sv")


def test_after_two_dashes_all_is_rtl() -> None:
    assert split(["--check", "--", "--out", "x", "--"], OPTIONS) == Split(("--check",), ("--out", "x", "--"))


def test_a_value_that_is_an_option_is_a_missing_value() -> None:
    with pytest.raises(click.UsageError, match="--out needs a value, but `--check` follows"):
        split(["--out", "--check"], OPTIONS)


def test_a_near_miss_is_named() -> None:
    rtl = ["a.sv", "--cheek"]
    assert (
        guess(rtl, OPTIONS, "unknown command line argument '--cheek'")
        == "`--cheek` is no option of slang; did you mean `--check`?"
    )
    assert guess(["--uot", "dir"], OPTIONS, "no such file: dir").endswith("did you mean `--out`?")
    assert guess(rtl, OPTIONS, "cannot read a.sv") == ""
    assert guess(["--std", "latest"], OPTIONS, "invalid value 'latest' for --std") == ""
    assert guess(["--zzz"], OPTIONS, "unknown command line argument '--zzz'") == ""


WORDS = st.one_of(
    st.sampled_from(["--out", "--check", "--strict", "--no-strict", "--out=x", "-f", "-Ix", "+incdir+y", "--top"]),
    st.text("abc-=+./", min_size=1, max_size=6).filter(lambda word: word != "--"),
)


@given(st.lists(WORDS, max_size=12))
def test_no_word_is_lost(words: list[str]) -> None:
    try:
        parted = split(words, OPTIONS)
    except click.UsageError:
        return
    assert sorted((*parted.own, *parted.rtl)) == sorted(words)
    rest = iter(words)
    assert all(word in rest for word in parted.rtl), "RTL arguments keep their order"
