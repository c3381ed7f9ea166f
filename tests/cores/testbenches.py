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

    def of(self, core: str, limit: float = 600) -> tuple[Bench, ...]:
        """Give the benches of a core, quickest first, each stopped after `limit` seconds of simulation."""
        if core == "picorv32":
            return _limited(limit, self.picorv32.small, self.picorv32.firmware_verilator)
        if core == "picorv32_firmware":
            return _limited(limit, self.picorv32.firmware_verilator, self.picorv32.firmware_icarus)
        if core in BLOCKS:
            return _limited(limit, partial(self.logik.run, core))
        (variant,) = (variant for variant in (FULL, MIN) if variant.name == core)
        return _limited(limit, partial(self.vexriscv.run, variant))


def _limited(limit: float, *benches: Callable[..., BenchRun]) -> tuple[Bench, ...]:
    return tuple(partial(bench, limit=limit) for bench in benches)


def set_up(scratch: Path) -> Benches:
    """Set the benches up in a scratch folder; nothing is copied or built before the first run."""
    return Benches(Picorv32(scratch), VexRiscv(scratch), Logik(scratch))
