"""Real designs to work on: which packages hold them, their file lists, and the files those lists name.

The designs stay where pip put them; the project holds file names only. A missing package fails with the line that
installs it.
"""

import os
import sysconfig
from dataclasses import dataclass
from pathlib import Path

LISTS = Path(__file__).parent / "lists"
SITE = Path(sysconfig.get_path("purelib"))

_LOGIK = "pip install --no-deps logikbench lambdalib"  # without --no-deps it pulls in an old pyslang
_INSTALL = {"logikbench": _LOGIK, "lambdalib": _LOGIK}  # the others install under their own names


class MissingPackageError(AssertionError):
    """Fail a test whose design is not installed, and say how to install it."""

    def __init__(self, package: str) -> None:
        way = _INSTALL.get(package, f"pip install {package.replace('_', '-')}")
        super().__init__(f"the package {package} is not installed; run: {way}")
        self.package = package


@dataclass(frozen=True)
class Core:
    """One design: its name and the file list the front end reads."""

    name: str
    list_file: Path

    def arguments(self) -> tuple[str, ...]:
        """Give the command line arguments that read the design; `environment` must be set for them."""
        self.require()
        return ("-f", str(self.list_file))

    def sources(self) -> tuple[Path, ...]:
        """Give the RTL files in the order of the list."""
        return tuple(expand(line) for line in self._lines() if not line.startswith(("+", "-")))

    def testbench(self) -> tuple[Path, ...]:
        """Give the files of the design's own clocked bench; empty where it has no list of its own."""
        bench = self.list_file.with_suffix(".tb.f")
        return tuple(expand(line) for line in read_list(bench)) if bench.is_file() else ()

    def packages(self) -> tuple[str, ...]:
        """Give the installed folders the list reaches into, without repeats."""
        found = [line.partition("$SITE/")[2].split("/")[0] for line in self._lines() if "$SITE/" in line]
        return tuple(dict.fromkeys(found))

    def require(self) -> None:
        """Fail unless every package and every file of the list is there.

        Raises:
            MissingPackageError: with the pip line that installs it.
        """
        for package in self.packages():
            if not (SITE / package).is_dir():
                raise MissingPackageError(package)
        absent = [path for path in self.sources() if not path.is_file()]
        assert not absent, f"{self.name}: the installed package lacks {absent[0]}; was another version installed?"

    def _lines(self) -> tuple[str, ...]:
        return read_list(self.list_file)


def read_list(path: Path) -> tuple[str, ...]:
    """Give the entries of a file list, one a line."""
    return tuple(line.strip() for line in path.read_text(encoding="utf-8").splitlines() if line.strip())


def expand(entry: str) -> Path:
    """Put the folder of the installed packages in the place of `$SITE`."""
    return Path(entry.replace("$SITE", str(SITE)))


def package(name: str) -> Path:
    """Give the folder of an installed package.

    Raises:
        MissingPackageError: with the pip line that installs it.
    """
    folder = SITE / name
    if not folder.is_dir():
        raise MissingPackageError(name)
    return folder


def environment() -> dict[str, str]:
    """Give the environment in which the front end expands the lists."""
    return {**os.environ, "SITE": str(SITE)}


CORES = {path.stem: Core(path.stem, path) for path in sorted(LISTS.glob("*.f")) if not path.name.endswith(".tb.f")}


def core(name: str) -> Core:
    """Give the design of that name, checked to be installed.

    Raises:
        MissingPackageError: with the pip line that installs it.
    """
    found = CORES[name]
    found.require()
    return found
