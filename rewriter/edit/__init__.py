"""Edit the sources: cells, conditions, ports, and the byte ranges they replace."""

from rewriter.edit.apply import EditConflictError, apply
from rewriter.edit.options import EditOptions
from rewriter.edit.rewriting import edit

__all__ = ["EditConflictError", "EditOptions", "apply", "edit"]
