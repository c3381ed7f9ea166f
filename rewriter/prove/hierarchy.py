"""The rewritten design as a tree of proved module instances."""

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cached_property

from rewriter.logic.aig import Lit
from rewriter.logic.netlist import Cell
from rewriter.prove.module import ModuleProof
from rewriter.prove.pair import Side


@dataclass(frozen=True)
class Hierarchy:
    """Module instances by path; those the engine or the prover could not read are absent.

    Args:
        top: path of the top instance.
        proofs: by path, parents first.
    """

    top: str
    proofs: Mapping[str, ModuleProof]

    def side(self, path: str) -> Side:
        """Give the rewritten text's side of an instance."""
        return self.proofs[path].comparison.gate

    def child(self, path: str, instance: str) -> str | None:
        """Give the path of an instance below another, None for black boxes."""
        below = f"{path}.{instance}"
        return below if below in self.proofs else None

    def parent(self, path: str) -> tuple[str, Cell] | None:
        """Give the instance above, and the cell there that stands for this one; None at the top."""
        return self._parents.get(path)

    def driver_above(self, path: str, port: str, place: int) -> tuple[str, Lit] | None:
        """Give what is connected to an input port, as a literal of the instance above."""
        above = self.parent(path)
        if above is None:
            return None
        nets = above[1].inputs.get(port, ())
        return (above[0], self.side(above[0]).cone.bit(nets[place])[0]) if place < len(nets) else None

    def driver_below(self, path: str, instance: str, port: str, place: int) -> tuple[str, Lit] | None:
        """Give what drives the output port of an instance, as a literal of that instance; None for black boxes."""
        below = self.child(path, instance)
        if below is None:
            return None
        side = self.side(below)
        return below, side.cone.bit(side.module.ports[port].bits[place])[0]

    @cached_property
    def holding(self) -> frozenset[str]:
        """Give the instances that hold cells, at any depth."""
        found: set[str] = set()
        for path, proof in self.proofs.items():
            while proof.cells and path not in found:
                found.add(path)
                above = self.parent(path)
                if above is None:
                    break
                path = above[0]  # noqa: PLW2901 (a walk to the top)
        return frozenset(found)

    @cached_property
    def _parents(self) -> dict[str, tuple[str, Cell]]:
        return {
            below: (path, cell)
            for path in self.proofs
            for name, cell in self.side(path).module.instances.items()
            if (below := self.child(path, name)) is not None
        }
