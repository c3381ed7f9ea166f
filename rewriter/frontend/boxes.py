"""Black boxes: what the connections of modules without source tell of their ports."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

import re
from collections import defaultdict
from collections.abc import Iterable, Iterator

from pyslang.analysis import AnalysisManager
from pyslang.ast import Expression, SimpleAssertionExpr, UninstantiatedDefSymbol, ValueSymbol

from rewriter.frontend.bits import slang_bits
from rewriter.frontend.bodies import Body
from rewriter.frontend.drivers import LazyDrivers
from rewriter.frontend.expressions import Expressions
from rewriter.model.design import BlackBox, BoxPort
from rewriter.model.expr import Concatenation, Expr, Reference, Select

_PARAMETER = re.compile(r"\.\s*(\w+)\s*\(")


def black_boxes(bodies: Iterable[Body], drivers: LazyDrivers, analysis: AnalysisManager) -> tuple[BlackBox, ...]:
    """Describe every module without source, once per name.

    A connection is taken as an output where it is a plain variable or net that nothing else drives.
    """
    found: defaultdict[str, list[tuple[UninstantiatedDefSymbol, Expressions]]] = defaultdict(list)
    for body in bodies:
        for box in body.unknown:
            found[box.definitionName].append((box, drivers.expressions(body.key)))
    return tuple(_box(name, uses, analysis) for name, uses in found.items())


def _box(name: str, uses: list[tuple[UninstantiatedDefSymbol, Expressions]], analysis: AnalysisManager) -> BlackBox:
    ports: dict[str, BoxPort] = {}
    parameters: dict[str, None] = {}
    for box, expressions in uses:
        parameters.update(dict.fromkeys(_parameters(box)))
        for port in _ports(box, expressions, analysis):
            known = ports.get(port.name, port)
            ports[port.name] = BoxPort(
                port.name, max(port.width, known.width), is_output=port.is_output or known.is_output
            )
    return BlackBox(name, tuple(ports.values()), tuple(parameters))


def _ports(box: UninstantiatedDefSymbol, expressions: Expressions, analysis: AnalysisManager) -> Iterator[BoxPort]:
    for place, (name, connection) in enumerate(zip(box.portNames, box.portConnections, strict=True)):
        value = connection.expr if isinstance(connection, SimpleAssertionExpr) else None
        lowered = expressions.lower(value) if isinstance(value, Expression) and value.type.isIntegral else None
        is_output = lowered is not None and _is_free(lowered, expressions, analysis)
        yield BoxPort(name or f"port{place}", max(lowered.width, 1) if lowered else 1, is_output=is_output)


def _is_free(expr: Expr, expressions: Expressions, analysis: AnalysisManager) -> bool:
    """Say whether an expression can be written, and nothing drives any bit of it."""
    match expr:
        case Reference(name=name, is_parameter=False):
            return not _driven(name, None, expressions, analysis)
        case Select(bits=bits):
            root = expr
            while isinstance(root, Select) and root.value is not None:
                root = root.value
            return isinstance(root, Reference) and not _driven(root.name, bits, expressions, analysis)
        case Concatenation(parts=parts, count=1):
            return all(_is_free(part, expressions, analysis) for part in parts)
        case _:
            return False


def _driven(name: str, bits: tuple[int, int] | None, expressions: Expressions, analysis: AnalysisManager) -> bool:
    symbol = expressions.names.symbol(name)
    if not isinstance(symbol, ValueSymbol):
        return True
    for driver in analysis.getDrivers(symbol):
        msb, lsb = slang_bits(driver.bounds, symbol.type)
        if bits is None or (msb >= bits[1] and lsb <= bits[0]):
            return True
    return False


def _parameters(box: UninstantiatedDefSymbol) -> list[str]:
    syntax = box.syntax.parent if box.syntax is not None else None
    text = str(getattr(syntax, "parameters", None) or "")
    return _PARAMETER.findall(text) or [f"parameter{place}" for place in range(len(box.paramExpressions))]
