"""The designs' own testbenches by core: someone else's test of a rewrite."""

from collections.abc import Callable
from dataclasses import dataclass
from functools import partial
from pathlib import Path

from tests.cores.logik import BLOCKS, Logik
from tests.cores.picorv32 import Picorv32
from tests.cores.running import BenchRun, Rtl
from tests.cores.vexriscv import FULL, MIN, VexRiscv

Bench = Callable[[Rtl], BenchRun]
CORES_WITH_BENCH = ("picorv32", "picorv32_firmware", FULL.name, MIN.name, *BLOCKS)


@dataclass(frozen=True)
class Benches:
    """Every bench, sharing one scratch folder, so that firmware and harness are prepared once."""

    picorv32: Picorv32
    vexriscv: VexRiscv
    logik: Logik

    def of(self, core: str) -> tuple[Bench, ...]:
        """Give the benches of a core, quickest first; empty for a core without one."""
        if core == "picorv32":
            return (self.picorv32.small, self.picorv32.firmware_verilator)
        if core == "picorv32_firmware":
            return (self.picorv32.firmware_verilator, self.picorv32.firmware_icarus)
        if core in BLOCKS:
            return (partial(self.logik.run, core),)
        return tuple(partial(self.vexriscv.run, variant) for variant in (FULL, MIN) if variant.name == core)


def set_up(scratch: Path) -> Benches:
    """Set the benches up in a scratch folder; nothing is copied or built before the first run."""
    return Benches(Picorv32(scratch), VexRiscv(scratch), Logik(scratch))
