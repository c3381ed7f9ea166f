"""Planted faults on a real core: a sample; `python -m tests.cores.killrate` gives the published rates."""

from collections.abc import Callable
from pathlib import Path

import pytest

from tests.cores.faults import KINDS, plant
from tests.cores.killrate import kill_rate, table, workplace
from tests.cores.proving import Prover
from tests.cores.rewriting import Rewritten
from tests.cores.testbenches import Benches

Rewriter = Callable[[str], Rewritten]


@pytest.mark.core
@pytest.mark.bench
@pytest.mark.simulator
@pytest.mark.engine
@pytest.mark.slow
def test_the_proof_kills_what_the_small_bench_lets_live(rewritten: Rewriter, benches: Benches, tmp_path: Path) -> None:
    rewrite = rewritten("picorv32")
    place = workplace(rewrite, (benches.picorv32.small,), tmp_path / "faulty")
    faults = plant(place.text, rewrite.registers, count=len(KINDS), seed=2)
    outcomes = kill_rate(place, faults, Prover(rewrite, tmp_path))
    assert all(outcome.proof and outcome.proof.killed and outcome.proof.named for outcome in outcomes), outcomes
    assert any(outcome.bench for outcome in outcomes), table(outcomes)
    assert not all(outcome.bench for outcome in outcomes), table(outcomes)
