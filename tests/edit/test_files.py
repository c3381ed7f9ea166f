"""Files that are more than a list of modules: generated ones, and headers."""

from pathlib import Path

import pytest

from tests.edit.rewriting import rewrite_files
from tests.edit.test_blocks import HEAD

pytestmark = pytest.mark.simulator


def test_generated_files_are_named_in_a_warning(tmp_path: Path) -> None:
    text = f"// this file was automatically generated\n{HEAD}    always_ff @(posedge clk) if (en) q <= d;\nendmodule\n"
    done = rewrite_files(tmp_path, {"m.sv": text})
    (warning,) = done.rewrite.warnings
    assert warning.place == str(tmp_path / "m.sv")
    assert "generated" in warning.message


def test_an_include_file_that_is_read_once_is_edited(tmp_path: Path) -> None:
    (tmp_path / "body.svh").write_text("    always_ff @(posedge clk) if (en) q <= d;\n")
    done = rewrite_files(tmp_path, {"m.sv": f'{HEAD}`include "body.svh"\nendmodule\n'})
    assert "always_ff @(posedge gclk_q) if (en) q <= d;\n" in done.text("body.svh")
    done.again()
