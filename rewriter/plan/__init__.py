"""Which registers share a cell, and which banks are worth one."""

from rewriter.plan.choose import choose
from rewriter.plan.settle import settle

__all__ = ["choose", "settle"]
