"""The output folder and edits in place: whole or not at all, and never over something else's files."""

import json
import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from rewriter.model.errors import UserError
from rewriter.model.source import RtlSource, SourceText
from rewriter.report import folder
from rewriter.report.document import SCHEMA
from rewriter.report.inplace import replace_files

REPORT = json.dumps({"schema": SCHEMA}).encode()


def never(*_: object) -> bool:
    return False


def fine(built: Path) -> None:
    assert (built / "report.json").is_file()


def tree(place: Path) -> dict[str, bytes]:
    return {str(path.relative_to(place)): path.read_bytes() for path in place.rglob("*") if path.is_file()}


def test_written_and_replaced_as_a_whole(tmp_path: Path) -> None:
    place = folder.guard(tmp_path / "new" / "out")
    folder.write(place, {"report.json": REPORT, "rtl/a/b.sv": b"1"}, fine)
    assert tree(tmp_path) == {"new/out/report.json": REPORT, "new/out/rtl/a/b.sv": b"1"}
    folder.write(folder.guard(place), {"report.json": REPORT, "c": b"2"}, fine)
    assert tree(tmp_path) == {"new/out/report.json": REPORT, "new/out/c": b"2"}


def test_replaced_where_folders_cannot_be_swapped(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(folder, "_exchange", never)
    place = tmp_path / "out"
    folder.write(place, {"report.json": REPORT, "old": b""}, fine)
    folder.write(place, {"report.json": REPORT, "new": b""}, fine)
    assert set(tree(tmp_path)) == {"out/report.json", "out/new"}


def test_a_failed_check_leaves_the_former_folder(tmp_path: Path) -> None:
    place = tmp_path / "out"
    folder.write(place, {"report.json": REPORT, "old": b"1"}, fine)

    def wrong(built: Path) -> None:
        assert (built / "new").read_bytes() == b"2"
        raise UserError("no good")

    with pytest.raises(UserError, match="no good"):
        folder.write(place, {"report.json": REPORT, "new": b"2"}, wrong)
    assert tree(tmp_path) == {"out/report.json": REPORT, "out/old": b"1"}


@pytest.mark.parametrize("number", [signal.SIGTERM, signal.SIGINT, signal.SIGKILL])
def test_a_killed_run_leaves_the_former_folder(tmp_path: Path, number: signal.Signals) -> None:
    place = tmp_path / "out"
    folder.write(place, {"report.json": REPORT, "old": b"1"}, fine)
    script = (
        "import time, sys; from pathlib import Path; from rewriter.report import folder\n"
        "from rewriter.cli import main\n"
        "import signal; signal.signal(signal.SIGTERM, main._interrupt)\n"
        "def verify(built): print('built', flush=True); time.sleep(60)\n"
        "folder.write(Path(sys.argv[1]), {'report.json': b'{}', 'new': b'2'}, verify)\n"
    )
    child = subprocess.Popen(
        [sys.executable, "-c", script, str(place)], stdout=subprocess.PIPE, stderr=subprocess.DEVNULL
    )
    with child:
        assert child.stdout
        assert child.stdout.readline() == b"built\n"
        time.sleep(0.05)
        child.send_signal(number)
        assert child.wait(10) != 0
    assert tree(place) == {"report.json": REPORT, "old": b"1"}
    if number != signal.SIGKILL:  # nothing can clean up after that
        assert [path.name for path in tmp_path.iterdir()] == ["out"]


@pytest.mark.parametrize(
    "files, message",
    [
        ({"x": b""}, "exists, and is not an output folder of stillclock"),
        ({"report.json": b"{}"}, "is not an output folder"),
        ({"report.json": b"[1]"}, "is not an output folder"),
        ({"report.json": b'{"schema": "other/1"}'}, "is not an output folder"),
        ({"report.json": b"\xff"}, "is not an output folder"),
    ],
)
def test_a_folder_of_something_else(tmp_path: Path, files: dict[str, bytes], message: str) -> None:
    for name, data in files.items():
        (tmp_path / name).write_bytes(data)
    with pytest.raises(UserError, match=message):
        folder.guard(tmp_path)
    assert tree(tmp_path) == files


def test_an_empty_folder_will_do(tmp_path: Path) -> None:
    assert folder.guard(tmp_path) == tmp_path


def test_a_file_in_the_way(tmp_path: Path) -> None:
    (tmp_path / "out").write_text("mine")
    for place in (tmp_path / "out", tmp_path / "out" / "below"):
        with pytest.raises(UserError, match="is not"):
            folder.guard(place)


def test_no_permission(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    # The tests may run as root, whom the system refuses nothing.
    monkeypatch.setattr(os, "access", never)
    with pytest.raises(UserError, match="no permission to write in"):
        folder.guard(tmp_path / "out")


def test_the_system_refuses() -> None:
    with pytest.raises(UserError, match="cannot be written: "):
        folder.write(Path("/proc/stillclock/out"), {"report.json": REPORT}, fine)


def test_sources_are_never_replaced(tmp_path: Path) -> None:
    source = RtlSource((), texts=(SourceText(str(tmp_path / "out/rtl/a.sv"), b""),))
    with pytest.raises(UserError, match=r"the source .*a\.sv stands in the output folder"):
        folder.guard_sources(tmp_path / "out", source)
    folder.guard_sources(tmp_path / "out2", source)


def test_no_name_leads_out(tmp_path: Path) -> None:
    place = tmp_path / "out"
    with pytest.raises(UserError, match="leads out of the output folder"):
        folder.write(place, {"../../evil": b""}, fine)
    assert not tree(tmp_path)


def test_in_place_keeps_modes_and_links(tmp_path: Path) -> None:
    (tmp_path / "a").write_bytes(b"1")
    (tmp_path / "a").chmod(0o640)
    (tmp_path / "link").symlink_to("a")
    replace_files({tmp_path / "link": b"2", tmp_path / "cell.v": b"c"})
    assert (tmp_path / "link").is_symlink()
    assert tree(tmp_path) == {"a": b"2", "link": b"2", "cell.v": b"c"}
    assert (tmp_path / "a").stat().st_mode & 0o777 == 0o640


def test_in_place_is_all_or_nothing(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    before = {"a": b"1", "b": b"2"}
    for name, data in before.items():
        (tmp_path / name).write_bytes(data)
    rename = Path.replace

    def refuse_b(self: Path, target: Path) -> Path:
        if target.name == "b":
            raise OSError(28, "No space left on device", str(target))
        return rename(self, target)

    monkeypatch.setattr(Path, "replace", refuse_b)
    with pytest.raises(UserError, match="b: cannot be written: No space left on device"):
        replace_files({tmp_path / "new": b"n", tmp_path / "a": b"x", tmp_path / "b": b"y"})
    assert tree(tmp_path) == before


def test_in_place_with_a_missing_folder(tmp_path: Path) -> None:
    (tmp_path / "a").write_bytes(b"1")
    with pytest.raises(UserError, match="cannot be written: No such file or directory"):
        replace_files({tmp_path / "a": b"x", tmp_path / "none" / "cell.v": b"c"})
    assert tree(tmp_path) == {"a": b"1"}
