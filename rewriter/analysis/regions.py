"""Text inside a block that a macro definition switches on or off."""

import re

from rewriter.model.design import ClockedBlock
from rewriter.model.source import SourceText

_DIRECTIVE = re.compile(rb"`(ifdef|ifndef|elsif|else|endif)\b")
_COMMENT = re.compile(rb"//[^\n]*|/\*.*?\*/|\"(?:\\.|[^\"\\])*\"", re.DOTALL)
# `<=` counts as an assignment also where it compares: refusing too much is safe here.
_ASSIGNMENT = re.compile(rb"<=|(?<![=!<>])=(?!=)|\+\+|--")
_CONTROL = re.compile(rb"\b(if|else|case[xz]?|for|begin|end|endcase|disable|return|break|continue)\b")


def writes_conditionally(block: ClockedBlock, text: SourceText) -> bool:
    """Say whether conditional text in the block could write a register or change its branches.

    Text between `ifdef and `endif is harmless only when it assigns nothing and is whole statements
    by itself: begin and end balance, and it neither starts with `else` nor ends in an open branch.
    """
    code = _COMMENT.sub(lambda m: b" " * len(m.group()), text.data[block.span.start : block.span.end])
    return any(not _harmless(region) for region in _regions(code))


def _regions(code: bytes) -> list[bytes]:
    """Give each stretch of text between two directives that lies inside some `ifdef … `endif."""
    regions: list[bytes] = []
    depth, start = 0, 0
    for match in _DIRECTIVE.finditer(code):
        if depth:
            regions.append(code[start : match.start()])
        word = match.group(1)
        depth += {b"ifdef": 1, b"ifndef": 1, b"endif": -1}.get(word, 0)
        start = match.end()
        if word in (b"ifdef", b"ifndef", b"elsif"):  # the macro's name belongs to the directive
            name = re.compile(rb"\s*[A-Za-z_][\w$]*").match(code, start)
            start = name.end() if name else start
    if depth:
        regions.append(code[start:])
    return regions


def _harmless(region: bytes) -> bool:
    if not region.strip():
        return True
    if _ASSIGNMENT.search(region):
        return False
    words = [m.group(1) for m in _CONTROL.finditer(region)]
    if any(
        word.startswith(b"case") or word in (b"endcase", b"disable", b"return", b"break", b"continue") for word in words
    ):
        return False
    whole = region.strip()
    balanced = words.count(b"begin") == words.count(b"end")
    return balanced and not whole.startswith(b"else") and whole.endswith((b";", b"end"))
