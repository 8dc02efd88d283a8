#!/usr/bin/env python3
"""Write histories.json, or with --check recompute it and compare.

  python3 generate.py                 integrate every history and write histories.json (about two minutes)
  python3 generate.py --check [NAME]  recompute all histories, or those named, and hold the stored ones against them

Needs numpy, scipy and mpmath. See README.md for the format and the accuracy claimed.
"""
import datetime
import json
import os
import platform
import sys

import mpmath
import numpy
import scipy

sys.dont_write_bytecode = True
import exact
import solvers
from problem import Problem, deviator, mises
from scenarios import histories

FILE = os.path.join(os.path.dirname(os.path.abspath(__file__)), "histories.json")
FORMAT = "creep reference histories, version 1"
ACCEPTED = 1e-11  # largest disagreement between two methods, relative to the scales, that is written
REPEATED = 2e-11  # the same for --check: other versions of the solvers take other steps


def provenance():
    return {
        "about": "Invented materials and paths, no test data. Reference solutions by general-purpose ODE solvers.",
        "generator": "generate.py with scenarios.py, problem.py, solvers.py, exact.py",
        "date": datetime.date.today().isoformat(),
        "versions": {"python": platform.python_version(), "numpy": numpy.__version__, "scipy": scipy.__version__,
                     "mpmath": mpmath.__version__},
        "stored_method": "scipy.integrate.solve_ivp Radau, unknowns creep strain and p^(1-k), rtol %g" % solvers.RTOL_RADAU,
        "cross_check": "scipy.integrate.solve_ivp DOP853, unknowns stress deviator and p, rtol %g" % solvers.RTOL_EXPLICIT,
        "third_check": "mpmath at %d digits: quadrature of a first hold, Taylor series of three histories" % mpmath.mp.dps,
        "accepted_disagreement": ACCEPTED,
    }


def worst(pairs):
    return max(abs(a - b) for a, b in pairs)


def disagreement(problem, one, two, scales):
    stress, creep = scales
    stresses = [problem.stress(i, a[0]) for i, a in enumerate(one, 1)], [problem.stress(i, b[0]) for i, b in enumerate(two, 1)]
    return {
        "stress": worst(pair for u, v in zip(*stresses) for pair in zip(u, v)) / stress,
        "creep_strain": worst(pair for u, v in zip(one, two) for pair in zip(u[0], v[0])) / creep,
        "equivalent": worst((u[1], v[1]) for u, v in zip(one, two)) / creep,
    }


def solve(history):
    problem = Problem(history)
    one, evaluations = solvers.radau(problem)
    two, second_evaluations = solvers.dop853(problem)
    stresses = [problem.stress(0, [0.0] * 6)] + [problem.stress(i, a[0]) for i, a in enumerate(one, 1)]
    scales = max(mises(deviator(s)) for s in stresses), one[-1][1]
    difference = disagreement(problem, one, two, scales)
    third = None
    for method, value in (("quadrature", exact.quadrature(history, one)), ("taylor", exact.taylor(history, problem, one))):
        if value is not None:
            third = {"method": method, "difference": value}
            difference[method] = value
    for name, value in difference.items():
        if not value <= ACCEPTED:
            raise SystemExit("%s: %s: two methods disagree by %.2g" % (history["name"], name, value))
    return dict(history, stress_scale=scales[0], strain_scale=scales[1],
                disagreement={k: difference[k] for k in ("stress", "creep_strain", "equivalent")}, third=third,
                evaluations=[evaluations, second_evaluations],
                results=[{"knot": i, "time": history["knots"][i][0], "stress": [float(x) for x in stresses[i]],
                          "creep_strain": [float(x) for x in c], "equivalent": float(p)}
                         for i, (c, p) in enumerate(one, 1)])


def lines(value):
    """One line for each knot and each result, so that a difference can be read."""
    return "[\n   " + ",\n   ".join(json.dumps(row) for row in value) + "\n  ]"


def dump(solved):
    parts = []
    for history in solved:
        fields = [json.dumps(key) + ": " + (lines(value) if key in ("knots", "results") else json.dumps(value))
                  for key, value in history.items()]
        parts.append(" {\n  " + ",\n  ".join(fields) + "\n }")
    head = json.dumps({"format": FORMAT, "provenance": provenance()}, indent=1)[:-2]
    return head + ',\n "histories": [\n' + ",\n".join(parts) + "\n ]\n}\n"


def compare(stored, fresh):
    """What is wrong with the stored history, as a list of remarks, and the largest relative difference."""
    remarks = [key for key in ("about", "units", "elasticity", "expansion", "law", "knots") if stored[key] != fresh[key]]
    if remarks or len(stored["results"]) != len(fresh["results"]):
        return ["input differs: " + " ".join(remarks)], float("nan")
    difference = 0.0
    for a, b in zip(stored["results"], fresh["results"]):
        for key, scale in (("stress", "stress_scale"), ("creep_strain", "strain_scale")):
            difference = max(difference, worst(zip(a[key], b[key])) / fresh[scale])
        difference = max(difference, abs(a["equivalent"] - b["equivalent"]) / fresh["strain_scale"])
    return ([] if difference <= REPEATED else ["results differ"]), difference


def check(names):
    with open(FILE) as f:
        stored = {h["name"]: h for h in json.load(f)["histories"]}
    known = {h["name"]: h for h in histories()}
    bad = sorted(set(stored) ^ set(known)) + [name for name in names if name not in known]
    for name in bad:
        print("%s: in the file or in the generator only" % name)
    for name in names or list(known):
        if name in stored and name in known:
            remarks, difference = compare(stored[name], solve(known[name]))
            bad += remarks
            print("%-36s %8.1e  %s" % (name, difference, "; ".join(remarks) or "ok"), flush=True)
    print("FAIL" if bad else "ok: the stored histories are what the generator gives, within %g" % REPEATED)
    return 1 if bad else 0


def write():
    solved = []
    for history in histories():
        solved.append(solve(history))
        d = solved[-1]["disagreement"]
        print("%-36s stress %7.1e  creep strain %7.1e  p %7.1e  third %s" % (
            history["name"], d["stress"], d["creep_strain"], d["equivalent"],
            "%.1e" % solved[-1]["third"]["difference"] if solved[-1]["third"] else "-"), flush=True)
    with open(FILE, "w") as f:
        f.write(dump(solved))
    return 0


if __name__ == "__main__":
    sys.exit(check(sys.argv[2:]) if sys.argv[1:2] == ["--check"] else write())
