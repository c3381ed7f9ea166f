"""Merge what the methods found: every register once, over all parameterisations and generate copies."""

from collections.abc import Iterable
from dataclasses import replace

from rewriter.model.plan import Anchor, BlockId, Liveness, Outcome, Proposal, Refusal, RegisterId, Settled
from rewriter.model.reasons import Reason, Verdict


def settle(outcomes: Iterable[Outcome]) -> Settled:
    """Give one proposal or refusal per register of source text.

    A register that cannot be gated in one copy is not gated in any: they share their text.
    """
    by_register: dict[RegisterId, list[Proposal | Refusal]] = {}
    anchored: set[BlockId] = set()
    for outcome in outcomes:
        if isinstance(outcome, Anchor):
            anchored.add(outcome.block)
        else:
            by_register.setdefault(outcome.register, []).append(outcome)
    uneven = _uneven(by_register)
    merged = [_merge(found, uneven=register in uneven) for register, found in by_register.items()]
    return Settled(
        proposals=tuple(m for m in merged if isinstance(m, Proposal)),
        refusals=tuple(m for m in merged if isinstance(m, Refusal)),
        anchored=frozenset(anchored),
    )


def _uneven(by_register: dict[RegisterId, list[Proposal | Refusal]]) -> frozenset[RegisterId]:
    """Find registers that some copies of their block cut differently (part selects that parameters move)."""
    copies: dict[BlockId, set[tuple[str, str]]] = {}
    present: dict[RegisterId, set[tuple[str, str]]] = {}
    for register, found in by_register.items():
        present[register] = {(o.module, o.scope) for outcome in found for o in outcome.occurrences}
        copies.setdefault(register.block, set()).update(present[register])
    return frozenset(register for register, where in present.items() if where != copies[register.block])


def _merge(found: list[Proposal | Refusal], *, uneven: bool) -> Proposal | Refusal:
    occurrences = tuple(o for outcome in found for o in outcome.occurrences)
    refused = [o for o in found if isinstance(o, Refusal)]
    if refused:
        worst = next((r for r in refused if r.verdict is Verdict.REFUSED), refused[0])
        return replace(worst, occurrences=occurrences, holds=any(r.holds for r in refused))
    proposals = [o for o in found if isinstance(o, Proposal)]
    first = proposals[0]
    if uneven or len({(p.conditions[0].key, p.clock, p.needs) for p in proposals}) > 1:
        reason = Reason("differs-by-parameter", "it is cut or conditioned differently in another copy")
        return Refusal(first.register, Verdict.REFUSED, reason, occurrences, holds=True)
    return replace(first, occurrences=occurrences, liveness=_common(p.liveness for p in proposals))


def _common(values: Iterable[Liveness]) -> Liveness:
    found = set(values)
    return found.pop() if len(found) == 1 else Liveness.SOMETIMES
