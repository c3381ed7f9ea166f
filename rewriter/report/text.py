"""Reports for people, at most 100 columns wide."""

import posixpath
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass

from rewriter.model.evidence import CellEvidence, ProofResult
from rewriter.model.reasons import EvidenceKind, Verdict
from rewriter.model.run import Run
from rewriter.report.rows import BankRow, CellRow, Rows, Where, rows

WIDTH = 100
_NAMES = 36  # widest column of names
_PLACES = 24  # widest column of places

_SHOWN = 12  # registers listed per reason

Style = Callable[[str], str]


def plain(text: str) -> str:
    """Leave a heading as it is."""
    return text


@dataclass(frozen=True)
class _Line:
    """One line of a table: a count, a name, a text that takes what room is left, a place."""

    count: str
    name: str
    text: str
    place: str


def survey(run: Run, heading: Style = plain) -> str:
    """Format a survey: cells, then what is not gated by reason, then totals.

    Args:
        run: what was found.
        heading: dresses up headings (bold on a terminal).
    """
    table = rows(run)
    parts = [_summary(run, table), *_cells(run, table, heading), *_ungated(table, heading), *_totals(table, heading)]
    return "\n".join(parts) + "\n"


def _summary(run: Run, table: Rows) -> str:
    totals = table.totals
    arrays = f", and {_bits(totals.array_bits)} in arrays" if totals.array_bits else ""
    return (
        f"{run.design.top}: {_bits(totals.flop_bits)} in registers{arrays}\n"
        f"{_share(totals.held_bits, totals.flop_bits)} hold at times; "
        f"{_share(totals.gated_bits, totals.flop_bits)} can stop, on {_count(totals.cells, 'cell')}"
    )


def _cells(run: Run, table: Rows, heading: Style) -> list[str]:
    if not table.cells:
        return ["", "No register is worth a cell."]
    title = "Cells, by register bits" if run.proof else "Cells, by register bits (wake conditions unproved)"
    lines = [_Line("bits", "cell", "wakes when", "where")]
    lines += [_Line(str(c.bits), f"{c.module}.{c.name}", _wakes(run, c), _place(c.where)) for c in table.cells]
    return ["", heading(title), *_layout(lines)]


def _wakes(run: Run, cell: CellRow) -> str:
    return cell.wake if run.proof is None or cell.kind is EvidenceKind.PROVED else f"[{cell.kind.value}] {cell.wake}"


def _ungated(table: Rows, heading: Style) -> list[str]:
    out: list[str] = []
    for verdict, title in ((Verdict.REFUSED, "Refused: not shown to be sound"), (Verdict.LEFT, "Left on their clock")):
        found = [row for row in table.ungated if row.verdict is verdict]
        if found:
            lines = [line for reason in _by_reason(found) for line in _reason_lines(reason)]
            out += ["", heading(title), *_layout([_Line("bits", "register", "reason", "where"), *lines])]
    return out


def _by_reason(found: Sequence[BankRow]) -> list[list[BankRow]]:
    """Group by reason, the reason with the most bits first."""
    groups: dict[str, list[BankRow]] = {}
    for row in found:
        groups.setdefault(row.reason, []).append(row)
    return sorted(groups.values(), key=lambda group: -sum(row.total_bits for row in group))


def _reason_lines(group: Sequence[BankRow]) -> list[_Line]:
    """List the registers of a reason with the most bits; JSON lists them all."""
    shown, rest = group[:_SHOWN], group[_SHOWN:]
    lines = [_Line(str(row.total_bits), row.name, _because(row), _place(row.where)) for row in shown]
    if rest:
        bits = sum(row.total_bits for row in rest)
        lines.append(
            _Line(str(bits), f"and {_count(len(rest), 'register')} more", f"{group[0].reason}: see --format json", "")
        )
    return lines


def _because(row: BankRow) -> str:
    return f"{row.reason}: {row.detail}" if row.detail else row.reason


