"""
Sizes springs by SciPy's differential evolution: reads {"requests": [...]} and writes {"answers": [...]}, both JSON.
Each request names its kind, its wires and its seed; `design`, where given, is a spring found elsewhere that is judged too.
"""
import json
import sys
import time

from scipy.optimize import differential_evolution

import compression
import extension
import torsion

KINDS = {"compression": compression, "extension": extension, "torsion": torsion}
SLACK = 1e-6
# Above every mass: a spring that misses something is worse than any that does not, the more so the more it misses.
MISSED = 1e9


def size(request):
    kind = KINDS[request["kind"]]
    wires = request["wires"]

    def spring_of(x):
        return kind.build(request, wires[min(len(wires) - 1, int(round(x[0])))], x[1:])

    def value(x):
        spring = spring_of(x)
        missed = sum(miss for miss in spring.misses() if miss > 0)
        return MISSED * (1 + missed) if missed > 0 else spring.mass()

    limits = [(0, len(wires) - 1), *kind.bounds(request)]
    start = time.perf_counter()
    found = differential_evolution(
        value, limits, integrality=[True] + [False] * (len(limits) - 1), seed=request["seed"], popsize=request.get("popsize", 30), maxiter=400, tol=1e-7, atol=0, polish=False,
    )
    seconds = time.perf_counter() - start
    return {"mass": None if found.fun >= MISSED else found.fun, "seconds": seconds, "evaluations": int(found.nfev), "judged": judge(kind, request)}


def judge(kind, request):
    """What this model says of a design that was found elsewhere."""
    design = request.get("design")
    if not design:
        return None
    wire = next(wire for wire in request["wires"] if wire["id"] == design["wireId"])
    spring = kind.build(request, wire, kind.chosen_of(design))
    return {"mass": spring.mass(), "worstMiss": max(spring.misses())}


if __name__ == "__main__":
    json.dump({"answers": [size(request) for request in json.load(sys.stdin)["requests"]]}, sys.stdout)
