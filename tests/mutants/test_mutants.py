"""Every term, edge and link of the demo and of picorv32 wrong, one at a time: each is found, or it is harmless.

Harmless is what the solver shows to lose no clock edge (tests/mutants/relation.py). The whole of picorv32 takes
minutes: here a sample of it is tried, and all of it with STILLCLOCK_MUTANTS=all in the environment.
"""

import os
from collections.abc import Sequence

import pytest

from tests.mutants.outcomes import Fate, Outcome, table
from tests.mutants.planting import Planted
from tests.mutants.relation import Relation
from tests.mutants.trial import Trial, sample, trial

pytestmark = [pytest.mark.engine, pytest.mark.slow]


@pytest.fixture(scope="module")
def demo() -> Trial:
    return trial("demo")


@pytest.fixture(scope="module")
def picorv32() -> Trial:
    return trial("picorv32")


def judged(tried: Trial, outcomes: Sequence[Outcome]) -> None:
    print(f"\n{table(outcomes)}")  # noqa: T201 - shown with -s
    wrong = [outcome for outcome in outcomes if outcome.wrong]
    assert not wrong, wrong[:5]
    silent = [
        outcome
        for outcome in outcomes
        if outcome.mutant.number
        and outcome.harmless
        and outcome.relation is Relation.WIDER
        and not outcome.wider
        # Where a cell wakes for nothing as it is, the report says so anyway.
        and (outcome.mutant.definition, outcome.mutant.cell) not in tried.plain.wider
    ]
    assert not silent, silent[:5]


def test_every_mutant_of_the_demo(demo: Trial) -> None:
    outcomes = [demo.chosen(one) for one in demo.subject.planted] + [demo.as_netlist(one) for one in demo.rewired]
    judged(demo, outcomes)
    assert not any(outcome.answer.fate is Fate.UNREAD for outcome in outcomes), "nothing of the demo is unread"
    assert {outcome.mutant.kind for outcome in outcomes} >= {"leaf removed", "test link of instance cut"}
    assert {(outcome.mutant.definition, outcome.mutant.cell) for outcome in outcomes} >= demo.subject.registers.keys()


@pytest.mark.core
def test_mutants_of_picorv32(picorv32: Trial) -> None:
    if os.environ.get("STILLCLOCK_MUTANTS") == "all":
        planted, links = list(picorv32.subject.planted), list(picorv32.rewired)
    else:
        planted, links = sample(picorv32, 200, seed=5)
    judged(picorv32, [picorv32.chosen(one) for one in planted] + [picorv32.as_netlist(one) for one in links])


def test_a_mutant_is_what_its_text_is(demo: Trial) -> None:
    """Conditions: the chosen mutant, its netlist and its text, elaborated anew, get the same answer."""
    for one in sample(demo, 12, seed=3)[0][:6]:
        text = demo.as_text(demo.subject.alone(one))
        assert _said(demo.chosen(one)) == _said(demo.as_netlist(one)), one.mutant
        assert _said(demo.as_netlist(one)) == (text.fate, text.registers, text.overrides), one.mutant


EDITS = {
    "edge of the bank flipped": ("posedge gclk_sent", "negedge gclk_sent"),
    "cell type swapped": ("stillclock_icg u_icg_sent", "stillclock_icg_n u_icg_sent"),
    "test link of cell cut": (".test(test_en), .gclk(gclk_sent)", ".test(1'b0), .gclk(gclk_sent)"),
    "test link of cell inverted": (".test(test_en), .gclk(gclk_sent)", ".test(~test_en), .gclk(gclk_sent)"),
    "clk from another bank's gclk": (".clk(clk), .wake(wake_sent)", ".clk(gclk_{other}), .wake(wake_sent)"),
    "wake of another bank": (".wake(wake_sent)", ".wake(wake_{other})"),
    "bank on another bank's gclk": ("posedge gclk_sent", "posedge gclk_{other}"),
}


@pytest.mark.parametrize("kind, edit", EDITS.items(), ids=EDITS)
def test_a_mutant_of_the_netlist_is_what_its_text_is(demo: Trial, kind: str, edit: tuple[str, str]) -> None:
    one = next(one for one in demo.rewired if one.mutant.kind == kind and one.mutant.cell == "u_icg_sent")
    (file,) = (file for file in demo.subject.texts if file.endswith("uplink.v"))
    before = demo.subject.texts[file].data
    old, new = edit[0].encode(), edit[1].format(other=one.mutant.what.removeprefix("u_icg_")).encode()
    assert before.count(old) == 1
    text = demo.as_text(demo.subject.with_text(file, before.replace(old, new)))
    assert _said(demo.as_netlist(one)) == (text.fate, text.registers, text.overrides)


@pytest.mark.core
def test_a_mutant_of_picorv32_is_what_its_text_is(picorv32: Trial) -> None:
    planted = [one for one in sample(picorv32, 40, seed=3)[0] if _reaches(picorv32, one)]
    for one in planted[:3]:
        text = picorv32.as_text(picorv32.subject.alone(one))
        assert _said(picorv32.chosen(one)) == (text.fate, text.registers, text.overrides), one.mutant


def _reaches(found: Trial, one: Planted) -> bool:
    """Leave out what a parameter switches off: it says little about the planting."""
    return found.chosen(one).relation is not Relation.SAME


def _said(outcome: Outcome) -> tuple[Fate, frozenset[str], frozenset[str]]:
    return outcome.answer.fate, outcome.answer.registers, outcome.answer.overrides
