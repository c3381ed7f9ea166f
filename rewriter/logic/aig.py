"""And-inverter graph with structural hashing, shared by both texts of a module."""

from collections.abc import Iterable, Sequence

FALSE = 0
TRUE = 1

Lit = int
"""A literal: twice the node's index, plus one when complemented. Node 0 is the constant 0."""

_SHIFT = 32


class Aig:
    """Grow a graph of two-input ANDs; equal structure gets the equal literal."""

    def __init__(self) -> None:
        self.left: list[Lit] = [-1]
        self.right: list[Lit] = [-1]
        self._known: dict[int, Lit] = {}

    def __len__(self) -> int:
        return len(self.left)

    def variable(self) -> Lit:
        """Add a free variable."""
        self.left.append(-1)
        self.right.append(-1)
        return 2 * (len(self.left) - 1)

    def is_variable(self, lit: Lit) -> bool:
        """Tell whether a literal is a variable or its complement."""
        return lit > TRUE and self.left[lit >> 1] < 0

    def both(self, a: Lit, b: Lit) -> Lit:
        """AND of two literals."""
        if a > b:
            a, b = b, a
        if a <= TRUE:
            return b if a else FALSE
        if a ^ b <= 1:
            return a if a == b else FALSE
        key = a << _SHIFT | b
        found = self._known.get(key)
        if found is not None:
            return found
        simple = self._absorbed(a, b)
        if simple < 0:
            self.left.append(a)
            self.right.append(b)
            simple = 2 * (len(self.left) - 1)
        self._known[key] = simple
        return simple

    def _absorbed(self, a: Lit, b: Lit) -> Lit:
        # a & (a & c) = a & c, a & (~a & c) = 0, a & ~(~a & c) = a: shared conditions meet like this all the time.
        for one, other in ((a, b), (b, a)):
            node = other >> 1
            if self.left[node] < 0:
                continue
            inner = (self.left[node], self.right[node])
            if not other & 1:
                if one in inner:
                    return other
                if one ^ 1 in inner:
                    return FALSE
            elif one ^ 1 in inner:
                return one
        return -1

    def either(self, a: Lit, b: Lit) -> Lit:
        """OR of two literals."""
        return self.both(a ^ 1, b ^ 1) ^ 1

    def differ(self, a: Lit, b: Lit) -> Lit:
        """XOR of two literals."""
        if a <= TRUE:
            return b ^ a
        if b <= TRUE:
            return a ^ b
        if a ^ b <= 1:
            return a ^ b
        # One node for all four polarities, so that x ^ y and ~x ^ y share structure.
        flip = (a ^ b) & 1
        a, b = a & ~1, b & ~1
        return self.either(self.both(a, b ^ 1), self.both(a ^ 1, b)) ^ flip

    def choose(self, select: Lit, one: Lit, zero: Lit) -> Lit:
        """Give `one` where `select` is 1, else `zero`."""
        if one == zero or select == FALSE:
            return zero
        if select == TRUE:
            return one
        if one ^ zero == 1:
            return self.differ(select, zero)
        return self.either(self.both(select, one), self.both(select ^ 1, zero))

    def all_of(self, lits: Iterable[Lit]) -> Lit:
        """AND of many, as a balanced tree."""
        return self._tree([lit for lit in lits if lit != TRUE])

    def any_of(self, lits: Iterable[Lit]) -> Lit:
        """OR of many, as a balanced tree."""
        return self._tree([lit ^ 1 for lit in lits if lit != FALSE]) ^ 1

    def _tree(self, lits: list[Lit]) -> Lit:
        if not lits:
            return TRUE
        while len(lits) > 1:
            odd = lits[-1:] if len(lits) % 2 else []
            lits = [self.both(lits[i], lits[i + 1]) for i in range(0, len(lits) - 1, 2)] + odd
        return lits[0]

    def cone(self, roots: Iterable[Lit]) -> list[int]:
        """Give the nodes below some literals, each after the nodes it reads; the constant is left out."""
        order: list[int] = []
        seen = {0}
        stack = [root >> 1 for root in roots]
        left, right = self.left, self.right
        while stack:
            node = stack.pop()
            if node < 0:
                order.append(~node)
            elif node not in seen:
                seen.add(node)
                if left[node] < 0:
                    order.append(node)
                else:
                    stack += (~node, left[node] >> 1, right[node] >> 1)
        return order

    def support(self, roots: Iterable[Lit]) -> list[int]:
        """Give the variables (nodes) that some literals depend on by structure, in order of creation."""
        return sorted(node for node in self.cone(roots) if self.left[node] < 0)

    def simulate(self, roots: Sequence[Lit], values: dict[int, int], mask: int = 1) -> list[int]:
        """Evaluate literals, as many patterns side by side as `mask` has ones.

        Args:
            roots: what to evaluate.
            values: patterns by variable node; others are 0.
            mask: all patterns set.
        """
        known = {0: 0}
        for node in self.cone(roots):
            a, b = self.left[node], self.right[node]
            if a < 0:
                known[node] = values.get(node, 0) & mask
            else:
                known[node] = (known[a >> 1] ^ (mask if a & 1 else 0)) & (known[b >> 1] ^ (mask if b & 1 else 0))
        return [known[lit >> 1] ^ (mask if lit & 1 else 0) for lit in roots]
