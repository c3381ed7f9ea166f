"""The clocked benches of the small blocks, on Icarus."""

import shutil
from dataclasses import dataclass
from pathlib import Path

from tests.cores.corpus import CORES, core
from tests.cores.running import BenchRun, Job, Rtl, bring, run_job

_VERILOG_2005 = ("logik_conv2d",)  # its memory wrapper is no SystemVerilog

BLOCKS = tuple(name for name, found in CORES.items() if name.startswith("logik_") and found.testbench())


@dataclass(frozen=True)
class Logik:
    """The benches of the small blocks in a scratch folder."""

    scratch: Path

    def run(self, name: str, rtl: Rtl, limit: float = 60) -> BenchRun:
        """Run a block's own bench: passes when it prints PASSED (vvp ends with 0 in any case)."""
        folder = self.scratch / name
        shutil.rmtree(folder, ignore_errors=True)
        folder.mkdir(parents=True)
        block = core(name)
        files = bring((*block.testbench(), *(rtl.of(path) for path in block.sources()), *rtl.extra), folder, "rtl")
        language = "-g2005" if name in _VERILOG_2005 else "-g2012"
        top = f"test_{name.removeprefix('logik_')}_smoke"
        defines = tuple(f"-D{define}" for define in rtl.defines)
        return run_job(
            Job(
                f"{name}, Icarus",
                folder,
                build=(("iverilog", language, "-s", top, *defines, "-o", "bench.vvp", *files),),
                simulate=("vvp", "-N", "bench.vvp"),
                verdict=lambda output: ("PASSED" in output and "FAILED" not in output, {}),
                limit=limit,
            )
        )
