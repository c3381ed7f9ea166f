"""Module bodies: clocked blocks, and the variables they touch with everything else that writes them."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Iterator
from dataclasses import dataclass

from pyslang.ast import (
    InstanceBodySymbol,
    ParameterSymbol,
    PortSymbol,
    ProceduralBlockSymbol,
    Symbol,
    ValueSymbol,
)

from rewriter.frontend.blocks import is_clocked, lower_block
from rewriter.frontend.bodies import Body
from rewriter.frontend.census import blocking_only, count
from rewriter.frontend.clocking import EventPorts, clock_drivers, data_uses
from rewriter.frontend.declarations import Declarations
from rewriter.frontend.drivers import LazyDrivers, writers_of
from rewriter.frontend.elaboration import Elaboration
from rewriter.frontend.expressions import Expressions
from rewriter.frontend.mentions import shared_symbols
from rewriter.frontend.names import Names, is_parameter
from rewriter.model.design import ClockedBlock, Module
from rewriter.model.source import Span
from rewriter.model.statement import Assign, Opaque, Target


@dataclass
class Lowering:
    """Hold what lowering any body needs."""

    elaboration: Elaboration
    texts: dict[str, bytes]
    ports: EventPorts
    declarations: Declarations
    drivers: LazyDrivers
    outside: dict[str, frozenset[str]]
    flop_bits: int = 0
    array_bits: int = 0

    def module(self, body: Body) -> Module:
        """Lower one canonical body, and count its bits for every instance of it."""
        symbol = body.symbol
        locator = self.elaboration.locator
        names = Names(symbol)
        expressions = Expressions(symbol, names, locator, self.texts)
        self.drivers.add(body.key, expressions)
        clocked = [block for block in body.procedures if is_clocked(block)]
        blocks = tuple(lower_block(block, expressions, locator, self.texts) for block in clocked)
        written = {target.variable for block in blocks for target in targets(block) if not target.is_local}
        values = {path: s for path, s in names.met().items() if isinstance(s, ValueSymbol) and not is_parameter(s)}
        in_ports = {
            port.internalSymbol
            for port in symbol.portList
            if isinstance(port, PortSymbol) and port.internalSymbol is not None
        }
        analysis = self.elaboration.analysis
        module = Module(
            key=body.key,
            definition=symbol.definition.name,
            instances=tuple(body.instances),
            parameters=tuple(_parameters(symbol)),
            blocks=blocks,
            variables={path: self.declarations.variable(s, path, is_port=s in in_ports) for path, s in values.items()},
            writers={path: writers_of(values[path], analysis, locator) for path in sorted(written) if path in values},
            clock_uses=self._clock_uses(body, blocks, names),
            drives_clocks=self._drives_clocks(body, clocked, written, names),
            external_references=self.outside.get(body.key, frozenset()),
        )
        flops, arrays = count(module, self._read_outside(body, module, names))
        self.flop_bits += flops * len(body.instances)
        self.array_bits += arrays * len(body.instances)
        return module

    def _read_outside(self, body: Body, module: Module, names: Names) -> frozenset[str]:
        """Find variables that a clocked block writes with `=` alone, and that are used elsewhere as well."""
        candidates = frozenset[str]().union(*map(blocking_only, module.blocks)) & module.variables.keys()
        if not candidates:
            return candidates
        shared = {names.path(symbol) for symbol in shared_symbols(body)}
        return frozenset(path for path in candidates if path in shared or module.variables[path].is_port)

    def _clock_uses(self, body: Body, blocks: tuple[ClockedBlock, ...], names: Names) -> dict[str, Span]:
        clocks: dict[Symbol, str] = {}
        for block in blocks:
            for path in block.clock.signal.reads() if block.clock else ():
                symbol = names.symbol(path)
                if symbol is not None:
                    clocks[symbol] = path
        uses = data_uses(body, clocks, self.elaboration.locator)
        return {clocks[symbol]: span for symbol, span in uses.items()}

    def _drives_clocks(
        self, body: Body, clocked: list[ProceduralBlockSymbol], written: set[str], names: Names
    ) -> dict[str, Span]:
        if not clocked:
            return {}
        locator = self.elaboration.locator
        found = clock_drivers(body, self.ports, self.elaboration.analysis)
        paths = ((names.path(symbol), place) for symbol, place in found.items())
        return {path: locator.span(place.sourceRange) for path, place in paths if path in written}


def targets(block: ClockedBlock) -> Iterator[Target]:
    """Give everything that a block writes."""
    for statement in block.body.walk():
        if isinstance(statement, Assign):
            yield from statement.targets
        elif isinstance(statement, Opaque):
            yield from statement.writes


def _parameters(symbol: InstanceBodySymbol) -> Iterator[str]:
    for parameter in symbol.parameters:
        if isinstance(parameter, ParameterSymbol) and not parameter.isLocalParam:
            yield f"{parameter.name}={parameter.value}"
