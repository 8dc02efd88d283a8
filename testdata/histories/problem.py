"""One history as a mathematical problem: tables, laws, strain path. No solver here.

Small strain: stress = C(T) : (strain - creep strain - thermal strain), d(creep strain)/dt = 3/2 pdot s/q, dp/dt = pdot,
pdot = law(q, p, T), q the von Mises stress, s the stress deviator. Tensors are six-tuples xx yy zz yz xz xy with tensor
shear components.
"""
import math

GAS_CONSTANT = 8.314462618  # J/(mol K)


def mises(s):
    """von Mises equivalent of a stress deviator."""
    return math.sqrt(1.5 * (s[0] * s[0] + s[1] * s[1] + s[2] * s[2] + 2 * (s[3] * s[3] + s[4] * s[4] + s[5] * s[5])))


def deviator(a):
    mean = (a[0] + a[1] + a[2]) / 3
    return [a[0] - mean, a[1] - mean, a[2] - mean, a[3], a[4], a[5]]


class Table:
    """A constant or a piecewise linear table [[T, value], ...]."""

    def __init__(self, given):
        self.rows = given if isinstance(given, list) else [[0.0, given]]

    def at(self, temperature):
        """Value and slope. At a table point the slope is that of the interval above; callers never step across one."""
        rows = self.rows
        if len(rows) == 1:
            return rows[0][1], 0.0
        if not rows[0][0] <= temperature <= rows[-1][0]:
            # a solver's stage may leave by rounding, a history must not
            if not rows[0][0] - 1e-9 <= temperature <= rows[-1][0] + 1e-9:
                raise ValueError("temperature %r outside a table" % temperature)
        for (t0, v0), (t1, v1) in zip(rows, rows[1:]):
            if temperature < t1 or t1 == rows[-1][0]:
                slope = (v1 - v0) / (t1 - t0)
                return v0 + (temperature - t0) * slope, slope

    def interval(self, low, high):
        """Value and slope as linear functions over [low, high], which holds no table point inside."""
        return self.at((low + high) / 2)

    def inside(self, low, high):
        """Table temperatures strictly between low and high."""
        return [t for t, _ in self.rows if low < t < high]


class Term:
    """One rate pdot = factor(T) * stress part(q) * p**k and what the start from p = 0 needs of it."""

    def __init__(self, law):
        self.activation, self.reference = 0.0, 1.0
        if law["kind"] == "arrhenius":
            self.activation = law["activation_energy"] / GAS_CONSTANT
            self.reference = law["reference_temperature"]
            law = law["law"]
        self.kind, self.k, self.n, self.b = law["kind"], 0.0, 0.0, 0.0
        if self.kind == "bailey_norton":
            m = law["time_exponent"]
            self.a = m * law["prefactor"] ** (1 / m)
            self.n, self.k = law["stress_exponent"] / m, (m - 1) / m
        else:
            self.a, self.n = law["prefactor"], law["stress_exponent"]
            self.k = law.get("strain_exponent", 0.0)
            self.b = law.get("stress_coefficient", 0.0)

    def factor(self, temperature):
        return math.exp(-self.activation * (1 / temperature - 1 / self.reference)) if self.activation else 1.0

    def stress_part(self, q, temperature):
        """pdot / p**k and its derivative by q."""
        if q == 0:
            return 0.0, (self.a * self.factor(temperature) * (self.b or 1.0) if self.n == 1 else 0.0)
        a = self.a * self.factor(temperature)
        if self.kind == "garofalo":
            if self.n * self.b * q > 700:
                return math.inf, math.inf  # a solver's wild trial: it must see it and shorten the step
            sinh = math.sinh(self.b * q)
            value = a * sinh ** self.n
            return value, self.n * value * self.b * math.cosh(self.b * q) / sinh
        value = a * q ** self.n
        return value, self.n * value / q


class Piece:
    """A stretch of a segment in which strain and temperature are linear and no table is crossed."""

    def __init__(self, problem, t0, t1, start, end, last_of):
        self.start_time, self.length, self.knot = t0, t1 - t0, last_of
        self.e0, self.temp0 = deviator(start[:6]), start[6]
        span = t1 - t0
        rate = [(b - a) / span if span else 0.0 for a, b in zip(start, end)]
        self.erate, self.temp_rate = deviator(rate[:6]), rate[6]
        low, high = min(start[6], end[6]), max(start[6], end[6])
        self.young = problem.young.interval(low, high)
        self.poisson = problem.poisson.interval(low, high)
        self.mid_temp = (low + high) / 2

    def shear(self, temperature):
        """Shear modulus and its derivative by temperature."""
        e = self.young[0] + (temperature - self.mid_temp) * self.young[1]
        nu = self.poisson[0] + (temperature - self.mid_temp) * self.poisson[1]
        g = e / (2 * (1 + nu))
        return g, g * (self.young[1] / e - self.poisson[1] / (1 + nu))


class Problem:
    def __init__(self, history):
        self.name = history["name"]
        self.young = Table(history["elasticity"]["young"])
        self.poisson = Table(history["elasticity"]["poisson"])
        expansion = history["expansion"]
        self.expansion = Table(expansion["mean_coefficient"]) if expansion else None
        self.reference = expansion["reference_temperature"] if expansion else 0.0
        law = history["law"]
        self.terms = [Term(part) for part in (law["terms"] if law["kind"] == "sum" else [law])]
        self.k = min(term.k for term in self.terms)  # the strongest hardening decides how p starts
        self.knots = history["knots"]

    def pieces(self):
        """The path cut at the knots and wherever the temperature crosses a point of the elastic tables."""
        out = []
        for i, (a, b) in enumerate(zip(self.knots, self.knots[1:]), 1):
            low, high = min(a[7], b[7]), max(a[7], b[7])
            cuts = {0.0, 1.0}
            for table in (self.young, self.poisson):
                cuts |= {(t - a[7]) / (b[7] - a[7]) for t in table.inside(low, high)}
            cuts = sorted(cuts)
            for f, g in zip(cuts, cuts[1:]):
                at = [[x + h * (y - x) if h < 1 else y for x, y in zip(a, b)] for h in (f, g)]
                out.append(Piece(self, at[0][0], at[1][0], at[0][1:], at[1][1:], i))
        return out

    def rate(self, q, p, temperature):
        """pdot and its derivatives by q and by p, for p > 0 or a law without hardening."""
        value = by_q = by_p = 0.0
        for term in self.terms:
            v, d = term.stress_part(q, temperature)
            h = p ** term.k if term.k else 1.0
            value += v * h
            by_q += d * h
            by_p += term.k * v * h / p if term.k else 0.0
        return value, by_q, by_p

    def stress(self, knot, creep):
        """The six stresses at a knot from the total form of Hooke's law."""
        strain, temperature = self.knots[knot][1:7], self.knots[knot][7]
        e, nu = self.young.at(temperature)[0], self.poisson.at(temperature)[0]
        thermal = self.expansion.at(temperature)[0] * (temperature - self.reference) if self.expansion else 0.0
        mean = e / (3 * (1 - 2 * nu)) * (strain[0] + strain[1] + strain[2] - 3 * thermal)
        s = [e / (1 + nu) * (a - c) for a, c in zip(deviator(strain), creep)]
        return [s[0] + mean, s[1] + mean, s[2] + mean, s[3], s[4], s[5]]
