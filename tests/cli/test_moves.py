"""Which files move into the output folder, and where a moved file then finds its headers."""

from pathlib import Path

from rewriter.model.rewrite import FileChange, Rewrite
from rewriter.model.source import RtlSource, SourceText
from rewriter.report.moves import Moves, plan_moves


def design(folder: Path, texts: dict[str, str], files: list[str], include_dirs: tuple[str, ...] = ()) -> RtlSource:
    for name, text in texts.items():
        (folder / name).parent.mkdir(parents=True, exist_ok=True)
        (folder / name).write_text(text)
    return RtlSource(
        files=tuple(str(folder / name) for name in files),
        include_dirs=tuple(str(folder / name) for name in include_dirs),
        texts=tuple(SourceText(str(folder / name), text.encode()) for name, text in texts.items()),
    )


def moves(source: RtlSource, *changed: str) -> Moves:
    files = tuple(
        FileChange(text.path, text.data, text.data + b"//x") for text in source.texts if text.path.endswith(changed)
    )
    assert len(files) == len(changed)
    return plan_moves(source, Rewrite(files, (), (), {}, {}, {}))


def below(found: Moves) -> list[str]:
    return [found.below(path) for path in found.paths]


def test_only_what_changes_moves(tmp_path: Path) -> None:
    source = design(tmp_path, {"p/a.sv": "", "p/b.sv": "", "p/sub/c.sv": ""}, ["p/a.sv", "p/b.sv", "p/sub/c.sv"])
    found = moves(source, "a.sv", "c.sv")
    assert below(found) == ["a.sv", "sub/c.sv"]
    assert found.arguments(("cell/x.v",)).files == ("rtl/a.sv", str(tmp_path / "p/b.sv"), "rtl/sub/c.sv", "cell/x.v")
    assert found.arguments(()).include_dirs == (str(tmp_path / "p"), str(tmp_path / "p/sub"))


def test_includers_of_an_edited_header_move_too(tmp_path: Path) -> None:
    texts = {
        "a.sv": '`include "mid.vh"\n',
        "inc/mid.vh": '`include "deep.vh"\n',
        "inc/deep.vh": "",
        "b.sv": "// `include nothing\n",
        "m.sv": "`include `FILE\n",
    }
    source = design(tmp_path, texts, ["a.sv", "b.sv", "m.sv"], ("inc",))
    found = moves(source, "deep.vh")
    assert below(found) == ["a.sv", "inc/deep.vh", "inc/mid.vh", "m.sv"]
    assert found.arguments(()).include_dirs == ("rtl/inc", str(tmp_path / "inc"), str(tmp_path))


def test_an_include_folder_above_the_header_keeps_its_names(tmp_path: Path) -> None:
    texts = {"a.sv": '`include "x/h.vh"\n', "inc/x/h.vh": ""}
    source = design(tmp_path, texts, ["a.sv"], ("inc",))
    found = moves(source, "h.vh")
    assert below(found) == ["a.sv", "inc/x/h.vh"]
    assert "rtl/inc" in found.arguments(()).include_dirs


def test_a_header_beside_a_moved_file_wins_over_the_include_path(tmp_path: Path) -> None:
    texts = {"p/a.sv": '`include "h.vh"\n', "p/h.vh": "// beside", "inc/h.vh": "// elsewhere"}
    source = design(tmp_path, texts, ["p/a.sv"], ("inc",))
    assert below(moves(source, "a.sv")) == ["a.sv", "h.vh"]


def test_a_header_beside_a_moved_file_stays_when_it_is_found_anyway(tmp_path: Path) -> None:
    source = design(tmp_path, {"p/a.sv": '`include "h.vh"\n', "p/h.vh": ""}, ["p/a.sv"])
    assert below(moves(source, "a.sv")) == ["a.sv"]
