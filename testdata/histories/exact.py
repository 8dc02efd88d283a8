"""A third opinion with mpmath at 30 digits where one is to be had.

  quadrature   a strain put on virgin material at once and held at constant temperature keeps its direction, so that
               q = q0 - 3 G p and the time to reach p is the integral of dp / pdot(q0 - 3 G p, p): tanh-sinh quadrature.
               It settles the singular starts.
  taylor       Taylor series (mpmath.odefun) of the general problem, for Norton's law with an odd exponent, whose right-hand
               side is analytic through zero stress. It settles non-proportional paths and temperature ramps.
"""
from mpmath import exp, mp, mpf, odefun, quad, sinh, sqrt

from problem import GAS_CONSTANT, Table

mp.dps = 30


def stress_part(law, q, temperature):
    """pdot / p**k and k, in mpmath."""
    if law["kind"] == "arrhenius":
        value, k = stress_part(law["law"], q, temperature)
        turn = -mpf(law["activation_energy"]) / mpf(GAS_CONSTANT)
        return value * exp(turn * (1 / mpf(temperature) - 1 / mpf(law["reference_temperature"]))), k
    a, n = mpf(law["prefactor"]), mpf(law["stress_exponent"])
    if law["kind"] == "bailey_norton":
        m = mpf(law["time_exponent"])
        return m * a ** (1 / m) * q ** (n / m), (m - 1) / m
    if law["kind"] == "garofalo":
        return a * sinh(law["stress_coefficient"] * q) ** n, mpf(0)
    return a * q ** n, mpf(law.get("strain_exponent", 0.0))


def rate(law, q, p, temperature):
    terms = law["terms"] if law["kind"] == "sum" else [law]
    parts = [stress_part(term, q, temperature) for term in terms]
    return sum(v * p ** k if k else v for v, k in parts)


def shear_modulus(history, temperature):
    e, nu = (Table(history["elasticity"][name]).at(temperature)[0] for name in ("young", "poisson"))
    return mpf(e) / (2 * (1 + mpf(nu)))


def mises(strain):
    """Square of the von Mises equivalent of a tensor's deviator."""
    a = [mpf(x) for x in strain]
    mean = (a[0] + a[1] + a[2]) / 3
    return mpf(3) / 2 * (sum((x - mean) ** 2 for x in a[:3]) + 2 * sum(x * x for x in a[3:]))


def held_from_start(history):
    """The number of knots after the first up to which strain and temperature stay what they are at the first."""
    knots, held = history["knots"], 0
    if mises(knots[0][1:7]) == 0:
        return 0
    while held + 1 < len(knots) and knots[held + 1][1:] == knots[0][1:]:
        held += 1
    return held


def quadrature(history, results):
    """The largest error of p over the first hold, relative to the largest p of the hold; None without such a hold."""
    held = held_from_start(history)
    if held == 0:
        return None
    law, temperature = history["law"], history["knots"][0][7]
    g3 = 3 * shear_modulus(history, temperature)
    q0 = g3 / 3 * 2 * sqrt(mises(history["knots"][0][1:7]))
    worst = mpf(0)
    for i in range(1, held + 1):
        p = mpf(results[i - 1][1])
        cuts, q = [mpf(0), p / 2], q0 - g3 * p / 2  # both ends steep: halve what is left of the stress at each cut
        while q / 2 > q0 - g3 * p:
            q /= 2
            cuts.append((q0 - q) / g3)
        time = quad(lambda x: 1 / rate(law, q0 - g3 * x, x, temperature) if x else mpf(0), cuts + [p])
        worst = max(worst, abs(history["knots"][i][0] - time) * rate(law, q0 - g3 * p, p, temperature))
    return float(worst / mpf(results[held - 1][1]))


TAYLOR = ("norton-circle", "arrhenius-nonproportional-ramp", "norton-ice-pa-s")


def taylor(history, problem, results):
    """The largest error of creep strain relative to the largest creep strain; None for a history not in TAYLOR."""
    if history["name"] not in TAYLOR:
        return None
    law = history["law"]
    inner = law.get("law", law)
    creep, at_knot = [mpf(0)] * 6, {}
    for piece in problem.pieces():
        def shear(temperature):
            e, nu = (v + (temperature - piece.mid_temp) * d for v, d in (piece.young, piece.poisson))
            return e / (2 * (1 + nu))

        def rhs(x, c):
            temperature = piece.temp0 + x * piece.length * piece.temp_rate
            g2 = 2 * shear(temperature)
            s = [g2 * (a + x * piece.length * b - y) for a, b, y in zip(piece.e0, piece.erate, c)]
            square = mpf(3) / 2 * (s[0] ** 2 + s[1] ** 2 + s[2] ** 2 + 2 * (s[3] ** 2 + s[4] ** 2 + s[5] ** 2))
            factor, _ = stress_part(dict(law, law=dict(inner, stress_exponent=0.0)) if inner is not law
                                    else dict(law, stress_exponent=0.0), mpf(1), temperature)
            f = mpf(3) / 2 * factor * square ** int((inner["stress_exponent"] - 1) / 2) * piece.length
            return [f * y for y in s]
        creep = odefun(rhs, 0, creep, tol=mpf(10) ** -20)(1)
        at_knot[piece.knot] = creep
    size = max(abs(x) for c, _ in results for x in c)
    return float(max(abs(a - b) for c, (d, _) in zip(at_knot.values(), results) for a, b in zip(c, d)) / size)
