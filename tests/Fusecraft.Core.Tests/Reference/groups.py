"""Answers questions on permutation groups with SymPy, for comparison.

Reads a JSON list of groups from standard input, each {"degree": n, "generators": [[image of 0, image of 1, ...], ...]},
and writes a JSON list of answers in the same order. Points are 0-based.
"""
import json
import sys

from sympy.combinatorics import Permutation, PermutationGroup


def answer(group):
    degree = group["degree"]
    generators = [Permutation(images, size=degree) for images in group["generators"]]
    g = PermutationGroup(generators or [Permutation(size=degree)])
    orbits = sorted(sorted(orbit) for orbit in g.orbits())
    covered = {point for orbit in orbits for point in orbit}
    orbits = sorted(orbits + [[point] for point in range(degree) if point not in covered])
    blocks = None
    if len(orbits) == 1:
        blocks = [g.minimal_block([0, point]) for point in range(1, degree)]
    return {
        "order": str(g.order()),
        "orbits": orbits,
        "derivedOrders": [str(h.order()) for h in g.derived_series()],
        "centreOrder": str(g.center().order()),
        # For each point from 1 up: the block number of every point in the finest block system that joins it to 0.
        "minimalBlocks": blocks,
    }


print(json.dumps([answer(group) for group in json.load(sys.stdin)]))
