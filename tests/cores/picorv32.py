"""The testbenches of picorv32: the small bus log, and the full firmware on Icarus and on Verilator.

Source of the expected figures: the bench itself on the unchanged RTL (461369 cycles on Icarus, one fewer on Verilator,
whose harness starts the clock differently).
"""

import re
import shutil
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from pathlib import Path

from tests.cores.corpus import SITE
from tests.cores.running import (
    ORIGINAL,
    BenchRun,
    Job,
    Rtl,
    Verdict,
    bring,
    compiler_cache,
    copy_tree,
    replace_once,
    require,
    run,
    run_job,
)

RTL = SITE / "pythondata_cpu_picorv32" / "verilog" / "picorv32.v"
_MAKE = ("make", "TOOLCHAIN_PREFIX=riscv64-unknown-elf-")
_TRAP = re.compile(r"TRAP after (\d+) clock cycles")
_CYCLES = re.compile(r"stillclock-cycles (\d+)")
_BUS = re.compile(r"^(?:ifetch|read|write) .*$", re.MULTILINE)
_ICARUS_CYCLES = 461369
_VERILATOR_CYCLES = 461368


@dataclass(frozen=True)
class Picorv32:
    """The benches of picorv32 in a scratch folder; what they share is built once."""

    scratch: Path

    @cached_property
    def tree(self) -> Path:
        """A copy of the package with the firmware built, copied again for each run."""
        require("riscv64-unknown-elf-gcc")
        tree = copy_tree("pythondata_cpu_picorv32", "verilog", self.scratch / "picorv32")
        built = run((*_MAKE, "firmware/firmware.hex"), tree)
        assert built.status == 0, f"the firmware does not build:\n{built.output}"
        return tree

    @cached_property
    def bus_log(self) -> tuple[str, ...]:
        """The bus transactions of the small bench on the original."""
        log = _bus(self._small(ORIGINAL, self._folder("picorv32-bus"), 60).log)
        assert len(log) > 100, "the small bench of the original prints no bus log"
        return log

    def small(self, rtl: Rtl, limit: float = 60) -> BenchRun:
        """Run `make test_ez`: passes when the bus log equals the original's (under a second)."""
        expected = self.bus_log
        return self._small(rtl, self._folder("picorv32-small"), limit, expected)

    def firmware_icarus(self, rtl: Rtl, limit: float = 300) -> BenchRun:
        """Run `make test`: the whole firmware on Icarus (half a minute)."""
        folder = self._setup(rtl, "picorv32-icarus")
        return run_job(
            Job(
                "picorv32 firmware, Icarus",
                folder,
                build=((*_MAKE, f"IVERILOG={_icarus(rtl, folder)}", "testbench.vvp"),),
                simulate=("vvp", "-N", "testbench.vvp"),
                verdict=_firmware_verdict(_ICARUS_CYCLES),
                limit=limit,
            )
        )

    def firmware_verilator(self, rtl: Rtl, limit: float = 60) -> BenchRun:
        """Run `make test_verilator`: the whole firmware on Verilator (20 s to build, a second to run)."""
        folder = self._setup(rtl, "picorv32-verilator")
        objects, environment = compiler_cache(self.scratch / "ccache")
        return run_job(
            Job(
                "picorv32 firmware, Verilator",
                folder,
                build=((*_MAKE, *objects, f"VERILATOR={_verilator(rtl, folder)}", "testbench_verilator"),),
                simulate=("./testbench_verilator",),
                verdict=_firmware_verdict(_VERILATOR_CYCLES),
                limit=limit,
                environment=environment,
            )
        )

    def _small(self, rtl: Rtl, folder: Path, limit: float, expected: tuple[str, ...] = ()) -> BenchRun:
        self._fill(rtl, folder)
        return run_job(
            Job(
                "picorv32 test_ez, Icarus",
                folder,
                build=((*_MAKE, f"IVERILOG={_icarus(rtl, folder)}", "testbench_ez.vvp"),),
                simulate=("vvp", "-N", "testbench_ez.vvp"),
                verdict=lambda output: _bus_verdict(output, expected),
                limit=limit,
            )
        )

    def _setup(self, rtl: Rtl, name: str) -> Path:
        folder = self._folder(name)
        self._fill(rtl, folder)
        return folder

    def _folder(self, name: str) -> Path:
        folder = self.scratch / name
        shutil.rmtree(folder, ignore_errors=True)
        return folder

    def _fill(self, rtl: Rtl, folder: Path) -> None:
        shutil.copytree(self.tree, folder)
        shutil.copyfile(rtl.of(RTL), folder / "picorv32.v")
        _edit_harness(rtl, folder)


