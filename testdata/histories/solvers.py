"""Two unlike integrations of one Problem.

  radau   unknowns creep strain and y = p**(1-k), implicit Radau IIA with the analytic Jacobian. A singular start (p = 0,
          k < 0, stress present) is crossed with p as the independent variable, in which nothing is singular.
  dop853  unknowns stress deviator and p, from the rate form of Hooke's law, explicit Dormand-Prince 8(5,3). A singular
          start is crossed in the logarithm of time. In the stiff histories stability limits its steps, no more than that.
"""
import math

import numpy as np
from scipy.integrate import solve_ivp

from problem import mises

RTOL_RADAU = 1e-13
RTOL_EXPLICIT = 5e-14
WEIGHT = (1.0, 1.0, 1.0, 2.0, 2.0, 2.0)


def scale_of_strain(problem):
    return max(max(abs(x) for x in row[1:7]) for row in problem.knots)


def run(rhs, span, start, method, rtol, atol, count, **options):
    """The end state. No step longer than 1/100 of the span, so that a sleeping error estimate cannot leap over an event."""
    width = span[1] - span[0]
    result = solve_ivp(rhs, span, start, method=method, rtol=rtol, atol=atol, t_eval=[span[1]], max_step=width / 100,
                       first_step=1e-9 * width, **options)
    if not result.success:
        raise RuntimeError("%s failed: %s" % (method, result.message))
    count[0] += result.nfev
    return result.y[:, -1]


def nothing_happens(piece, creep, p):
    """Virgin material without shape change: no deviatoric stress, no creep, whatever the time and temperature."""
    return p == 0 and not any(creep) and not any(piece.e0) and not any(piece.erate)


def ramp_start(problem, piece, tolerance):
    """The start of a ramp from zero stress with a hardening law: time and p where creep still takes only the fraction
    `tolerance` of the stress, from p**(1-k) = (1-k) a integral (K t)**n dt with the stress K t still elastic. What this
    neglects is of relative size `tolerance` in a stress that is itself a small part of the later one."""
    if len(problem.terms) != 1 or problem.terms[0].kind == "garofalo":
        raise ValueError("%s: a ramp from zero stress needs a single power law" % problem.name)
    term, temperature = problem.terms[0], piece.temp0
    g = piece.shear(temperature)[0]
    slope = mises([2 * g * x for x in piece.erate])
    a, power, stretch = term.a * term.factor(temperature), term.n + 1, 1 / (1 - term.k)
    if power * stretch <= 1:
        raise ValueError("%s: creep outruns the ramp at its start" % problem.name)
    c = ((1 - term.k) * a * slope ** term.n / power) ** stretch
    time = (tolerance * slope / (3 * g * c)) ** (1 / (power * stretch - 1))
    if time > 0.1 * piece.length:
        raise ValueError("%s: ramp start too long" % problem.name)
    return time, c * time ** (power * stretch)


# ---- Radau in creep strain and transformed equivalent strain -------------------------------------------------------

class CreepStrainForm:
    def __init__(self, problem, piece):
        self.problem, self.piece = problem, piece
        self.inverse = 1 / (1 - problem.k)

    def state(self, time, creep):
        piece = self.piece
        temperature = piece.temp0 + time * piece.temp_rate
        g2 = 2 * piece.shear(temperature)[0]
        s = [g2 * (a + time * b - c) for a, b, c in zip(piece.e0, piece.erate, creep)]
        return s, mises(s), temperature, g2

    def rhs(self, time, z):
        k = self.problem.k
        if k and z[6] <= 0:
            return np.full(7, np.nan)  # a wild trial; the solver shortens its step
        s, q, temperature, _ = self.state(time, z)
        if q == 0:
            return np.zeros(7)
        p = z[6] ** self.inverse if k else z[6]
        rate = self.problem.rate(q, p, temperature)[0]
        f = 1.5 * rate / q
        return np.array([f * x for x in s] + [(1 - k) * p ** -k * rate if k else rate])

    def jacobian(self, time, z):
        s, q, temperature, g2 = self.state(time, z)
        p = z[6] ** self.inverse if self.problem.k else z[6]
        out = np.zeros((7, 7))
        k = self.problem.k
        if q == 0:
            slope = self.problem.rate(q, p, temperature)[1] if not k else 0.0
            out[:6, :6] = -1.5 * g2 * slope * np.eye(6)
            return out
        rate, by_q, by_p = self.problem.rate(q, p, temperature)
        by_creep = np.array([-g2 * 1.5 * w * x / q for w, x in zip(WEIGHT, s)])  # of q
        s = np.array(s)
        out[:6, :6] = np.outer(1.5 * s * (by_q - rate / q) / q, by_creep) - 1.5 * rate / q * g2 * np.eye(6)
        h = (1 - k) * p ** -k if k else 1.0  # dy/dp
        out[6, :6] = h * by_q * by_creep
        out[:6, 6] = 1.5 * s / q * by_p / h
        out[6, 6] = by_p - k * rate / p if k else 0.0
        return out

    def by_strain(self, p, z):
        """The derivative by p: of creep strain (six) and of time."""
        s, q, temperature, _ = self.state(z[6], z)
        k = self.problem.k
        regular = sum(t.stress_part(q, temperature)[0] * (p ** (t.k - k) if t.k != k else 1.0) for t in self.problem.terms)
        return np.array([1.5 * x / q for x in s] + [p ** -k / regular])


