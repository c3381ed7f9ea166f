"""Ways in which registers hold, in order of precedence."""

from rewriter.methods.enable import ENABLE
from rewriter.model.plan import Method

METHODS: tuple[Method, ...] = (ENABLE,)

__all__ = ["METHODS"]
