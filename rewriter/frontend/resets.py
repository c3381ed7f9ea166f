"""Asynchronous resets: which events of a block are resets, told by the `if` chain that tests them."""

from dataclasses import dataclass

from rewriter.model.design import AsyncReset, Edge, Event
from rewriter.model.expr import Expr, Operation
from rewriter.model.statement import Block, If, Statement


@dataclass(frozen=True)
class Split:
    """Tell clock from resets; `problem` says why that is impossible."""

    clock: Event | None
    resets: tuple[AsyncReset, ...]
    synchronous: Statement | None
    problem: str = ""


def split_events(events: tuple[Event, ...], body: Statement) -> Split:
    """Sort the events of a block into its clock and its asynchronous resets.

    Every event but the clock must be tested, with its own polarity, by the `if … else if …` chain
    that leads the body.
    """
    if len(events) == 1:
        return Split(events[0], (), body)
    if len({event.signal.key for event in events}) < len(events):
        return Split(None, (), body, "one signal stands in the list twice")
    waiting = {event.signal.key: event for event in events}
    resets: list[AsyncReset] = []
    rest: Statement | None = body
    while len(waiting) > 1:
        branch = _leading_if(rest)
        tests = _tests(branch.condition) if branch else None
        if branch is None or not tests or not all(key in waiting for key, _ in tests) or len(tests) >= len(waiting):
            return Split(None, (), body, "no leading `if` tests the events beside the clock")
        for key, active_high in tests:
            event = waiting.pop(key)
            if active_high is not (event.edge is Edge.RISING):
                return Split(None, (), body, f"the test of {key} does not fit its edge")
            if event.condition is not None:
                return Split(None, (), body, f"the event of {key} has an iff condition")
            resets.append(AsyncReset(event, branch.then, active_high))
        rest = branch.other
    (clock,) = waiting.values()
    return Split(clock, tuple(resets), rest)


def _leading_if(statement: Statement | None) -> If | None:
    while isinstance(statement, Block) and len(statement.body) == 1:
        if any(declaration.initial for declaration in statement.declarations):
            return None
        statement = statement.body[0]
    return statement if isinstance(statement, If) else None


def _tests(condition: Expr) -> list[tuple[str, bool]] | None:
    """Read a reset test: signals with the level they are tested for; several when joined by or."""
    if isinstance(condition, Operation):
        operands = condition.operands
        if condition.operator in ("||", "|"):
            left, right = _tests(operands[0]), _tests(operands[1])
            return left + right if left and right else None
        if condition.operator in ("!", "~"):
            return _inverted(_tests(operands[0]), condition.width)
        if condition.operator in ("==", "!=", "===", "!=="):
            return _comparison(operands[0], operands[1], equal=condition.operator in ("==", "==="))
    return [(condition.key, True)] if condition.width == 1 and not isinstance(condition, Operation) else None


def _inverted(tests: list[tuple[str, bool]] | None, width: int) -> list[tuple[str, bool]] | None:
    if tests is None or len(tests) != 1 or width != 1:
        return None
    return [(tests[0][0], not tests[0][1])]


def _comparison(left: Expr, right: Expr, *, equal: bool) -> list[tuple[str, bool]] | None:
    if left.constant is not None:
        left, right = right, left
    if right.constant not in (0, 1) or left.width != 1:
        return None
    return [(left.key, (right.constant == 1) is equal)]