def _totals(table: Rows, heading: Style) -> list[str]:
    totals = table.totals
    lines = [f"  {bits:>7}  {word}" for word, bits in table.by_method().items()]
    lines += [f"  {bits:>7}  {word}" for word, bits in table.by_reason().items()]
    modules = [f"  {gated:>7}  of {bits:>7}  {module}" for module, (gated, bits) in table.by_module().items()]
    apart = f"; {_bits(totals.array_bits)} in arrays apart" if totals.array_bits else ""
    return [
        "", heading("Bits by method and reason"), *lines,
        "", heading("Bits gated, by module"), *modules,
        "", f"{totals.gated_bits} gated + {totals.left_bits} left + {totals.refused_bits} refused{apart}",
    ]  # fmt: skip


def _layout(lines: Sequence[_Line]) -> list[str]:
    """Fit a table into the width: names and places get what they need up to a bound, the text the rest."""
    count = max(len(line.count) for line in lines)
    name = min(max(len(line.name) for line in lines), _NAMES)
    place = min(max(len(line.place) for line in lines), _PLACES)
    room = WIDTH - (2 + count) - (2 + name) - 2 - (2 + place)
    text = min(max(len(line.text) for line in lines), room)
    return [
        f"  {line.count:>{count}}  {_cut(line.name, name):<{name}}  {_cut(line.text, text):<{text}}"
        f"  {_cut_front(line.place, place)}".rstrip()
        for line in lines
    ]


def _cut(text: str, width: int) -> str:
    text = " ".join(text.split())
    return text if len(text) <= width else text[: width - 1] + "…"


def _cut_front(text: str, width: int) -> str:
    """Shorten a place; its end, with the line number, says more than its start."""
    return text if len(text) <= width else "…" + text[len(text) - width + 1 :]


def _place(where: Where) -> str:
    return f"{posixpath.basename(where.file)}:{where.line}"


def _bits(count: int) -> str:
    return _count(count, "bit")


def _count(count: int, word: str) -> str:
    return f"{count} {word}" if count == 1 else f"{count} {word}s"


def _share(part: int, whole: int) -> str:
    return f"{part} ({100 * part / whole:.1f} %)" if whole else str(part)


def rewrite(run: Run) -> str:
    """Say in a few lines what a rewrite did."""
    totals = rows(run).totals
    kinds = _by_kind(run)
    proof = ", ".join(f"{number} {kind.value}" for kind, number in kinds) or "nothing to prove"
    return (
        f"{run.design.top}: {_share(totals.gated_bits, totals.flop_bits)} of {_bits(totals.flop_bits)} gated, "
        f"{_count(totals.banks, 'bank')} on {_count(totals.cells, 'cell')}: {proof}"
    )


def _by_kind(run: Run) -> list[tuple[EvidenceKind, int]]:
    kinds = [run.kind(cell.id) for cell in run.plan.cells]
    return [(kind, kinds.count(kind)) for kind in EvidenceKind if kind in kinds]


def proof(result: ProofResult, top: str) -> str:
    """Format the answer of `prove`."""
    good = {EvidenceKind.PROVED, EvidenceKind.UNDER_TOP, EvidenceKind.FROM_RESET}
    fine = sum(cell.kind in good for cell in result.cells)
    compared = f"{_count(result.registers, 'register')}, {_bits(result.bits)} compared"
    lines = [f"{top}: {fine} of {_count(len(result.cells), 'cell')} proved; {compared}"]
    lines += [line for cell in result.cells if cell.kind not in good for line in _failing(cell)]
    for mismatch in result.mismatches:
        lines.append(f"{mismatch.module}: {mismatch.what} differs: {mismatch.detail}")
        lines += [mismatch.counterexample.table()] if mismatch.counterexample else []
    lines += [f"undecided: {text}" for text in result.undecided]
    lines += [f"{module}: the engine could not read it: {text}" for module, text in result.unread]
    lines += _wider(result.cells)
    lines += [f"note: {text}" for text in result.notes]
    return "\n".join(lines) + "\n"


def _failing(cell: CellEvidence) -> list[str]:
    names = ", ".join(cell.failing or cell.registers)
    lines = [f"{cell.module}.{cell.cell}: {cell.kind.value} ({names})" + (f": {cell.detail}" if cell.detail else "")]
    if cell.counterexample:
        lines += [cell.counterexample.table(), "the state is arbitrary, perhaps unreachable"]
    return lines


def _wider(cells: Iterable[CellEvidence]) -> list[str]:
    return [f"{cell.module}.{cell.cell}: wakes in cycles in which nothing is written" for cell in cells if cell.wider]
