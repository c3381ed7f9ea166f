"""The regression of VexRiscv: a C++ model in lock step with the RTL, on Verilator.

Source of the expected figures: the regression itself on the unchanged RTL. The package ships RTL that is newer than the
harness, so the harness is mended here, by our own small edits: inputs driven that the harness does not know, the byte
lanes of the bus, and a compiler flag that this Verilator needs.
"""

import re
import shutil
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path

from tests.cores.corpus import SITE, package
from tests.cores.running import BenchRun, Job, Rtl, bring, compiler_cache, copy_tree, replace_once, run_job

_VERILOG = SITE / "pythondata_cpu_vexriscv" / "verilog"
_TEST = Path("verilog", "ext", "VexRiscv", "src", "test")
_SUCCESS = re.compile(r"REGRESSION (?:SUCCESS|FAILURE) (\d+)/(\d+)")
_COMMON = ("MMU=no", "DEBUG_PLUGIN=no", "CSR=yes", "CSR_SKIP_TEST=yes", "EXTERNAL_INTERRUPT=no")
_FIXED = ("REDO=1", "THREAD_COUNT=1", "SEED=42")


@dataclass(frozen=True)
class Variant:
    """One configuration of the core: its RTL, what make is told about it, and how many tests it must pass."""

    name: str
    rtl: Path
    settings: tuple[str, ...]
    tests: int


FULL = Variant("vexriscv_full", _VERILOG / "VexRiscv_Full.v", ("IBUS=CACHED_WISHBONE", "DBUS=CACHED_WISHBONE"), 99)
MIN = Variant(
    "vexriscv_min",
    _VERILOG / "VexRiscv_Min.v",
    ("IBUS=SIMPLE_WISHBONE", "DBUS=SIMPLE_WISHBONE", "MUL=no", "DIV=no"),
    81,
)


@dataclass(frozen=True)
class VexRiscv:
    """The regression in a scratch folder."""

    scratch: Path

    @cached_property
    def regression(self) -> Path:
        """A copy of the regression's folder with the harness mended."""
        source = _TEST / "cpp" / "regression"
        folder = copy_tree("pythondata_cpu_vexriscv", str(source), self.scratch / "vexriscv-regression")
        for name, mend in (("main.cpp", _mend_harness), ("makefile", _mend_makefile)):
            path = folder / name
            path.write_text(mend(path.read_text(encoding="utf-8")), encoding="utf-8")
        return folder

    def run(self, variant: Variant, rtl: Rtl, limit: float = 120) -> BenchRun:
        """Run the regression on a variant: passes when every one of its tests does (20 s to build, 1 s to run)."""
        folder = self._folder(variant, rtl)
        objects, environment = compiler_cache(self.scratch / "ccache")
        sources = bring((rtl.of(variant.rtl), *rtl.extra), folder, "rtl")
        defines = "".join(f" -D{define}" for define in rtl.defines)
        settings = (
            f"VEXRISCV_FILE={' '.join(sources)}",
            # Warnings about the cell (a latch) must not stop the build; lint has a test of its own.
            f"VERILATOR_ARGS=--prefix VVexRiscv --top-module VexRiscv -Wno-fatal{defines}",
        )
        return run_job(
            Job(
                f"{variant.name} regression, Verilator",
                folder,
                build=(("make", "compile", *objects, *settings, *variant.settings, *_COMMON, *_FIXED),),
                simulate=("./obj_dir/VVexRiscv",),
                verdict=lambda output: _verdict(output, variant.tests),
                limit=limit,
                environment=environment,
            )
        )

    def _folder(self, variant: Variant, rtl: Rtl) -> Path:
        """Lay out `src/test` as the harness expects it; the big folders it only reads are links."""
        root = self.scratch / variant.name
        shutil.rmtree(root, ignore_errors=True)
        original = package("pythondata_cpu_vexriscv") / _TEST
        folder = root / "cpp" / "regression"
        shutil.copytree(self.regression, folder)
        (root / "resources").symlink_to(original / "resources")
        for name in ("raw", "custom"):
            (root / "cpp" / name).symlink_to(original / "cpp" / name)
        if rtl.test_port is not None:
            path = folder / "main.cpp"
            path.write_text(_drive_test_port(path.read_text(encoding="utf-8"), rtl), encoding="utf-8")
        return folder


def _mend_harness(text: str) -> str:
    """Let the older harness drive the newer RTL."""
    text = replace_once(text, "\t\ttop->reset = 1;\n", f"{_INPUTS}\t\ttop->reset = 1;\n")
    text = replace_once(text, "\t\ttop->externalInterrupt = 1;\n", "")
    text = replace_once(
        text,
        "ws->dBusAccess(top->dBusWishbone_ADR << 2 ,1,2,top->dBusWishbone_SEL,&top->dBusWishbone_DAT_MOSI,&dummy);",
        _BYTE_LANES,
    )
    return replace_once(
        text,
        "ws->dBusAccess(top->dBusWishbone_ADR << 2,0,2,0xF,&top->dBusWishbone_DAT_MISO,&error);",
        "ws->dBusAccess(top->dBusWishbone_ADR << 2, 0, 4, (uint8_t*)&top->dBusWishbone_DAT_MISO, &error);",
    )


_INPUTS = """\
		top->clk = 0;
		top->externalInterruptArray = 0;
		top->externalResetVector = 0x80000000u;
		top->softwareInterrupt = 0;
		top->timerInterrupt = 0;
"""
_BYTE_LANES = """{
                    uint32_t lanes = top->dBusWishbone_SEL;
                    int first = __builtin_ctz(lanes), count = __builtin_popcount(lanes);
                    uint8_t *bytes = (uint8_t*)&top->dBusWishbone_DAT_MOSI;
                    ws->dBusAccess((top->dBusWishbone_ADR << 2) + first, 1, count, bytes + first, &dummy);
                }"""


def _mend_makefile(text: str) -> str:
    text = replace_once(text, "-CFLAGS -std=c++11", "-CFLAGS -std=c++14")
    return replace_once(text, " --gdbbt ", " ")


def _drive_test_port(text: str, rtl: Rtl) -> str:
    """Hold the test port: the harness starts inputs at random levels, and an override would hide every fault."""
    place = "\t\ttop->clk = 0;\n\t\ttop->reset = 0;\n"
    return replace_once(text, place, f"\t\ttop->{rtl.test_port} = {rtl.test_level or 0};\n{place}")


def _verdict(output: str, tests: int) -> tuple[bool, Mapping[str, int]]:
    found = _SUCCESS.search(output)
    if found is None:
        return False, {}
    figures = {"passed": int(found[1]), "tests": int(found[2])}
    return "REGRESSION SUCCESS" in output and figures == {"passed": tests, "tests": tests}, figures
