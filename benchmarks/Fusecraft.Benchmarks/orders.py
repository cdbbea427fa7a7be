"""Times SymPy's order() of one permutation group.

Reads {"repeats": k, "generators": [[image of 0, image of 1, ...], ...]} from standard input and writes
{"order": text, "milliseconds": [k times]}. Each time is that of order() alone, on a group object made afresh; one run
before them is not counted.
"""
import json
import sys
from time import perf_counter

from sympy.combinatorics import Permutation, PermutationGroup

task = json.load(sys.stdin)
generators = [Permutation(images) for images in task["generators"]]
times = []
for _ in range(task["repeats"] + 1):
    group = PermutationGroup(generators)
    start = perf_counter()
    order = group.order()
    times.append(1000 * (perf_counter() - start))
json.dump({"order": str(order), "milliseconds": times[1:]}, sys.stdout)
