"""Planted faults on a real core: a sample; `python -m tests.cores.killrate` gives the published rates."""

from collections.abc import Callable
from pathlib import Path

import pytest

from tests.cores.faults import plant
from tests.cores.killrate import kill_rate, table, workplace
from tests.cores.proving import Proof, Prover
from tests.cores.rewriting import Rewritten
from tests.cores.testbenches import Benches

KINDS = ("term-dropped", "or-for-and", "wrong-wake", "wrong-clock", "wrong-edge", "no-latch", "override-tied")
UNPROVED = Proof("unproved", named=False)
Rewriter = Callable[[str], Rewritten]


@pytest.mark.core
@pytest.mark.bench
@pytest.mark.simulator
@pytest.mark.engine
@pytest.mark.slow
def test_the_proof_kills_what_the_small_bench_lets_live(rewritten: Rewriter, benches: Benches, tmp_path: Path) -> None:
    rewrite = rewritten("picorv32")
    place = workplace(rewrite, (benches.picorv32.small,), tmp_path / "faulty")
    faults = plant(place.text, rewrite.registers, count=len(KINDS), kinds=KINDS)
    outcomes = kill_rate(place, faults, Prover(rewrite, tmp_path))
    unnamed = [outcome for outcome in outcomes if not (outcome.proof and outcome.proof.named)]
    # Without its latch a gated clock is no clock the prover accepts, and so nothing behind it is proved.
    assert [outcome.kind for outcome in unnamed if outcome.proof != UNPROVED] == [], unnamed
    assert {outcome.kind for outcome in unnamed} <= {"no-latch"}, unnamed
    assert any(outcome.bench for outcome in outcomes), table(outcomes)
    assert not all(outcome.bench for outcome in outcomes), table(outcomes)
