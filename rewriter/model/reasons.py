"""Reasons, verdicts and evidence: the closed set of words that reports and `explain` use."""

from dataclasses import dataclass
from enum import Enum


class Verdict(Enum):
    """What became of a register or bank."""

    GATED = "gated"
    LEFT = "left"
    REFUSED = "refused"


class EvidenceKind(Enum):
    """What stands behind a gated bank."""

    PROVED = "proved"
    UNDER_TOP = "proved under top"
    FROM_RESET = "proved from reset"
    DISPROVED = "disproved"
    UNDECIDED = "undecided"
    NOT_CHECKED = "not checked"
    SIMULATED = "simulated"
    UNPROVED = "unproved"  # no engine was asked


@dataclass(frozen=True)
class ReasonPage:
    """Explain one word: what it means, an example, what to do. `verdict` is None for methods and evidence."""

    word: str
    verdict: Verdict | None
    summary: str
    what_to_do: str
    example: str = ""


_LEFT = Verdict.LEFT
_REFUSED = Verdict.REFUSED


def _page(word: str, verdict: Verdict | None, summary: str, what_to_do: str, example: str = "") -> ReasonPage:
    return ReasonPage(word, verdict, summary, what_to_do, example)


_PAGES = (
    # left: sound, but not worth a cell or not wanted
    _page(
        "never-holds",
        _LEFT,
        "The register is written in every cycle; there is nothing to gate.",
        "Nothing. If it should hold, give the assignment an enable.",
    ),
    _page(
        "never-written",
        _LEFT,
        "No branch that these parameters allow writes the register outside its reset.",
        "Nothing: synthesis turns it into a constant.",
    ),
    _page(
        "too-few-bits",
        _LEFT,
        "Fewer bits share this wake condition than a cell is worth.",
        "Lower the fewest bits per cell with --min-bits, or write the register under a shared enable.",
    ),
    _page(
        "array",
        _LEFT,
        "A word of the array is selected by a variable index; arrays are a method of their own.",
        "Nothing yet; the array keeps its clock.",
    ),
    _page("switched-off", _LEFT, "The user switched gating off here.", "Remove the setting to gate it."),
    _page(
        "several-clocks",
        _LEFT,
        "Parts of one variable would run on several clocks, and --one-clock-per-variable asks for one.",
        "Nothing, or gate them all the same by leaving that option out; linters may then warn of several clocks.",
    ),
    _page("already-gated", _LEFT, "The bank already runs on a gated clock that covers its wake condition.", "Nothing."),
    # refused: not shown to be sound
    _page(
        "two-writers",
        _REFUSED,
        "More than one block or assignment writes the register.",
        "Write it in one clocked block.",
    ),
    _page(
        "inside-macro",
        _REFUSED,
        "The block, or text that must change, comes out of a macro.",
        "Write the block out at the place of use.",
    ),
    _page(
        "shared-include",
        _REFUSED,
        "The block stands in a file that is included more than once.",
        "Move the block into a file of its own.",
    ),
    _page(
        "inactive-code",
        _REFUSED,
        "Text that is switched off by `ifdef inside the block writes its registers, "
        "so the rewrite could be wrong in another configuration.",
        "Move the conditional text out of the block, or split the block by hand.",
    ),
    _page(
        "side-effect",
        _REFUSED,
        "The block does more than write registers (a system task, a task call, a wait).",
        "Move the side effect into a block of its own.",
    ),
    _page(
        "timing-control",
        _REFUSED,
        "The block holds a delay or event control in its body that is not `<= #delay`.",
        "Remove it: synthesizable blocks have one event control.",
    ),
    _page(
        "clock-unclear",
        _REFUSED,
        "Which event is the clock cannot be told: no reset branch tests the others.",
        "Test each asynchronous reset first: `if (!rst_n) … else …`.",
    ),
    _page(
        "clock-as-data",
        _REFUSED,
        "The clock is read as data, or the wake condition depends on it.",
        "Keep clocks out of data paths.",
    ),
    _page(
        "async-load",
        _REFUSED,
        "An asynchronous reset loads a value that is not constant; the original loads it again "
        "at every clock edge while the reset lasts, a sleeping bank would not.",
        "Reset to a constant.",
    ),
    _page(
        "blocking-source",
        _REFUSED,
        "A clocked block writes a register, or a source of the wake condition, with "
        "blocking assignment; the result depends on the order of blocks.",
        "Use `<=` for registers.",
    ),
    _page(
        "temporary-holds",
        _REFUSED,
        "A temporary of the block is read before it is written, so it is a register itself.",
        "Write the temporary before its first use, or use `<=`.",
    ),
    _page(
        "foreign-domain",
        _REFUSED,
        "The wake condition depends on a register of another clock.",
        "Synchronise the enable into the bank's clock domain.",
    ),
    _page(
        "foreign-reset",
        _REFUSED,
        "The wake condition depends on a register under another asynchronous reset than the bank's.",
        "Put both under one reset.",
    ),
    _page(
        "x-in-wake",
        _REFUSED,
        "The wake condition holds an x constant, so its value is not defined.",
        "Give the condition a defined value.",
    ),
    _page(
        "drives-clock",
        _REFUSED,
        "The register drives a clock or an asynchronous reset.",
        "Nothing: such a register must not move to another clock.",
    ),
    _page(
        "keep-attribute",
        _REFUSED,
        "The register is marked to be kept, or as part of a synchroniser.",
        "Remove the attribute if gating it is fine.",
    ),
    _page(
        "labelled-block",
        _REFUSED,
        "The block has a label that other text refers to.",
        "Refer to the register itself, not through the block's label.",
    ),
    _page(
        "hidden-read",
        _REFUSED,
        "The condition calls a function that reads signals which are not its arguments.",
        "Pass them as arguments.",
    ),
    _page("impure-call", _REFUSED, "The condition calls a function with side effects.", "Use a pure function."),
    _page(
        "hierarchical-name",
        _REFUSED,
        "The condition or the register reaches outside its module by hierarchical name.",
        "Bring the signal in through a port.",
    ),
    _page(
        "not-copyable",
        _REFUSED,
        "The condition cannot be copied as text (it begins or ends inside a macro, or is no plain vector).",
        "Name the condition: `wire en = …;`.",
    ),
    _page(
        "differs-by-parameter",
        _REFUSED,
        "The register holds in one parameterisation and not in another.",
        "Split the module, or gate by hand.",
    ),
    _page(
        "library-file",
        _REFUSED,
        "The module, or one on the way to the top, comes from a library file (-v, -y).",
        "Pass the file as a source to let it be edited.",
    ),
    _page("celldefine", _REFUSED, "The module is a library cell (`celldefine).", "Nothing."),
    _page("encrypted", _REFUSED, "The text is encrypted.", "Nothing."),
    _page("read-only", _REFUSED, "The file lies where it must not be edited.", "Copy it into the project."),
    _page(
        "bind",
        _REFUSED,
        "A `bind` puts this module into another one; the test override cannot be threaded there.",
        "Instantiate the module instead.",
    ),
    _page(
        "no-test-path",
        _REFUSED,
        "The test override cannot be brought to the cell (a macro or directive is in the way).",
        "Add a test input by hand and name it with --test-pin.",
    ),
    _page("no-falling-cell", _REFUSED, "The cell map has no cell for falling-edge banks.", "Add one to the map."),
    _page("edge-mix", _REFUSED, "The chain of cells would mix clock edges.", "Keep one edge along a clock path."),
    _page(
        "unsplittable",
        _REFUSED,
        "The block's registers cannot be separated, and together they never hold.",
        "Write them in separate blocks.",
    ),
    _page(
        "outside-reference",
        _REFUSED,
        "Text outside the module reaches the register or its block by hierarchical name "
        "in a way that the rewrite would break.",
        "Bring the signal out through a port.",
    ),
    _page("black-box", _REFUSED, "A module without source stands in the way.", "Give its source or a model."),
    _page(
        "disproved",
        _REFUSED,
        "The proof found a state in which the gated bank would differ.",
        "Look at the counterexample; with an enable written in the block, report it as a fault of stillclock.",
    ),
    _page("undecided", _REFUSED, "The proof hit a limit.", "Raise the limit."),
    _page(
        "not-checked",
        _REFUSED,
        "The engine could not read the module, so the bank was not proved.",
        "See the message of the engine; --allow-unproved writes such banks all the same.",
    ),
    # methods
    _page(
        "enable",
        None,
        "The register holds inside its clocked block: an `if` without else, a case without an arm, "
        "`q <= q`, `q <= en ? d : q`.",
        "Nothing.",
        "always_ff @(posedge clk) if (load) q <= d;   // wakes on load",
    ),
    # evidence
    _page(
        "proved",
        None,
        "For every state and input of the module alone, the gated bank does what the original does.",
        "Nothing.",
    ),
    _page(
        "proved-under-top",
        None,
        "Proved only with the logic around the module under this top.",
        "Simulate the assertion that the report names.",
    ),
    _page(
        "proved-from-reset",
        None,
        "Proved only for states that are reachable from reset.",
        "Simulate the assertion that the report names.",
    ),
    _page("unproved", None, "No engine was asked, or the proof was waived.", "Run `stillclock prove`."),
    _page(
        "simulated",
        None,
        "Compared with the original in simulation, for the cycles and seed that are named.",
        "Prove it as well.",
    ),
)

PAGES: dict[str, ReasonPage] = {page.word: page for page in _PAGES}


@dataclass(frozen=True)
class Reason:
    """Give a verdict's reason: a word of PAGES, and what is particular here. `place` is `file:line:col` or empty."""

    word: str
    detail: str = ""
    place: str = ""

    def __post_init__(self) -> None:
        """Reject words that `explain` could not explain."""
        if self.word not in PAGES:
            raise KeyError(self.word)
