from collections.abc import Callable
from functools import cache

import pytest

from tests.cores.rewriting import Rewritten, rewrite
from tests.cores.testbenches import Benches, set_up

Rewriter = Callable[[str], Rewritten]


@pytest.fixture(scope="session")
def rewritten(tmp_path_factory: pytest.TempPathFactory) -> Rewriter:
    """Rewrite a core by its name, once per session."""

    @cache
    def once(core: str) -> Rewritten:
        return rewrite(core, tmp_path_factory.mktemp(core) / "out")

    return once


@pytest.fixture(scope="session")
def benches(tmp_path_factory: pytest.TempPathFactory) -> Benches:
    """Share one scratch folder among all testbenches: firmware and harness are prepared once."""
    return set_up(tmp_path_factory.mktemp("benches"))
