"""Choose the banks: which registers share a cell, and whether it pays."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, replace

from rewriter.model.design import Edge
from rewriter.model.plan import (
    Bank,
    BlockId,
    BlockPlan,
    Cell,
    ClockRef,
    Liveness,
    Plan,
    Policy,
    Proposal,
    Refusal,
    RegisterId,
    Settled,
    Shape,
)
from rewriter.model.reasons import PAGES, Reason, Verdict
from rewriter.model.source import Span
from rewriter.model.wake import Or, Skeleton, WakeCondition


@dataclass(frozen=True)
class _Site:
    """Where registers may share a cell: one scope of one definition, one clock and edge, one condition as written."""

    definition: str
    file: str
    scope: str
    clock: str
    edge: Edge
    wake: str


def choose(settled: Settled, policy: Policy, excluded: Mapping[RegisterId, Reason]) -> Plan:
    """Plan the cells and banks; pure.

    Args:
        settled: every register once.
        policy: what is worth a cell.
        excluded: registers that must not be gated after all, with the reason.

    Returns:
        A plan in which every register is in exactly one bank, or in `refusals`.
    """
    candidates, refusals = _worthwhile(settled, policy, excluded)
    sites = _united(_by_site(candidates), settled, policy)
    cells: list[Cell] = []
    banks: list[Bank] = []
    for wake, proposals in sites:
        if sum(p.bits for p in proposals) < policy.min_bits:
            bits = sum(p.bits for p in proposals)
            refusals.extend(_left(p, "too-few-bits", f"{bits} bit{'s' * (bits > 1)}") for p in proposals)
            continue
        cell = _cell(wake, proposals)
        cells.append(cell)
        banks.extend(_banks(cell, proposals))
    if policy.one_clock_per_variable and (apart := _on_several_clocks(banks, refusals)):
        return choose(settled, policy, {**excluded, **dict.fromkeys(apart, Reason("several-clocks"))})
    banks = _distinctly_named(banks)
    return Plan(tuple(cells), tuple(banks), _block_plans(settled, banks, refusals), tuple(refusals))


def _worthwhile(
    settled: Settled, policy: Policy, excluded: Mapping[RegisterId, Reason]
) -> tuple[list[Proposal], list[Refusal]]:
    candidates: list[Proposal] = []
    refusals = list(settled.refusals)
    for proposal in settled.proposals:
        if proposal.register in excluded:
            reason = excluded[proposal.register]
            verdict = PAGES[reason.word].verdict or Verdict.REFUSED
            refusals.append(Refusal(proposal.register, verdict, reason, proposal.occurrences, holds=True))
        elif proposal.liveness is Liveness.ALWAYS:
            refusals.append(_left(proposal, "never-holds"))
        elif proposal.liveness is Liveness.NEVER:
            refusals.append(_left(proposal, "never-written"))
        elif proposal.edge is Edge.FALLING and not policy.has_falling_cell:
            reason = Reason("no-falling-cell")
            refusals.append(Refusal(proposal.register, Verdict.REFUSED, reason, proposal.occurrences, holds=True))
        else:
            candidates.append(proposal)
    return candidates, refusals


def _left(proposal: Proposal, word: str, detail: str = "") -> Refusal:
    holds = word not in ("never-holds", "never-written")
    return Refusal(proposal.register, Verdict.LEFT, Reason(word, detail), proposal.occurrences, holds)


def _by_site(proposals: Iterable[Proposal]) -> list[tuple[WakeCondition, list[Proposal]]]:
    sites: dict[_Site, list[Proposal]] = {}
    for p in sorted(proposals, key=lambda p: p.register.block.span):  # within a block in order of writing
        block = p.register.block
        site = _Site(block.definition, block.span.file, p.scope, p.clock, p.edge, p.conditions[0].key)
        sites.setdefault(site, []).append(p)
    return [(found[0].conditions[0], found) for found in sites.values()]


def _united(
    sites: list[tuple[WakeCondition, list[Proposal]]], settled: Settled, policy: Policy
) -> list[tuple[WakeCondition, list[Proposal]]]:
    """Let registers that are each too few share one cell that wakes on the union of their conditions.

    Only where nothing but such registers would stay in the block: its clock then goes for good.
    """
    staying = {block: set(registers) for block, registers in _registers_by_block(settled).items()}
    small: dict[BlockId, list[tuple[WakeCondition, list[Proposal]]]] = {}
    kept: list[tuple[WakeCondition, list[Proposal]]] = []
    for wake, proposals in sites:
        blocks = {p.register.block for p in proposals}
        few = sum(p.bits for p in proposals) < policy.min_bits
        if few and len(blocks) == 1 and not isinstance(wake.form, Skeleton):
            small.setdefault(blocks.pop(), []).append((wake, proposals))
            continue
        kept.append((wake, proposals))
        if not few:
            for p in proposals:
                staying[p.register.block].discard(p.register)
    for block, group in small.items():
        members = [p for _, proposals in group for p in proposals]
        complete = block not in settled.anchored and {p.register for p in members} == staying[block]
        if complete and len(group) > 1 and sum(p.bits for p in members) >= policy.min_bits:
            kept.append((_union([wake for wake, _ in group]), members))
        else:
            kept.extend(group)
    place = {p.register: n for n, p in enumerate(settled.proposals)}
    return sorted(kept, key=lambda site: (site[1][0].register.block.span, place[site[1][0].register]))


def _union(wakes: list[WakeCondition]) -> WakeCondition:
    forms = tuple(w.form for w in wakes if not isinstance(w.form, Skeleton))
    return WakeCondition(
        form=Or(forms),
        key="(" + "||".join(w.key for w in wakes) + ")",
        reads=frozenset[str]().union(*(w.reads for w in wakes)),
        text=" || ".join(w.text for w in wakes),
    )


def _registers_by_block(settled: Settled) -> dict[BlockId, list[RegisterId]]:
    found: dict[BlockId, list[RegisterId]] = {}
    for outcome in (*settled.proposals, *settled.refusals):
        found.setdefault(outcome.register.block, []).append(outcome.register)
    return found


def _cell(wake: WakeCondition, proposals: list[Proposal]) -> Cell:
    first = proposals[0]
    block = first.register.block
    name = first.register.name
    blocks = tuple(dict.fromkeys(p.register.block for p in proposals))
    start = Span(block.span.file, block.span.start, block.span.start)
    return Cell(
        id=f"{block.definition}:{first.scope}{name}{first.register.parts[0].select}@{start.start}",
        name=name,
        definition=block.definition,
        scope=first.scope,
        clock=ClockRef(first.clock),
        edge=first.edge,
        wake=wake,
        blocks=blocks,
    )


def _banks(cell: Cell, proposals: list[Proposal]) -> list[Bank]:
    banks: list[Bank] = []
    for block in cell.blocks:
        mine = tuple(p for p in proposals if p.register.block == block)
        name = f"{cell.definition}.{cell.scope}{mine[0].register.name}"
        banks.append(Bank(name, cell.id, block, tuple(p.register for p in mine), mine, mine[0].method))
    return banks


def _on_several_clocks(banks: list[Bank], refusals: list[Refusal]) -> tuple[RegisterId, ...]:
    """Find gated registers whose variable would have other parts, or other generate copies, on another clock."""
    clocks: dict[tuple[str, str], set[str]] = {}
    for register, clock in [
        *((register, bank.cell) for bank in banks for register in bank.registers),
        *((refusal.register, "") for refusal in refusals),
    ]:
        for part in register.parts:
            clocks.setdefault((register.block.definition, part.variable), set()).add(clock)
    return tuple(
        proposal.register
        for bank in banks
        for proposal in bank.proposals
        if any(len(clocks[bank.block.definition, part.variable]) > 1 for part in proposal.register.parts)
        or _copied_over(proposal)
    )


def _copied_over(proposal: Proposal) -> bool:
    """Say whether the copies of a generate loop, each with a cell, write parts of a variable outside the loop."""
    outside = any(not part.variable.startswith(proposal.scope) for part in proposal.register.parts)
    scopes = {(o.module, o.scope) for o in proposal.occurrences}
    return outside and len(scopes) > len({o.module for o in proposal.occurrences})


def _distinctly_named(banks: list[Bank]) -> list[Bank]:
    """Number banks whose first registers share a name (parts of one variable, generate branches)."""
    seen: dict[str, int] = {}
    named: list[Bank] = []
    for bank in banks:
        seen[bank.name] = seen.get(bank.name, 0) + 1
        count = seen[bank.name]
        named.append(bank if count == 1 else replace(bank, name=f"{bank.name}#{count}"))
    return named


def _block_plans(settled: Settled, banks: list[Bank], refusals: list[Refusal]) -> tuple[BlockPlan, ...]:
    rest: dict[BlockId, list[RegisterId]] = {}
    for refusal in refusals:
        rest.setdefault(refusal.register.block, []).append(refusal.register)
    by_block: dict[BlockId, list[Bank]] = {}
    for bank in banks:
        by_block.setdefault(bank.block, []).append(bank)
    plans: list[BlockPlan] = []
    for block, mine in sorted(by_block.items(), key=lambda item: item[0]):
        others = tuple(rest.get(block, ()))
        alone = len(mine) == 1 and not others and block not in settled.anchored
        shape = Shape.KEEP if alone else Shape.SPLIT
        plans.append(BlockPlan(block, shape, tuple(b.name for b in mine), others))
    return tuple(plans)
