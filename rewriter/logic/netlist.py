"""The engine's word-level netlist, module by module."""

import json
import re
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property
from hashlib import sha256
from pathlib import Path
from typing import Any, cast

Bit = int | str
"""A net of one bit: a number, or a constant `0`, `1`, `x`, `z`."""

IGNORED = frozenset(("$print", "$check", "$assert", "$assume", "$cover", "$live", "$fair", "$scopeinfo"))
"""Cells that no hardware corresponds to."""

_DRIVER = re.compile(r"\$driver\$(.+?)(\[[\d:]+\])?\Z")


@dataclass(frozen=True)
class Port:
    """A port: its direction (`input`, `output`, `inout`) and bits, least first."""

    direction: str
    bits: tuple[Bit, ...]


@dataclass(frozen=True)
class Cell:
    """A cell or instance; `inputs` and `outputs` by port name, bits least first.

    `definition` is the type without the path that the engine adds to keep instances apart.
    """

    name: str
    type: str
    definition: str
    parameters: Mapping[str, int | str]
    inputs: Mapping[str, tuple[Bit, ...]]
    outputs: Mapping[str, tuple[Bit, ...]]

    @property
    def is_instance(self) -> bool:
        """Tell instances of modules from the engine's own cells."""
        return not self.type.startswith("$")

    @cached_property
    def numbers(self) -> dict[str, int]:
        """Give the parameters that are numbers."""
        return {name: value for name, value in self.parameters.items() if isinstance(value, int)}


@dataclass(frozen=True)
class Name:
    """A public name of a bit: the variable, the bit's place in it, and the index as the declaration counts."""

    variable: str
    place: int
    index: int

    def __str__(self) -> str:
        return f"{self.variable}[{self.index}]"


@dataclass(frozen=True)
class Module:
    """One module of the netlist; with hierarchy kept, one per instance.

    Args:
        name: `definition$top.path`, or the definition alone.
        definition: name of the definition.
        black_box: it has no body.
        init: initial values by bit, `0` or `1`.
        names: public names by bit.
        widths: of public names.
    """

    name: str
    definition: str
    black_box: bool
    ports: Mapping[str, Port]
    cells: tuple[Cell, ...]
    names: Mapping[int, tuple[Name, ...]]
    widths: Mapping[str, int]
    init: Mapping[int, str]
    digest: str

    @cached_property
    def instances(self) -> dict[str, Cell]:
        """Index the instances by name."""
        return {cell.name: cell for cell in self.cells if cell.is_instance}


@dataclass(frozen=True)
class Netlist:
    """An elaborated design.

    Args:
        top: key of the top module.
        modules: by name.
    """

    top: str
    modules: Mapping[str, Module]

    def instances(self) -> dict[str, Module]:
        """Give every module instance with a body, by hierarchical path, parents first."""
        top = self.modules[self.top]
        found: dict[str, Module] = {}
        stack = [(self.top, top)]
        while stack:
            path, module = stack.pop()
            found[path] = module
            for cell in reversed(module.instances.values()):
                below = self.modules.get(cell.type)
                if below is not None and not below.black_box:
                    stack.append((f"{path}.{cell.name}", below))
        return found


def read_netlist(path: Path, top: str) -> Netlist:
    """Read what the engine wrote."""
    with path.open(encoding="utf-8") as file:
        data = cast("dict[str, Any]", json.load(file))
    raw = cast("dict[str, dict[str, Any]]", data["modules"])
    reader = _Reader(
        {name: name.split(f"${top}.", 1)[0] for name in raw},
        {name: {port: p["direction"] for port, p in module["ports"].items()} for name, module in raw.items()},
    )
    return Netlist(top, {name: reader.module(name, module) for name, module in raw.items()})


@dataclass(frozen=True)
class _Reader:
    """Reads modules; knows the definition and the port directions of every module."""

    definitions: Mapping[str, str]
    directions: Mapping[str, Mapping[str, str]]

    def module(self, name: str, raw: dict[str, Any]) -> Module:
        attributes = raw["attributes"]
        names, widths, init = _nets(raw)
        return Module(
            name,
            self.definitions[name],
            any(_parameter(attributes.get(key, "0")) for key in ("blackbox", "whitebox")),
            {port: Port(body["direction"], tuple(body["bits"])) for port, body in raw["ports"].items()},
            tuple(self._cell(cell, body) for cell, body in raw["cells"].items() if body["type"] not in IGNORED),
            names,
            widths,
            init,
            self._digest(name, raw),
        )

    def _cell(self, name: str, raw: dict[str, Any]) -> Cell:
        kind = cast("str", raw["type"])
        directions = raw.get("port_directions") or self.directions.get(kind, {})
        inputs: dict[str, tuple[Bit, ...]] = {}
        outputs: dict[str, tuple[Bit, ...]] = {}
        for port, bits in raw["connections"].items():
            direction = directions.get(port, "inout")
            if direction != "output":
                inputs[port] = tuple(bits)
            if direction != "input":
                outputs[port] = tuple(bits)
        parameters = {key: _parameter(value) for key, value in raw["parameters"].items()}
        return Cell(name, kind, self.definitions.get(kind, kind), parameters, inputs, outputs)

    def _digest(self, name: str, raw: dict[str, Any]) -> str:
        """Identify the structure: equal for instances of one definition whose netlists are the same."""
        cells = [
            (
                cell if not body["hide_name"] else driven_variable(cell),
                self.definitions.get(body["type"], body["type"]),
                sorted(body["parameters"].items()),
                sorted(body["connections"].items()),
            )
            for cell, body in raw["cells"].items()
            if body["type"] not in IGNORED
        ]
        nets = [
            (net if not body["hide_name"] else "", body["bits"], body["attributes"].get("init"), body.get("offset"))
            for net, body in raw["netnames"].items()
            if not body["hide_name"] or "init" in body["attributes"]
        ]
        ports = [(port, body["direction"], body["bits"]) for port, body in raw["ports"].items()]
        text = json.dumps((self.definitions[name], ports, cells, nets), default=str)
        return sha256(text.encode()).hexdigest()


def _nets(raw: dict[str, Any]) -> tuple[dict[int, tuple[Name, ...]], dict[str, int], dict[int, str]]:
    """Give the public names of each bit, the widths of the public nets, and the initial values."""
    names: dict[int, list[Name]] = {}
    widths: dict[str, int] = {}
    init: dict[int, str] = {}
    for net, body in raw["netnames"].items():
        bits = cast("list[Bit]", body["bits"])
        start = cast("str", body["attributes"].get("init", ""))
        init |= {b: v for b, v in zip(bits, reversed(start), strict=False) if v in "01" and isinstance(b, int)}
        if body["hide_name"]:
            continue
        widths[net] = len(bits)
        offset, upto = cast("int", body.get("offset", 0)), body.get("upto")
        for place, bit in enumerate(bits):
            if isinstance(bit, int):
                index = offset + (len(bits) - 1 - place if upto else place)
                names.setdefault(bit, []).append(Name(net, place, index))
    # Short names first: a variable before the ports and copies that repeat it with a path.
    return {b: tuple(sorted(n, key=lambda x: (len(x.variable), x.variable))) for b, n in names.items()}, widths, init


def _parameter(value: object) -> int | str:
    text = str(value)
    # Numbers are written in binary; a text that looks like one ends in a blank.
    return int(text, 2) if text and not text.strip("01") else text


def driven_variable(cell: str) -> str:
    """Take the variable out of the name that the engine gives a register's cell; empty without."""
    found = _DRIVER.match(cell)
    return found[1] if found else ""
