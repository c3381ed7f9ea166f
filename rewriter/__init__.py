"""Rewrite synthesizable SystemVerilog so that registers which only hold their value stop being clocked."""

from importlib.metadata import version

__version__ = version("stillclock")
