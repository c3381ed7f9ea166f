"""Names for inserted text: readable, free, and the same from run to run."""

import re
from collections.abc import Iterable

# IEEE 1800-2017 annex B; it contains the keywords of IEEE 1364-2005.
KEYWORDS = frozenset(
    """
    accept_on alias always always_comb always_ff always_latch and assert assign assume automatic before begin bind bins
    binsof bit break buf bufif0 bufif1 byte case casex casez cell chandle checker class clocking cmos config const
    constraint context continue cover covergroup coverpoint cross deassign default defparam design disable dist do edge
    else end endcase endchecker endclass endclocking endconfig endfunction endgenerate endgroup endinterface endmodule
    endpackage endprimitive endprogram endproperty endspecify endsequence endtable endtask enum event eventually expect
    export extends extern final first_match for force foreach forever fork forkjoin function generate genvar global
    highz0 highz1 if iff ifnone ignore_bins illegal_bins implements implies import incdir include initial inout input
    inside instance int integer interconnect interface intersect join join_any join_none large let liblist library local
    localparam logic longint macromodule matches medium modport module nand negedge nettype new nexttime nmos nor
    noshowcancelled not notif0 notif1 null or output package packed parameter pmos posedge primitive priority program
    property protected pull0 pull1 pulldown pullup pulsestyle_ondetect pulsestyle_onevent pure rand randc randcase
    randsequence rcmos real realtime ref reg reject_on release repeat restrict return rnmos rpmos rtran rtranif0
    rtranif1 s_always s_eventually s_nexttime s_until s_until_with scalared sequence shortint shortreal showcancelled
    signed small soft solve specify specparam static string strong strong0 strong1 struct super supply0 supply1
    sync_accept_on sync_reject_on table tagged task this throughout time timeprecision timeunit tran tranif0 tranif1 tri
    tri0 tri1 triand trior trireg type typedef union unique unique0 unsigned until until_with untyped use uwire var
    vectored virtual void wait wait_order wand weak weak0 weak1 while wildcard wire with within wor xnor xor
    """.split()  # noqa: SIM905 (a list of quoted words would be five times as long)
)

CELL_FORMS = ("wake_{}", "gclk_{}", "u_icg_{}", "wake_{}_f", "wake_{}_branches")
COPY_FORMS = ("{}_copy",)

_PLAIN = re.compile(r"[A-Za-z_][A-Za-z0-9_$]*\Z")


def is_plain(name: str) -> bool:
    """Say whether a name needs no escaping."""
    return _PLAIN.match(name) is not None


def sanitised(name: str) -> str:
    """Make a plain name of any identifier; escaped ones lose what is no letter, digit or underscore."""
    plain = re.sub(r"_{2,}", "_", re.sub(r"[^A-Za-z0-9_]", "_", name.strip().removeprefix("\\"))).rstrip("_")
    return plain if _PLAIN.match(plain) else f"r_{plain}".rstrip("_")


class Names:
    """Hand out free names in one definition; the same requests in the same order give the same names."""

    def __init__(self, identifiers: Iterable[str]) -> None:
        self._taken = {identifier.removeprefix("\\").rstrip() for identifier in identifiers} | KEYWORDS

    def reserve(self, base: str, forms: tuple[str, ...]) -> str:
        """Give `base`, `base_2`, … such that every form of it is free, and take them all."""
        stem = sanitised(base)
        number = 1
        while True:
            name = stem if number == 1 else f"{stem}_{number}"
            wanted = {form.format(name) for form in forms}
            if not wanted & self._taken:
                self._taken |= wanted
                return name
            number += 1

    def suffixed(self, names: Iterable[str], suffix: str) -> dict[str, str]:
        """Map names to new ones that nothing else in the definition has, all with one suffix.

        Local variables that bear the name of an outer one make lint tools complain.
        """
        wanted = sorted(set(names))
        number = 1
        while True:
            end = suffix if number == 1 else f"{suffix}{number}"
            if not {name + end for name in wanted} & self._taken:
                return {name: name + end for name in wanted}
            number += 1


def common_free(name: str, identifiers: Iterable[frozenset[str]]) -> str:
    """Give `name`, or `name_2`, … such that it is free in every one of several definitions."""
    return Names(word for words in identifiers for word in words).reserve(name, ("{}",))
