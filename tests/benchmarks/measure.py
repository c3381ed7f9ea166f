"""Measure a command and everything it starts: seconds, and the most memory held at one time."""

import os
import subprocess
import tempfile
import time
from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path

_PAUSE = 0.05  # s between two looks at the processes


@dataclass(frozen=True)
class Cost:
    """What a command took: seconds, and megabytes resident in all its processes together."""

    seconds: float
    megabytes: float


def cost(command: list[str], environment: Mapping[str, str]) -> Cost:
    """Run a command in a session of its own and add up the memory of that session's processes.

    Raises:
        AssertionError: it did not exit with 0.
    """
    start = time.perf_counter()
    most = 0
    with (
        tempfile.TemporaryFile() as complaints,
        subprocess.Popen(
            command, env={**os.environ, **environment}, stdout=complaints, stderr=complaints, start_new_session=True
        ) as process,
    ):
        while process.poll() is None:
            most = max(most, _resident(process.pid))
            time.sleep(_PAUSE)
        complaints.seek(0)
        assert process.returncode == 0, complaints.read().decode()
    return Cost(time.perf_counter() - start, most / 1e6)


def _resident(session: int) -> int:
    """Give the bytes resident in all processes of a session (Linux: /proc)."""
    total = 0
    for folder in Path("/proc").glob("[0-9]*"):
        try:
            fields = (folder / "stat").read_text().rpartition(")")[2].split()
            if int(fields[3]) == session:
                total += int((folder / "statm").read_text().split()[1]) * os.sysconf("SC_PAGE_SIZE")
        except OSError:  # it has just ended
            continue
    return total