def _edit_harness(rtl: Rtl, folder: Path) -> None:
    """Drive the test port, and count all clock cycles where the cells count their pulses."""
    ports = _modules_with_port((folder / "picorv32.v").read_text(encoding="utf-8"), rtl.test_port)
    for name, tested in (("testbench.v", "picorv32_axi"), ("testbench_ez.v", "picorv32")):
        path = folder / name
        text = path.read_text(encoding="utf-8")
        if rtl.test_level is not None and tested in ports:
            text = replace_once(text, " uut (", f" uut (.{rtl.test_port}(1'b{rtl.test_level}),")
        path.write_text(_count_cycles(text, rtl), encoding="utf-8")
    if "STILLCLOCK_COUNT" in rtl.defines:
        path = folder / "testbench.cc"  # the harness never runs the final blocks
        text = path.read_text(encoding="utf-8")
        path.write_text(replace_once(text, "delete top;", "top->final();\n\tdelete top;"), encoding="utf-8")


def _modules_with_port(text: str, port: str | None) -> frozenset[str]:
    """Give the modules whose port list names the test port: a module outside the rewritten design has none."""
    heads = re.finditer(r"^module\s+(\w+)(.*?)\);", text, re.MULTILINE | re.DOTALL)
    return frozenset(head[1] for head in heads if port and re.search(rf"\b{port}\b", head[2]))


def _count_cycles(text: str, rtl: Rtl) -> str:
    place = "\tinteger cycle_counter;"
    if "STILLCLOCK_COUNT" not in rtl.defines or place not in text:
        return text
    counter = (
        "\tinteger stillclock_cycles = 0;\n"
        "\talways @(posedge clk) stillclock_cycles <= stillclock_cycles + 1;\n"
        '\tfinal $display("stillclock-cycles %0d", stillclock_cycles);\n'
    )
    return replace_once(text, place, counter + place)


def _icarus(rtl: Rtl, folder: Path) -> str:
    return _with_sources("iverilog -g2012", rtl, folder)


def _verilator(rtl: Rtl, folder: Path) -> str:
    # Warnings about the cell (a latch, no timescale) must not stop the build; lint has a test of its own.
    return _with_sources("verilator -Wno-fatal", rtl, folder)


def _with_sources(program: str, rtl: Rtl, folder: Path) -> str:
    """Give the value of the makefile's program variable: the way to add files without editing the makefile."""
    defines = [f"-D{define}" for define in rtl.defines]
    return " ".join([program, *defines, *bring(rtl.extra, folder, "stillclock_extra")])


def _bus(log: str) -> tuple[str, ...]:
    return tuple(_BUS.findall(log))


def _bus_verdict(output: str, expected: tuple[str, ...]) -> tuple[bool, Mapping[str, int]]:
    found = _bus(output)
    equal = sum(1 for ours, theirs in zip(found, expected, strict=False) if ours == theirs)
    return found == expected, {"transactions": len(found), "equal": equal}


def _firmware_verdict(cycles: int) -> Verdict:
    def verdict(output: str) -> tuple[bool, Mapping[str, int]]:
        trap = _TRAP.search(output)
        clocks = _CYCLES.search(output)
        figures = {"cycles": int(trap[1])} if trap else {}
        counted = {"clock cycles": int(clocks[1])} if clocks else {}
        passed = "ALL TESTS PASSED." in output and figures.get("cycles") == cycles
        return passed, {**figures, **counted}

    return verdict
