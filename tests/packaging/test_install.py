"""Templates and simulation sources work from a wheel, from an sdist and from an editable install."""

import shutil
import sys
import tarfile
import zipfile
from pathlib import Path

import pytest

from rewriter import resources, tools

ROOT = Path(__file__).parents[2]

pytestmark = [pytest.mark.packaging, pytest.mark.slow]

# What a fresh environment must be able to do from any folder; no dependency outside the libraries of this one.
PROBE = """
from rewriter import resources
from rewriter.edit.cells import load_cell_map, render_cells, shipped_maps
for name in shipped_maps():
    print(name, *render_cells(load_cell_map(name), None))
print(sorted(item.name for item in resources.templates().joinpath("demo").iterdir()))
print(resources.cell_model("sg13g2_slgcp_1").count("module sg13g2_slgcp_1 "))
print(type(resources.templates()).__name__, "_data" in str(resources.templates()))
"""


def python(folder: Path, *arguments: str, program: str = sys.executable) -> str:
    ran = tools.run(program, arguments, folder=folder, seconds=300)
    assert ran.ok, ran.stdout + ran.stderr
    return ran.stdout


@pytest.fixture(scope="module")
def checkout(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Copy what a checkout holds for a build, so that building leaves nothing behind."""
    folder = tmp_path_factory.mktemp("checkout")
    unwanted = shutil.ignore_patterns("__pycache__")
    for name in ("rewriter", "templates", "sim"):
        shutil.copytree(ROOT / name, folder / name, ignore=unwanted)
    for name in ("pyproject.toml", "README.md", "LICENSE", ".gitignore"):
        shutil.copy(ROOT / name, folder / name)
    return folder


@pytest.fixture(scope="module")
def built(checkout: Path, tmp_path_factory: pytest.TempPathFactory) -> Path:
    """Build the sdist, and the wheel from it."""
    folder = tmp_path_factory.mktemp("dist")
    python(checkout, "-m", "build", "--no-isolation", "--outdir", str(folder))
    return folder


def installed(folder: Path, *what: str) -> str:
    """Install into a fresh environment that sees the libraries of this one, and give what the probe prints."""
    python(folder, "-m", "venv", "--without-pip", "fresh")
    fresh = folder / "fresh"
    packages = next(fresh.glob("lib/python*/site-packages"))
    # Our own editable install would hide what is tested, so the libraries are linked one by one.
    for item in Path(pytest.__file__).parents[1].iterdir():
        if "stillclock" not in item.name and item.name != "rewriter":
            (packages / item.name).symlink_to(item)
    pip = ("-m", "pip", "--python", str(fresh), "install", "-q", "--no-deps", "--no-build-isolation")
    python(folder, *pip, *what)
    return python(folder, "-I", "-c", PROBE, program=str(fresh / "bin" / "python"))


EXPECTED = """\
asap7 stillclock_icg.v
behavioural stillclock_icg.v stillclock_icg_n.v
discrete stillclock_icg.v stillclock_icg_n.v
gf180 stillclock_icg.v
sg13g2 stillclock_icg.v
sky130hd stillclock_icg.v
transparent stillclock_icg.v stillclock_icg_n.v
['demo.f', 'demo_tb.sv', 'lantern.sv', 'settings.sv', 'tide_gauge.sv', 'uplink.v', 'water_level.sv']
1
"""


def test_wheel(built: Path, tmp_path: Path) -> None:
    assert installed(tmp_path, str(next(built.glob("*.whl")))) == EXPECTED + "PosixPath True\n"


def test_sdist(built: Path, tmp_path: Path) -> None:
    assert installed(tmp_path, str(next(built.glob("*.tar.gz")))) == EXPECTED + "PosixPath True\n"


def test_editable_install(checkout: Path, tmp_path: Path) -> None:
    assert installed(tmp_path, "-e", str(checkout)) == EXPECTED + "PosixPath False\n"


def test_both_archives_hold_every_shipped_file(built: Path) -> None:
    shipped = {
        str(Path(folder.name) / path.relative_to(folder))
        for folder in (ROOT / "templates", ROOT / "sim")
        for path in folder.rglob("*")
        if path.is_file() and "__pycache__" not in path.parts
    }
    assert len(shipped) > 15
    with zipfile.ZipFile(next(built.glob("*.whl"))) as wheel:
        names = wheel.namelist()
    assert {f"rewriter/_data/{name}" for name in shipped} <= set(names)
    assert any(name.endswith("licenses/LICENSE") for name in names)
    assert not [name for name in names if name.startswith(("tests", "templates", "sim"))]
    with tarfile.open(next(built.glob("*.tar.gz"))) as archive:
        inside = {name.partition("/")[2] for name in archive.getnames()}
    assert {*shipped, "LICENSE", "pyproject.toml"} <= inside


def test_resources_read_the_same_everywhere() -> None:
    assert resources.read(resources.templates(), "demo", "demo.f").startswith("// The demo design of stillclock")
