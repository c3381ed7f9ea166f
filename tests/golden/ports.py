"""The ports of a top module, as slang elaborates it."""

from collections.abc import Sequence
from dataclasses import dataclass
from typing import cast

from pyslang.ast import ArgumentDirection, Compilation, InstanceSymbol, PortSymbol
from pyslang.driver import Driver


@dataclass(frozen=True)
class Port:
    """One port: its direction (`in`, `out`, `inout`) and its bits."""

    name: str
    direction: str
    width: int


@dataclass(frozen=True)
class Top:
    """A top module with its ports in order."""

    name: str
    ports: tuple[Port, ...]

    def of(self, direction: str) -> list[Port]:
        return [port for port in self.ports if port.direction == direction]


_DIRECTIONS = {ArgumentDirection.In: "in", ArgumentDirection.Out: "out", ArgumentDirection.InOut: "inout"}


def slang(arguments: Sequence[str]) -> tuple[Driver, Compilation]:
    """Read RTL with slang itself; the caller keeps both alive while it looks at symbols."""
    driver = Driver()
    driver.addStandardArgs()
    quoted = " ".join('"' + word.replace("\\", "\\\\").replace('"', '\\"') + '"' for word in ("slang", *arguments))
    assert driver.parseCommandLine(quoted)
    assert driver.processOptions()
    assert driver.parseAllSources(), arguments
    return driver, driver.createCompilation()


def diagnostics(arguments: Sequence[str]) -> list[str]:
    """Give the codes of everything slang has to say, sorted."""
    _, compilation = slang(arguments)
    return sorted(str(found.code) for found in compilation.getAllDiagnostics())


def top_of(arguments: Sequence[str]) -> Top:
    """Find the one top module that is no wrapper of ours."""
    driver, compilation = slang(arguments)
    compilation.getAllDiagnostics()
    instances = cast("list[InstanceSymbol]", compilation.getRoot().topInstances)  # pyright: ignore[reportUnknownMemberType]
    (top,) = [one for one in instances if not one.name.startswith("stillclock_icg")]
    symbols = cast("list[PortSymbol]", top.body.portList)  # pyright: ignore[reportUnknownMemberType]
    ports = tuple(Port(symbol.name, _DIRECTIONS[symbol.direction], symbol.type.bitWidth) for symbol in symbols)
    name = str(top.name)
    del instances, top, symbols, driver  # symbols must not outlive the driver
    return Top(name, ports)
