"""Shipped files are found, templates are strict; outside programs are found, limited and missed politely."""

import sys
import time
from pathlib import Path

import pytest
from jinja2 import UndefinedError

from rewriter import resources, tools


def test_checkout_is_preferred() -> None:
    root = Path(__file__).parents[2]
    assert resources.templates() == root / "templates"
    assert resources.sim() == root / "sim"


def test_template_with_a_missing_value_is_an_error() -> None:
    with pytest.raises(UndefinedError):
        resources.render("cells/wrapper.v.j2", edge="rising")


def test_cell_models_are_found_by_module() -> None:
    text = resources.cell_model("sg13g2_slgcp_1")
    assert text is not None
    assert "module sg13g2_slgcp_1 (" in text
    assert resources.cell_model("no_such_cell") is None


def test_missing_program_says_how_to_install_it(monkeypatch: pytest.MonkeyPatch, tmp_path: Path) -> None:
    monkeypatch.setenv("PATH", str(tmp_path))
    with pytest.raises(tools.MissingProgramError) as caught:
        tools.run("iverilog", [], folder=tmp_path, seconds=1)
    assert caught.value.status == 3
    assert caught.value.render() == (
        "error: the program `iverilog` is not on the PATH\n"
        "help: install it with `apt-get install iverilog`, then run the command again"
    )


def test_program_runs_in_its_folder_without_a_shell(tmp_path: Path) -> None:
    code = "import os, sys; print(os.getcwd()); print(sys.argv[1], file=sys.stderr); sys.exit(7)"
    ran = tools.run(sys.executable, ["-c", code, "$HOME; *"], folder=tmp_path, seconds=30)
    assert (ran.status, ran.ok, ran.stdout, ran.stderr) == (7, False, f"{tmp_path.resolve()}\n", "$HOME; *\n")


def test_time_limit_ends_the_program_and_what_it_started(tmp_path: Path) -> None:
    child = "import time; time.sleep(2); open('late', 'w').close()"
    code = f"import subprocess, sys; subprocess.run([sys.executable, '-c', {child!r}])"
    start = time.monotonic()
    with pytest.raises(tools.TimeLimitError, match=r"was stopped after 0\.5 s"):
        tools.run(sys.executable, ["-c", code], folder=tmp_path, seconds=0.5)
    assert time.monotonic() - start < 2
    time.sleep(2.5)
    assert not (tmp_path / "late").exists()
