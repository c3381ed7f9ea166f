"""Bits: where a select lies in its flattened variable; bit 0 is the last bit, as in a concatenation of all elements."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

from collections.abc import Callable
from dataclasses import dataclass

from pyslang import SVInt
from pyslang.ast import (
    ConversionExpression,
    ElementSelectExpression,
    Expression,
    FieldSymbol,
    MemberAccessExpression,
    PackedArrayType,
    RangeSelectExpression,
    RangeSelectionKind,
    Type,
    UnpackedStructType,
    UnpackedUnionType,
    ValueExpressionBase,
    ValueSymbol,
)

IndexValue = Callable[[Expression], int | None]


@dataclass(frozen=True)
class Extent:
    """Locate (part of) a variable.

    Args:
        symbol: the variable.
        low, width: bits of the part; of the smallest fixed part around it when an index is not constant.
        exact: all indices are constant and in range.
        unpacked: an index that is not constant selects an unpacked dimension.
    """

    symbol: ValueSymbol
    low: int
    width: int
    exact: bool = True
    unpacked: bool = False

    @property
    def bits(self) -> tuple[int, int]:
        """Give (msb, lsb)."""
        return self.low + self.width - 1, self.low


def width_of(kind: Type) -> int:
    """Give the bits of a flattened type, 0 when it has no fixed number."""
    if kind.isIntegral:
        return kind.bitWidth
    return kind.selectableWidth if kind.isFixedSize else 0


def integer(value: object) -> int | None:
    """Give a constant's value as an int, None for anything with x or z, or no number."""
    return int(value) if isinstance(value, SVInt) and not value.hasUnknown else None


def extent(expression: Expression, value: IndexValue) -> Extent | None:
    """Locate what a select chain names; None when it is no select of one variable.

    Args:
        expression: a name, or selects of one.
        value: gives the value of an index expression, None when it is not constant.
    """
    if isinstance(expression, ValueExpressionBase):
        return Extent(expression.symbol, 0, width_of(expression.type))
    if isinstance(expression, ConversionExpression):
        return extent(expression.operand, value) if expression.isImplicit else None
    if isinstance(expression, MemberAccessExpression):
        return _member(expression, extent(expression.value, value))
    if isinstance(expression, (ElementSelectExpression, RangeSelectExpression)):
        outer = extent(expression.value, value)
        return None if outer is None else _select(expression, outer, value)
    return None


def _member(expression: MemberAccessExpression, outer: Extent | None) -> Extent | None:
    field = expression.member
    if outer is None or not isinstance(field, FieldSymbol):
        return None
    if not outer.exact:
        return outer
    width = width_of(field.type)
    whole = expression.value.type.canonicalType
    if isinstance(whole, UnpackedUnionType):
        return outer
    offset = field.bitOffset
    if isinstance(whole, UnpackedStructType):  # slang counts these from the first member
        offset = outer.width - offset - width
    return Extent(outer.symbol, outer.low + offset, width)


def _select(expression: ElementSelectExpression | RangeSelectExpression, outer: Extent, value: IndexValue) -> Extent:
    kind = expression.value.type.canonicalType
    if not kind.hasFixedRange:
        return Extent(outer.symbol, outer.low, outer.width, exact=False, unpacked=True)
    element = width_of(kind.arrayElementType) if isinstance(kind, PackedArrayType) or kind.isUnpackedArray else 1
    width = width_of(expression.type)
    right = _rightmost(expression, value, ascending=kind.fixedRange.left < kind.fixedRange.right)
    fixed = kind.fixedRange
    if right is not None and outer.exact and outer.width:
        low = abs(right - fixed.right) * element
        inside = min(fixed.left, fixed.right) <= right <= max(fixed.left, fixed.right)
        if inside and low + width <= outer.width:
            return Extent(outer.symbol, outer.low + low, width)
    variable_word = right is None and kind.isUnpackedArray
    return Extent(outer.symbol, outer.low, outer.width, exact=False, unpacked=outer.unpacked or variable_word)


def _rightmost(
    expression: ElementSelectExpression | RangeSelectExpression, value: IndexValue, *, ascending: bool
) -> int | None:
    """Give the index of the last element that a select covers, None when it is not constant."""
    if isinstance(expression, ElementSelectExpression):
        return value(expression.selector)
    left, right = value(expression.left), value(expression.right)
    if expression.selectionKind is RangeSelectionKind.Simple:
        return right
    if left is None or right is None:
        return None
    lowest = left if expression.selectionKind is RangeSelectionKind.IndexedUp else left - right + 1
    return lowest + right - 1 if ascending else lowest


def slang_bits(bounds: tuple[int, int], kind: Type) -> tuple[int, int]:
    """Turn slang's bounds (low, high; unpacked elements and members counted from the first) into (msb, lsb)."""
    low, high = bounds
    kind = kind.canonicalType
    if kind.isUnpackedArray and kind.hasFixedRange:
        element_type = kind.arrayElementType
        element = width_of(element_type)
        first, last = low // element, high // element
        count = kind.fixedRange.width
        base = (count - 1 - last) * element
        if first != last:
            return (count - first) * element - 1, base
        msb, lsb = slang_bits((low - first * element, high - first * element), element_type)
        return base + msb, base + lsb
    if isinstance(kind, UnpackedStructType):
        whole = width_of(kind)
        return whole - 1, 0
    return high, low
