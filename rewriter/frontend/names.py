"""Names: paths of symbols within a module body."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from pyslang.ast import (
    EnumValueSymbol,
    GenvarSymbol,
    InstanceBodySymbol,
    ParameterSymbol,
    Symbol,
)


class Names:
    """Give the path of each symbol as one module body sees it.

    Variables declared inside procedural blocks could collide (`for (int i …)` twice), so their path
    carries the offset of the declaration: `blk.@120.i`.
    """

    def __init__(self, body: InstanceBodySymbol) -> None:
        self._body = body
        self._prefix = f"{body.hierarchicalPath}."
        self._paths: dict[Symbol, tuple[str, bool]] = {}
        self._symbols: dict[str, Symbol] = {}

    def path(self, symbol: Symbol) -> str:
        """Give the path within the body, or the full path of a symbol outside."""
        return self._look_up(symbol)[0]

    def is_outside(self, symbol: Symbol) -> bool:
        """Say whether a symbol lies outside the body."""
        return self._look_up(symbol)[1]

    def scope(self, symbol: Symbol) -> str:
        """Give the generate scope of a symbol with its final dot, empty at module level."""
        path = symbol.hierarchicalPath  # of a procedural block: its scope's, for it has no name
        return f"{path[len(self._prefix) :]}." if path.startswith(self._prefix) else ""

    def symbol(self, path: str) -> Symbol | None:
        """Give the symbol at a path that was met before, or that stands at module level; None when unknown."""
        found = self._symbols.get(path)
        return self._body.find(path) if found is None and path.isidentifier() else found

    def met(self) -> dict[str, Symbol]:
        """Give all symbols of the body met so far, by path."""
        return self._symbols

    def _look_up(self, symbol: Symbol) -> tuple[str, bool]:
        found = self._paths.get(symbol)
        if found is None:
            found = self._paths[symbol] = self._make(symbol)
            if not found[1]:
                self._symbols[found[0]] = symbol
        return found

    def _make(self, symbol: Symbol) -> tuple[str, bool]:
        path = symbol.hierarchicalPath
        owner = symbol.parentScope.containingInstance  # none for what packages hold
        inside = owner is not None and owner == self._body
        path = path.removeprefix(self._prefix)
        if is_local(symbol):
            scope, dot, name = path.rpartition(".")
            path = f"{scope}{dot}@{symbol.location.offset}.{name}"
        return path, not inside


def is_local(symbol: Symbol) -> bool:
    """Say whether a symbol is declared inside a procedural block (or a subroutine)."""
    return symbol.parentScope.isProceduralContext


def is_parameter(symbol: Symbol) -> bool:
    """Say whether a symbol is fixed at elaboration."""
    return isinstance(symbol, (ParameterSymbol, EnumValueSymbol, GenvarSymbol))