def jump_start(problem, piece, creep, count):
    """From p = 0 under stress, with p as the independent variable, until creep has taken 1e-4 of the elastic strain."""
    form = CreepStrainForm(problem, piece)
    _, q, temperature, g2 = form.state(0.0, creep)
    p1 = 1e-4 * q / (1.5 * g2)
    while True:
        singular = sum(t.stress_part(q, temperature)[0] for t in problem.terms if t.k == problem.k)
        guess = p1 ** (1 - problem.k) / ((1 - problem.k) * singular)
        if guess < 0.5 * piece.length:
            break
        p1 /= 10
    atol = [1e-15 * p1] * 6 + [1e-15 * guess]
    z = run(form.by_strain, (0.0, p1), list(creep) + [0.0], "Radau", RTOL_RADAU, atol, count)
    return z[6], list(z[:6]), p1


def radau(problem):
    """Creep strain and p at every knot, and the number of evaluations."""
    creep, p, count, at_knot = [0.0] * 6, 0.0, [0], {}
    small = 1e-15 * scale_of_strain(problem)
    for piece in problem.pieces():
        begin = 0.0
        if piece.length > 0 and not nothing_happens(piece, creep, p):
            if p == 0 and problem.k < 0:
                if any(piece.e0):
                    begin, creep, p = jump_start(problem, piece, creep, count)
                else:
                    begin, p = ramp_start(problem, piece, 1e-14)
                    size = mises(piece.erate)
                    creep = [1.5 * p * x / size for x in piece.erate]
            form = CreepStrainForm(problem, piece)
            y = p ** (1 - problem.k)
            atol = [small] * 6 + [1e-14 * y if problem.k else small]
            z = run(form.rhs, (begin, piece.length), creep + [y], "Radau", RTOL_RADAU, atol, count, jac=form.jacobian)
            creep, p = list(z[:6]), z[6] ** (1 / (1 - problem.k))
        at_knot[piece.knot] = creep, p
    return list(at_knot.values()), count[0]


# ---- DOP853 in stress deviator and p -------------------------------------------------------------------------------

class StressForm:
    def __init__(self, problem, piece):
        self.problem, self.piece = problem, piece

    def rhs(self, time, w):
        piece = self.piece
        temperature = piece.temp0 + time * piece.temp_rate
        g, by_t = piece.shear(temperature)
        s = w[:6].tolist()
        q, p = mises(s), float(w[6])
        if p <= 0 and self.problem.k:
            return np.full(7, np.nan)
        rate = self.problem.rate(q, p, temperature)[0]
        f = by_t / g * piece.temp_rate - (3 * g * rate / q if q else 0.0)
        return np.array([f * x + 2 * g * e for x, e in zip(s, piece.erate)] + [rate])

    def logarithmic(self, u, w):
        time = math.exp(u)
        return time * self.rhs(time, w)


def log_start(problem, piece):
    """p**(1-k) = (1-k) a t at constant stress, at a time when creep has taken only 1e-13 of the elastic strain."""
    g = piece.shear(piece.temp0)[0]
    s = [2 * g * x for x in piece.e0]
    q = mises(s)
    singular = sum(t.stress_part(q, piece.temp0)[0] for t in problem.terms if t.k == problem.k)
    p = 1e-13 * q / (3 * g)
    time = p ** (1 - problem.k) / ((1 - problem.k) * singular)
    return time, [x * (1 - 3 * g * p / q) for x in s], p


def dop853(problem):
    """The same in the unknowns (stress deviator, p): creep strain and p at every knot, and the number of evaluations."""
    creep, p, count, at_knot = [0.0] * 6, 0.0, [0], {}
    for piece in problem.pieces():
        if piece.length > 0 and not nothing_happens(piece, creep, p):
            g = piece.shear(piece.temp0)[0]
            s, span = [2 * g * (a - c) for a, c in zip(piece.e0, creep)], (0.0, piece.length)
            form = StressForm(problem, piece)
            rhs = form.rhs
            if p == 0 and problem.k < 0 and any(piece.e0):
                time, s, p = log_start(problem, piece)
                rhs, span = form.logarithmic, (math.log(time), math.log(piece.length))
            elif p == 0 and problem.k < 0:
                time, p = ramp_start(problem, piece, 1e-12)
                g = piece.shear(piece.temp0 + time * piece.temp_rate)[0]
                s, span = [2 * g * time * x for x in piece.erate], (time, piece.length)
            size = 2 * g * scale_of_strain(problem)
            atol = [1e-16 * size] * 6 + [1e-14 * p if problem.k else 1e-16 * scale_of_strain(problem)]
            w = run(rhs, span, s + [p], "DOP853", RTOL_EXPLICIT, atol, count)
            end = piece.temp0 + piece.length * piece.temp_rate
            g2 = 2 * piece.shear(end)[0]
            creep = [a + piece.length * b - x / g2 for a, b, x in zip(piece.e0, piece.erate, w[:6])]
            p = float(w[6])
        at_knot[piece.knot] = creep, p
    return list(at_knot.values()), count[0]
