"""Prove rewritten RTL against its original: obligations, evidence, and their orchestration."""

from rewriter.prove.job import prove

__all__ = ["prove"]
