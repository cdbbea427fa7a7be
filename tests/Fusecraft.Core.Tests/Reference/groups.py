"""Answers questions on permutation groups with SymPy, for comparison.

Reads a JSON list of groups from standard input, each {"degree": n, "generators": [[image of 0, image of 1, ...], ...]},
and writes a JSON list of answers in the same order. Points are 0-based. A block system is given as a list: for each
point a label of its part.
"""
import json
import sys

from sympy.combinatorics import Permutation, PermutationGroup
from sympy.core.random import seed


def answer(group):
    degree = group["degree"]
    g = PermutationGroup([Permutation(images) for images in group["generators"]] or [Permutation(size=degree)])
    derived = [h.order() for h in g.derived_series()]
    transitive = g.is_transitive()
    return {
        "order": str(g.order()),
        "orbits": sorted(sorted(orbit) for orbit in g.orbits()),
        "derivedOrders": [str(order) for order in derived],
        "centreOrder": str(g.center().order()),
        "abelianInvariants": sorted(g.abelian_invariants()),
        "isSolvable": derived[-1] == 1,
        "isNilpotent": g.is_nilpotent,
        # The finest system that joins point 0 to point 1, to point 2, and so on; then the minimal systems.
        "joins": [g.minimal_block([0, point]) for point in range(1, degree)] if transitive else None,
        "minimalSystems": g.minimal_blocks(randomized=False) if transitive else None,
    }


seed(1)
json.dump([answer(group) for group in json.load(sys.stdin)], sys.stdout)
