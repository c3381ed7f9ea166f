"""Prove many cases in one run of the engine, below a top module that instantiates them all."""

from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path

from rewriter import frontend
from rewriter.analysis.temporaries import all_of
from rewriter.model.evidence import Limits, ProofJob, ProofResult
from rewriter.prove import prove
from tests.golden.lockstep import Device

TOP = "every_case"


@dataclass(frozen=True)
class Pair:
    """A case to prove: its device, and what slang reads of each side."""

    device: Device
    gold: tuple[str, ...]
    gate: tuple[str, ...]


def prove_all(pairs: Sequence[Pair], cells: dict[str, str], folder: Path) -> ProofResult:
    """Prove the pairs together; instance `case_N` is the N-th pair."""
    sides: list[tuple[str, ...]] = []
    for gate in (False, True):
        top = folder / ("gate_top.sv" if gate else "gold_top.sv")
        top.write_text(_top([pair.device for pair in pairs], gate=gate), encoding="utf-8")
        files = [argument for pair in pairs for argument in (pair.gate if gate else pair.gold)]
        if gate:
            for name, text in cells.items():
                (folder / name).write_text(text, encoding="utf-8")
                files.append(str(folder / name))
        sides.append((str(top), *files, "--top", TOP, "--timescale", "1ns/1ps"))
    gold, gate_design = (frontend.read(side) for side in sides)
    job = ProofJob(
        gold.source,
        gate_design.source,
        TOP,
        cells,
        "test_en",
        limits=Limits(20, 300),
        stubs=gold.stubs,
        temporaries=all_of(gold),
    )
    return prove(job, lambda _: None)


def _top(devices: Sequence[Device], *, gate: bool) -> str:
    ports: list[str] = []
    instances: list[str] = []
    for number, device in enumerate(devices):
        connections: list[str] = []
        for place, port in enumerate(device.top.ports):
            name = f"p{number}_{place}"
            ports.append(f"{_WORDS[port.direction]} [{port.width - 1}:0] {name}")
            connections.append(f".\\{port.name} ({name})")
        if gate and device.test:
            connections.append(f".{device.test}(test_en)")
        instances.append(f"    \\{device.top.name} case_{number} ({', '.join(connections)});")
    ports.append("input wire test_en")
    return "\n".join([f"module {TOP} (", ",\n".join(ports), ");", *instances, "endmodule", ""])


_WORDS = {"in": "input wire", "out": "output wire", "inout": "inout wire"}
