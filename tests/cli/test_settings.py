"""stillclock.toml: unknown keys and wrong values are errors with their place."""

from pathlib import Path

import pytest

from rewriter.cli import settings
from rewriter.cli.options import gating_options
from rewriter.model.errors import UserError


def load(folder: Path, text: str) -> dict[str, object]:
    file = folder / "stillclock.toml"
    file.write_text(text)
    return settings.load(file)


def test_no_file_means_no_settings(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)
    assert settings.load(None) == {}


def test_names_are_those_of_the_options(tmp_path: Path) -> None:
    assert load(tmp_path, 'min-bits = 8\noff = ["uart"]\nstrict = true\nrun-seconds = 30\n') == {
        "min_bits": 8,
        "off": ["uart"],
        "strict": True,
        "run_seconds": 30,
    }


def test_every_setting_is_an_option() -> None:
    @gating_options
    def nothing() -> None: ...

    options = {
        name.removeprefix("--")
        for parameter in nothing.__click_params__  # type: ignore[attr-defined]
        for name in parameter.opts
    }
    assert set(settings.KEYS) - {"strict", "allow-unproved"} <= options


def test_a_cell_map_is_found_beside_the_settings(tmp_path: Path) -> None:
    (tmp_path / "my.toml").touch()
    assert load(tmp_path, 'cell-map = "my.toml"')["cell_map"] == str(tmp_path / "my.toml")
    assert load(tmp_path, 'cell-map = "sky130hd"')["cell_map"] == "sky130hd"


@pytest.mark.parametrize(
    "text, message",
    [
        (
            "min-bit = 8\n",
            "{file}:1:1: error: there is no setting `min-bit`\nmin-bit = 8\n^\nhelp: did you mean `min-bits`? ",
        ),
        ("# x\n min-bits = '8'\n", "{file}:2:2: error: `min-bits` must be a whole number\n min-bits = '8'\n ^"),
        ("min-bits = true\n", "{file}:1:1: error: `min-bits` must be a whole number\n"),
        ("off = 'uart'\n", "{file}:1:1: error: `off` must be a list of texts"),
        ("off = [1]\n", "{file}:1:1: error: `off` must be a list of texts"),
        ("strict = 1\n", "{file}:1:1: error: `strict` must be true or false\n"),
        ("[proof]\nx = 1\n", "{file}:1:2: error: there is no setting `proof`\n[proof]\n ^"),
        ("min-bits = \n", "{file}:1:12: error: not TOML: "),
        ("a = 'x", "{file}:1:"),
    ],
)
def test_wrong_settings_name_their_place(tmp_path: Path, text: str, message: str) -> None:
    with pytest.raises(UserError) as caught:
        load(tmp_path, text)
    assert caught.value.render().startswith(message.format(file=tmp_path / "stillclock.toml"))


def test_a_missing_file_that_was_named(tmp_path: Path) -> None:
    with pytest.raises(UserError, match="No such file or directory"):
        settings.load(tmp_path / "none.toml")


def test_binary_settings(tmp_path: Path) -> None:
    (tmp_path / "s.toml").write_bytes(b"\xff\xfe\x00")
    with pytest.raises(UserError, match="not a text file"):
        settings.load(tmp_path / "s.toml")
