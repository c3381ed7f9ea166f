"""Bad input: the words of each message, and that nothing but a UserError comes out."""

from pathlib import Path

import pytest

from rewriter.frontend import diagnostics, read
from rewriter.model.errors import CompileError, UserError


def refused(folder: Path, *arguments: str) -> str:
    with pytest.raises(UserError) as caught:
        read(arguments, str(folder))
    assert caught.value.status == 2
    return caught.value.render()


@pytest.fixture
def rtl(tmp_path: Path) -> Path:
    (tmp_path / "m.sv").write_text("module m #(parameter W = 1)(input c); endmodule\n")
    return tmp_path


def test_a_missing_file(rtl: Path) -> None:
    text = refused(rtl, "gone.sv")
    assert text.startswith(f"error: no such file: {rtl / 'gone.sv'}\nhelp: check the path")


def test_a_missing_file_in_a_list_is_pointed_at(rtl: Path) -> None:
    (rtl / "l.f").write_text("m.sv\n  gone.sv // why\n")
    text = refused(rtl, "-f", "l.f")
    assert f"{rtl / 'l.f'}:2:3: error: no such file" in text
    assert "\n  gone.sv // why\n  ^\n" in text


def test_a_folder_as_a_file(rtl: Path) -> None:
    (rtl / "sub").mkdir()
    assert "is a folder, not a file" in refused(rtl, "sub")


def test_a_folder_as_a_list(rtl: Path) -> None:
    assert "is a folder, not a file list" in refused(rtl, "-f", ".")


def test_an_unreadable_file(rtl: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """Permissions do not bind the superuser that tests may run as, so the system's answer is played."""
    real = Path.read_bytes

    def denied(path: Path) -> bytes:
        if path.name == "m.sv":
            raise PermissionError(13, "Permission denied")
        return real(path)

    monkeypatch.setattr(Path, "read_bytes", denied)
    text = refused(rtl, "m.sv")
    assert "cannot read the file" in text
    assert "Permission denied" in text


def test_binary_junk(rtl: Path) -> None:
    (rtl / "junk.sv").write_bytes(b"\x7fELF\0\0\1\2")
    assert "is no text: it holds a zero byte" in refused(rtl, "junk.sv")


def test_junk_without_zero_bytes_is_a_compile_error(rtl: Path) -> None:
    (rtl / "junk.sv").write_bytes(bytes(range(1, 256)))
    assert "error:" in refused(rtl, "junk.sv")


def test_a_missing_list(rtl: Path) -> None:
    assert "no such file list" in refused(rtl, "-f", "gone.f")


def test_a_list_without_a_name(rtl: Path) -> None:
    assert "-f needs the name of a file list" in refused(rtl, "m.sv", "-f")


def test_lists_in_a_circle(rtl: Path) -> None:
    (rtl / "a.f").write_text("-f b.f\n")
    (rtl / "b.f").write_text("m.sv\n-F a.f\n")
    text = refused(rtl, "-f", "a.f")
    assert "b.f:2:4: error: the file list a.f includes itself" in text


def test_no_arguments(rtl: Path) -> None:
    assert "no RTL file is given" in refused(rtl)


def test_an_empty_list(rtl: Path) -> None:
    (rtl / "l.f").write_text("// nothing here\n")
    assert "no RTL file is given" in refused(rtl, "-f", "l.f")


def test_files_without_a_module(rtl: Path) -> None:
    (rtl / "empty.sv").write_text("")
    (rtl / "package.sv").write_text("package p; endpackage\n")
    assert "the files hold no module" in refused(rtl, "empty.sv")
    assert "the files hold no module" in refused(rtl, "package.sv")


def test_an_unknown_option(rtl: Path) -> None:
    assert "unknown command line argument '--frobnicate'" in refused(rtl, "m.sv", "--frobnicate")


def test_an_option_without_its_value(rtl: Path) -> None:
    for option in ("--top", "-I", "--std", "-G", "-v"):
        assert f"{option} needs a value" in refused(rtl, "m.sv", option), option


def test_a_wrong_value(rtl: Path) -> None:
    assert "invalid value for --std option" in refused(rtl, "m.sv", "--std", "1066")


def test_an_unknown_parameter(rtl: Path) -> None:
    text = refused(rtl, "m.sv", "-GWIDTH=3")
    assert text == "error: -G WIDTH: m has no such parameter\nhelp: its parameters: W"


def test_a_local_parameter_cannot_be_set(rtl: Path) -> None:
    (rtl / "l.sv").write_text("module l; localparam P = 1; endmodule\n")
    assert "-G P: l has no such parameter" in refused(rtl, "l.sv", "-GP=3")


def test_an_unknown_top(rtl: Path) -> None:
    assert refused(rtl, "m.sv", "--top", "mm") == "error: there is no module named mm\nhelp: known modules: m"


def test_several_tops(rtl: Path) -> None:
    (rtl / "n.sv").write_text("module n; endmodule\n")
    text = refused(rtl, "m.sv", "n.sv")
    assert text == "error: several modules could be the top: m, n\nhelp: choose one with --top"


def test_no_top(rtl: Path) -> None:
    (rtl / "ring.sv").write_text("module a; if (0) b u(); endmodule\nmodule b; if (0) a u(); endmodule\n")
    assert "no module can be the top" in refused(rtl, "ring.sv")


def test_a_syntax_error_is_shown_as_slang_prints_it(rtl: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(rtl)
    (rtl / "bad.sv").write_text("module bad(input c);\n  wire w = ;\nendmodule\n")
    with pytest.raises(CompileError) as caught:
        read(["bad.sv"])
    assert caught.value.render() == "bad.sv:2:12: error: expected expression\n  wire w = ;\n           ^"


def test_warnings_are_not_shown_with_errors(rtl: Path) -> None:
    (rtl / "bad.sv").write_text("module bad(input c);\n  wire w = 33'h1_ffff_ffff; wire v = gone;\nendmodule\n")
    text = refused(rtl, "bad.sv")
    assert "use of undeclared identifier 'gone'" in text
    assert "warning:" not in text


def test_a_missing_include(rtl: Path) -> None:
    (rtl / "i.sv").write_text('`include "gone.vh"\nmodule i; endmodule\n')
    assert "'gone.vh': No such file or directory" in refused(rtl, "i.sv")


def test_nothing_is_printed(rtl: Path, capfd: pytest.CaptureFixture[str]) -> None:
    bad = (("m.sv", "--frobnicate"), ("m.sv", "--top", "x"), ("gone.sv",), ("m.sv", "-Inowhere", "--top", "y"))
    for arguments in bad:
        refused(rtl, *arguments)
    assert capfd.readouterr() == ("", "")


def test_a_missing_include_folder_is_a_warning(rtl: Path) -> None:
    (warning,) = read(["m.sv", "-Inowhere"], str(rtl)).warnings
    assert "nowhere" in warning.message


def test_an_old_pyslang_is_refused(rtl: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def old(_: str) -> str:
        return "11.0.0"

    monkeypatch.setattr(diagnostics, "version", old)
    assert "pyslang 11.0.0 is too old" in refused(rtl, "m.sv")
