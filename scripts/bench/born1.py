"""First Born of a Woods-Saxon well at 181 angles by scipy and numpy, to set beside the engine in the same run.

Reads one JSON object {"k", "R", "a", "repeats"} (lengths and 1/k in one unit) from standard input and prints one with the transform S(q) at every
angle and seconds per angular distribution: scipy.integrate.quad with weight sin on panels of the range, to a relative 1e-9, and numpy
with 240 Gauss-Legendre nodes made once.
"""

import json
import sys
import time

import numpy as np
from scipy.integrate import quad

given = json.load(sys.stdin)
k, R, a = given["k"], given["R"], given["a"]
q = 2 * k * np.sin(np.radians(np.arange(181.0)) / 2)
reach = R + 40 * a


def shape(r):
    return 1 / (1 + np.exp((r - R) / a))


def by_quad():
    cuts = [0, R, reach]
    out = []
    for one in q:
        if one == 0:
            parts = [quad(lambda r: r * r * shape(r), x, y, epsabs=0, epsrel=1e-10)[0] for x, y in zip(cuts, cuts[1:])]
            out.append(sum(parts))
        else:
            parts = [
                quad(lambda r: r * shape(r), x, y, weight="sin", wvar=one, epsabs=1e-13 * R**3 * one, epsrel=1e-10, limit=200)[0]
                for x, y in zip(cuts, cuts[1:])
            ]
            out.append(sum(parts) / one)
    return np.array(out)


NODES, WEIGHTS = np.polynomial.legendre.leggauss(240)


def by_numpy():
    half = reach / 2
    r = half * (NODES + 1)
    weighted = half * WEIGHTS * r * r * shape(r)
    return np.sinc(np.outer(q, r) / np.pi) @ weighted


def best_of(run, repeats):
    times = []
    for _ in range(repeats):
        begun = time.perf_counter()
        run()
        times.append(time.perf_counter() - begun)
    return min(times), sorted(times)[len(times) // 2]


quad_best, quad_median = best_of(by_quad, max(2, given["repeats"] // 20))
numpy_best, numpy_median = best_of(by_numpy, given["repeats"])
json.dump(
    {
        "quad": {"values": by_quad().tolist(), "best": quad_best, "median": quad_median},
        "numpy": {"values": by_numpy().tolist(), "best": numpy_best, "median": numpy_median},
    },
    sys.stdout,
)
