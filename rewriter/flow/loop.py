"""The only loop: choose, edit and prove until no register comes back."""

import difflib
from collections.abc import Mapping
from dataclasses import replace

from rewriter import frontend
from rewriter.analysis import temporaries
from rewriter.edit import EditOptions, edit
from rewriter.edit.cells import render_cells
from rewriter.flow.checks import check, judge, rewritten_source
from rewriter.flow.evidence import pair, rejected, rejection_warnings, waived
from rewriter.flow.job import Job, Progress, StopWatch
from rewriter.flow.parts import prove_parts
from rewriter.methods import METHODS
from rewriter.model.cells import FILES
from rewriter.model.design import Design, Edge
from rewriter.model.errors import UserError
from rewriter.model.evidence import ProofJob
from rewriter.model.plan import Plan, Policy, RegisterId, Settled
from rewriter.model.reasons import Reason, Verdict
from rewriter.model.rewrite import Rewrite
from rewriter.model.run import Run
from rewriter.plan import choose, settle
from rewriter.prove import prove


def survey(job: Job, progress: Progress) -> Run:
    """Find what holds and choose what would be gated; edit and prove in memory when the job says so."""
    if job.prove:
        return rewrite(job, progress)
    watch = StopWatch(progress)
    design, settled = _find(job, watch)
    excluded = switched_off(job.off, settled)
    settled = _without(settled, excluded)
    plan = _choose(settled, job, excluded)
    return Run(design, settled, plan, excluded=excluded, warnings=design.warnings, seconds=watch.seconds)


def rewrite(job: Job, progress: Progress) -> Run:
    """Do the main job in memory: nothing is written here.

    Raises:
        UserError: the RTL does not compile, or an option names something that is not there.
        NoAnswerError: the engine is missing, or something outside the banks stayed undecided.
        FaultError: the rewritten RTL is not what was meant to come out.
    """
    watch = StopWatch(progress)
    design, settled = _find(job, watch)
    wishes = EditOptions(job.test_port, job.test_pins, _cells(job, design))
    excluded = switched_off(job.off, settled)
    settled = _without(settled, excluded)
    warnings = list(design.warnings)
    while True:
        plan = _choose(settled, job, excluded)
        with watch.stage("edit", "editing"):
            done = _with_used_cells(edit(design, plan, wishes), plan)
        if _grow(excluded, done.excluded):
            continue
        run = _proved(Run(design, settled, plan, done, excluded=dict(excluded)), done, job, watch)
        back = rejected(run, allow_unproved=job.allow_unproved)
        warnings += rejection_warnings(run, back)
        if not _grow(excluded, back):
            break
    judge(run, allow_unproved=job.allow_unproved)
    with watch.stage("check", "reading the result back"):
        check(run, done, lambda again: _choose(_settle(again), job, {}))
    return replace(
        run, warnings=(*warnings, *done.warnings, *waived(run)), seconds=watch.seconds, test_pins=job.test_pins
    )


def _find(job: Job, watch: StopWatch) -> tuple[Design, Settled]:
    with watch.stage("read", "reading the RTL"):
        design = frontend.read(job.arguments)
    with watch.stage("find", "looking for registers that hold"):
        return design, _settle(design)


def _settle(design: Design) -> Settled:
    return settle(
        [found for method in METHODS for module in design.modules for found in method.propose(module, design)]
    )


def _choose(settled: Settled, job: Job, excluded: Mapping[RegisterId, Reason]) -> Plan:
    return choose(settled, _policy(job), excluded)


def _cells(job: Job, design: Design) -> dict[str, str]:
    """Give the wrapper files, without those whose module the design holds from an earlier rewrite."""
    files = render_cells(job.cell_map, _timescale(design))
    return {name: text for name, text in files.items() if name.removesuffix(".v") not in design.definitions}


def _with_used_cells(done: Rewrite, plan: Plan) -> Rewrite:
    """Drop wrapper files that nothing instantiates: they would look like further tops."""
    placed = {cell.cell for cell in done.cells}
    used = {FILES[cell.edge] for cell in plan.cells if cell.id in placed}
    return replace(done, cell_files={name: text for name, text in done.cell_files.items() if name in used})


def _policy(job: Job) -> Policy:
    return Policy(
        job.min_bits,
        has_falling_cell=job.cell_map.supports(Edge.FALLING),
        one_clock_per_variable=job.one_clock_per_variable,
    )


def _timescale(design: Design) -> str | None:
    """Give the timescale that the cells need: one, exactly when the design has one."""
    return next((d.timescale for d in design.definitions.values() if d.in_hierarchy and d.timescale), None)


def _proved(run: Run, done: Rewrite, job: Job, watch: StopWatch) -> Run:
    if not job.prove or not run.plan.banks:
        return run
    pin = next((pin for pin in job.test_pins if pin.definition == run.design.top), None)
    work = ProofJob(
        gold=run.design.source,
        gate=rewritten_source(run.design, done),
        top=run.design.top,
        cell_texts=done.cell_files,
        test_port=done.test_ports.get(run.design.top),
        test_active_low=pin is not None and pin.active_low,
        limits=job.limits,
        stubs=run.design.stubs,
        temporaries=temporaries.all_of(run.design),
    )
    with watch.stage("prove", "proving"):
        result = prove(work, watch.progress)
        if result.unread and not result.cells:
            result = prove_parts(run.design, done.test_ports, work, result, lambda part: prove(part, watch.progress))
    return replace(run, proof=result, evidence=pair(run.design, done, result))


def _grow(excluded: dict[RegisterId, Reason], back: Mapping[RegisterId, Reason]) -> bool:
    """Add what came back; the first reason of a register stays. Says whether anything was new."""
    new = {register: reason for register, reason in back.items() if register not in excluded}
    excluded.update(new)
    return bool(new)


def switched_off(names: tuple[str, ...], settled: Settled) -> dict[RegisterId, Reason]:
    """Find the registers of `MODULE` and `MODULE.REGISTER` that the user wants left alone.

    Raises:
        UserError: a name fits no register; it suggests near ones.
    """
    registers = [outcome.register for outcome in (*settled.proposals, *settled.refusals)]
    found: dict[RegisterId, Reason] = {}
    for name in names:
        fitting = [register for register in registers if name in _off_names(register)]
        if not fitting:
            known = sorted({known for register in registers for known in _off_names(register)})
            near = ", ".join(f"`{word}`" for word in difflib.get_close_matches(name, known, 3))
            raise UserError(
                f"--off {name}: there is no such module or register",
                help=f"did you mean {near}?" if near else "`stillclock survey` lists them",
            )
        found |= {register: Reason("switched-off", f"--off {name}") for register in fitting}
    return found


def _without(settled: Settled, off: Mapping[RegisterId, Reason]) -> Settled:
    """Turn refusals of switched-off registers into registers that are left: their user has answered."""
    refusals = tuple(
        replace(found, verdict=Verdict.LEFT, reason=off[found.register]) if found.register in off else found
        for found in settled.refusals
    )
    return replace(settled, refusals=refusals)


def _off_names(register: RegisterId) -> set[str]:
    module = register.block.definition
    return {module, *(f"{module}.{part.variable}" for part in register.parts)}
