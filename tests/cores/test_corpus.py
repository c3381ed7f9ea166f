"""The file lists name what the installed packages hold, and what is missing fails with the line that installs it."""

from pathlib import Path

import pytest

from tests.cores.corpus import CORES, Core, MissingPackageError, core, package
from tests.cores.running import ORIGINAL, Rtl, replace_once, require, run

pytestmark = pytest.mark.core


@pytest.mark.parametrize("name", sorted(CORES))
def test_lists_name_installed_files(name: str) -> None:
    sources = core(name).sources()
    assert sources
    assert all(path.is_file() for path in core(name).testbench())


def test_a_missing_package_fails_with_the_way_to_install_it(tmp_path: Path) -> None:
    list_file = tmp_path / "gone.f"
    list_file.write_text("$SITE/pythondata_cpu_ibex_gone/rtl/core.sv\n", encoding="utf-8")
    with pytest.raises(MissingPackageError, match="pip install pythondata-cpu-ibex-gone"):
        Core("gone", list_file).arguments()
    with pytest.raises(MissingPackageError, match="pip install"):
        package("no_such_package")


def test_a_missing_program_fails_with_the_way_to_install_it() -> None:
    with pytest.raises(AssertionError, match="apt-get install no-such-simulator"):
        require("no-such-simulator")


def test_a_harness_that_changed_fails() -> None:
    with pytest.raises(AssertionError, match="the installed harness changed: 0 places"):
        replace_once("int main()", "top->reset", "")


def test_replacements_are_found_whatever_the_spelling(tmp_path: Path) -> None:
    original, changed = tmp_path / "core.v", tmp_path / "new.v"
    rtl = Rtl(replaced=((original, changed),))
    assert rtl.of(tmp_path / "rtl" / ".." / "core.v") == changed
    assert ORIGINAL.of(original) == original


def test_a_program_is_stopped_at_its_limit_with_its_children(tmp_path: Path) -> None:
    ran = run(("sh", "-c", "echo started; sleep 60 & wait"), tmp_path, limit=0.5)
    assert ran.status is None
    assert ran.output == "started\n"
