"""The stages in order: what survey, rewrite and prove do, short of printing and writing."""

from rewriter.flow.checks import FaultError, verify_folder
from rewriter.flow.finished import Proved, prove_folder, prove_rtl
from rewriter.flow.job import Job, Progress
from rewriter.flow.loop import rewrite, survey

__all__ = [
    "FaultError",
    "Job",
    "Progress",
    "Proved",
    "prove_folder",
    "prove_rtl",
    "rewrite",
    "survey",
    "verify_folder",
]
