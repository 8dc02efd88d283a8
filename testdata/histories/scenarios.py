"""The histories: invented materials and paths, sensible in size, none from a test or a plant.

Every number is a short decimal. A knot is [time, xx, yy, zz, yz, xz, xy, T]: total strain in tensor components, linear in
time between knots, as is the temperature. Two knots at one time are a jump. A strain at the first knot is put on at once.
"""

MPA_H = {"stress": "MPa", "time": "h", "temperature": "K"}
PA_S = {"stress": "Pa", "time": "s", "temperature": "K"}


PLAIN = {"young": 160000.0, "poisson": 0.3}
STEEL = {
    "young": [[293.0, 210000.0], [573.0, 190000.0], [723.0, 174000.0], [823.0, 160000.0], [923.0, 140000.0],
              [1023.0, 115000.0]],
    "poisson": [[293.0, 0.285], [773.0, 0.302], [973.0, 0.32], [1023.0, 0.322]],
}
STEEL_EXPANSION = {
    "mean_coefficient": [[293.0, 1.15e-5], [573.0, 1.28e-5], [823.0, 1.4e-5], [1023.0, 1.46e-5]],
    "reference_temperature": 293.0,
}
ALLOY = {"young": [[293.0, 72000.0], [423.0, 66000.0], [523.0, 59000.0]], "poisson": 0.33}
SOLDER = {"young": [[218.0, 54e9], [298.0, 46e9], [348.0, 38e9], [423.0, 29e9]], "poisson": [[218.0, 0.35], [423.0, 0.37]]}
SOLDER_EXPANSION = {"mean_coefficient": 2.2e-5, "reference_temperature": 298.0}


def norton(a, n):
    return {"kind": "norton", "prefactor": a, "stress_exponent": n}


def garofalo(a, b, n):
    return {"kind": "garofalo", "prefactor": a, "stress_coefficient": b, "stress_exponent": n}


def bailey_norton(a, n, m):
    return {"kind": "bailey_norton", "prefactor": a, "stress_exponent": n, "time_exponent": m}


def direct(a, n, k):
    return {"kind": "strain_hardening", "prefactor": a, "stress_exponent": n, "strain_exponent": k}


def hot(law, q, reference):
    return {"kind": "arrhenius", "law": law, "activation_energy": q, "reference_temperature": reference}


def total(*terms):
    return {"kind": "sum", "terms": list(terms)}


def knot(time, temperature, xx=0.0, yy=0.0, zz=0.0, yz=0.0, xz=0.0, xy=0.0):
    return [float(time)] + [round(float(x), 12) for x in (xx, yy, zz, yz, xz, xy)] + [float(temperature)]


def bar(time, temperature, strain, lateral=-0.3, **more):
    """A bar pulled along x whose sides follow with a fixed ratio (creep would ask for more: so the mean stress moves)."""
    return knot(time, temperature, xx=strain, yy=lateral * strain, zz=lateral * strain, **more)


def tension_shear(time, temperature, tension, shear):
    """Thin-walled tube without change of volume: axial strain and torsion."""
    return knot(time, temperature, xx=tension, yy=-tension / 2, zz=-tension / 2, xy=shear)


def history(name, about, law, knots, elasticity=PLAIN, expansion=None, units=MPA_H):
    return {"name": name, "about": about, "units": units, "elasticity": elasticity, "expansion": expansion, "law": law,
            "knots": knots}


def steps(function, values, **same):
    return [function(*value, **same) for value in values]


def norton_holds():
    n5, t = norton(1e-16, 5.0), 823.0
    general = dict(xx=0.0011, yy=-0.0004, zz=0.0002, yz=0.0003, xz=-0.0005, xy=0.0007)
    return [
        history("norton-bar-hold", "bar put under strain at once and held", n5,
                steps(bar, [(x, t, 0.001) for x in (0, 10, 100, 1000, 10000)])),
        history("norton-shear-hold", "torsion held, n = 3", norton(2e-12, 3.0),
                [knot(x, t, xy=0.0012) for x in (0, 5, 50, 500, 5000)]),
        history("norton-biaxial-hold", "equal biaxial strain held", norton(1e-14, 4.0),
                [knot(x, t, xx=0.0007, yy=0.0007, zz=-0.0006) for x in (0, 20, 200, 2000)]),
        history("norton-general-hold", "all six strains held, n = 7.3", norton(4e-22, 7.3),
                [knot(x, t, **general) for x in (0, 1, 100, 10000)]),
        history("norton-n12-long-hold", "strong relaxation over nine decades, n = 12", norton(1.1e-31, 12.0),
                [knot(x, t, xx=0.0018, yy=-0.0006, zz=-0.0006, xy=0.0004) for x in (0, 0.001, 1, 1000, 100000)]),
        history("norton-nearly-incompressible", "hydrostatic pressure with shear, Poisson ratio 0.49", norton(1e-14, 4.0),
                [knot(0, t), knot(10, t, xx=-0.0005, yy=-0.0004, zz=-0.0006, xz=0.0006),
                 knot(500, t, xx=-0.0005, yy=-0.0004, zz=-0.0006, xz=0.0006),
                 knot(510, t, xx=0.0002, yy=0.0002, zz=0.0002, xz=0.0001)],
                elasticity={"young": 60000.0, "poisson": 0.49}),
        history("norton-hydrostatic-then-shear", "hydrostatic strain alone, then shear under it", norton(1e-14, 4.0),
                [knot(0, t), knot(10, t, xx=0.001, yy=0.001, zz=0.001), knot(110, t, xx=0.001, yy=0.001, zz=0.001),
                 knot(120, t, xx=0.001, yy=0.001, zz=0.001, yz=0.0009),
                 knot(1120, t, xx=0.001, yy=0.001, zz=0.001, yz=0.0009)]),
    ]


def norton_paths():
    n4, t = norton(1e-14, 4.0), 823.0
    circle = [(0.0, 0.0), (0.001, 0.0), (0.0007, 0.0006), (0.0, 0.00087), (-0.0007, 0.0006), (-0.001, 0.0),
              (-0.0007, -0.0006), (0.0, -0.00087), (0.0007, -0.0006), (0.001, 0.0)]
    square = [(0, 0, 0), (5, 0.0008, 0), (55, 0.0008, 0), (60, 0.0008, 0.0007), (110, 0.0008, 0.0007), (115, 0, 0.0007),
              (165, 0, 0.0007), (170, 0, 0), (220, 0, 0)]
    return [
        history("norton-pull-to-steady", "constant strain rate into steady creep", norton(1e-16, 5.0),
                steps(bar, [(0, t, 0.0), (100, t, 0.0005), (500, t, 0.0025), (2500, t, 0.0125)], lateral=-0.5)),
        history("norton-reversal", "strain reversed twice along one line, n = 4.5", norton(1e-15, 4.5),
                steps(bar, [(0, t, 0.0), (10, t, 0.001), (110, t, 0.001), (130, t, -0.001), (230, t, -0.001),
                            (250, t, 0.0005), (350, t, 0.0005)])),
        history("norton-shear-after-tension", "tension, then torsion with the tension held", n4,
                steps(tension_shear, [(0, t, 0, 0), (10, t, 0.0009, 0), (60, t, 0.0009, 0), (70, t, 0.0009, 0.0008),
                                      (570, t, 0.0009, 0.0008)])),
        history("norton-circle", "tension and torsion out of phase once round, n = 5", norton(2e-16, 5.0),
                [tension_shear(20 * i, t, a, b) for i, (a, b) in enumerate(circle)]),
        history("norton-square-with-holds", "square path of tension and torsion with holds at the corners", n4,
                [tension_shear(x, t, a, b) for x, a, b in square]),
        history("norton-viscous-rotation", "n = 1: the strain direction turned through three planes", norton(2e-8, 1.0),
                [knot(0, t), knot(10, t, xx=0.001, yy=-0.001), knot(40, t, yy=0.001, zz=-0.001),
                 knot(70, t, yz=0.0008, xz=0.0004), knot(170, t, yz=0.0008, xz=0.0004, xy=0.0006)]),
        history("norton-cycles", "four strain cycles with holds in tension", n4,
                [bar(50 * c + x, t, a) for c in range(4) for x, a in ((0, 0.0), (2, 0.0012), (40, 0.0012), (46, -0.0004))]
                + [bar(200, t, 0.0)]),
        history("norton-n25-pull", "n = 25 driven at two rates, nearly plastic", norton(1e-60, 25.0),
                [knot(0, t), knot(10, t, xx=0.001, yy=-0.0005, zz=-0.0005),
                 knot(20, t, xx=0.002, yy=-0.001, zz=-0.001, xy=0.0005),
                 knot(120, t, xx=0.0025, yy=-0.00125, zz=-0.00125, xy=0.0002)]),
        history("norton-jumps", "sudden overloads and partial unloads, n = 4", n4,
                steps(bar, [(0, t, 0.0005), (100, t, 0.0005), (100, t, 0.0012), (200, t, 0.0012), (200, t, 0.0006),
                            (700, t, 0.0006)])),
        history("norton-soft-cycles", "stiff: creep far beyond the elastic strain, thousands of relaxation times a stretch",
                norton(1e-6, 5.0), [knot(0, t), knot(10, t, xx=0.01, yy=-0.005, zz=-0.005),
                                    knot(30, t, xx=-0.01, yy=0.002, zz=0.008, xy=0.01),
                                    knot(50, t, xx=0.01, yy=-0.005, zz=-0.005, xy=-0.01),
                                    knot(1050, t, xx=0.01, yy=-0.005, zz=-0.005, xy=-0.01)]),
        history("norton-pa-s", "the units Pa and s, hours of hold and a reversal", norton(3e-50, 5.0),
                steps(bar, [(0, t, 0.0), (3600, t, 0.001), (360000, t, 0.001), (367200, t, -0.0008),
                            (3967200, t, -0.0008)]),
                elasticity={"young": 160e9, "poisson": 0.3}, units=PA_S),
        history("norton-ice-pa-s", "soft and slow: n = 3, three-dimensional squeeze with shear, Pa and s",
                norton(2.4e-24, 3.0),
                [knot(0, 263.0), knot(40000, 263.0, xx=-0.0004, yy=0.0001, zz=0.0003, xz=0.0002),
                 knot(240000, 263.0, xx=-0.0014, yy=0.0005, zz=0.0009, xz=0.0009, yz=-0.0003),
                 knot(300000, 263.0, xx=-0.0012, yy=0.0005, zz=0.0007, xz=0.0002, yz=0.0001)],
                elasticity={"young": 9e9, "poisson": 0.33}, units=PA_S),
    ]


def norton_temperatures():
    law = hot(norton(1e-16, 5.0), 340000.0, 823.0)
    steel = dict(elasticity=STEEL, expansion=STEEL_EXPANSION)
    return [
        history("arrhenius-heating", "held bar heated through three table points", law,
                steps(bar, [(0, 673.0, 0.0012), (50, 673.0, 0.0012), (150, 943.0, 0.0012), (650, 943.0, 0.0012)]), **steel),
        history("arrhenius-cooling", "held tube cooled through the tables after a hot hold", law,
                steps(tension_shear, [(0, 903.0, 0.0004, 0.0009), (30, 903.0, 0.0004, 0.0009),
                                      (130, 313.0, 0.0004, 0.0009), (430, 753.0, 0.0004, 0.0009)]), **steel),
        history("arrhenius-start-stop", "start-up, service and shut-down, three times, sides partly free", law,
                [knot(1000 * c + x, temp, xx=axial, yy=side, zz=side, xy=0.0003) for c in range(3)
                 for x, temp, axial, side in ((0, 293.0, 0.0, 0.0), (20, 843.0, 0.0067, 0.0083),
                                              (900, 853.0, 0.0067, 0.0083), (930, 403.0, 0.001, 0.0013))]
                + [knot(3000, 293.0)], **steel),
        history("arrhenius-constrained-heating", "all strains zero while heated: hydrostatic, then sheared hot", law,
                [knot(0, 293.0), knot(20, 873.0), knot(220, 873.0), knot(230, 873.0, xy=0.001, yz=-0.0004),
                 knot(430, 823.0, xy=0.001, yz=-0.0004), knot(450, 393.0)], **steel),
        history("arrhenius-nonproportional-ramp", "strain direction and temperature change together", law,
                steps(tension_shear, [(0, 723.0, 0, 0), (10, 793.0, 0.001, 0), (60, 873.0, 0.0008, 0.0007),
                                      (110, 893.0, -0.0002, 0.0008), (160, 813.0, -0.0009, 0), (260, 723.0, 0, -0.0004)]),
                **steel),
        history("arrhenius-temperature-jump", "sudden change of temperature, up and down, at held strain", law,
                steps(bar, [(0, 773.0, 0.001), (100, 773.0, 0.001), (100, 883.0, 0.001), (150, 883.0, 0.001),
                            (150, 783.0, 0.0015), (950, 783.0, 0.0015)]), **steel),
        history("arrhenius-fatigue-with-hold", "out-of-phase thermal and mechanical cycles", law,
                [bar(24 * c + x, temp, a) for c in range(3)
                 for x, temp, a in ((0, 573.0, 0.0), (1, 573.0, 0.001), (4, 873.0, -0.0006), (20, 873.0, -0.0006))]
                + [bar(72, 573.0, 0.0)], **steel),
        history("arrhenius-pa-s", "heating and cooling in Pa and s, general strain", hot(norton(3e-50, 5.0), 340000.0, 823.0),
                [knot(0, 773.0, xx=0.0009, zz=-0.0003, xz=0.0004), knot(7200, 893.0, xx=0.0009, zz=-0.0003, xz=0.0004),
                 knot(43200, 893.0, xx=0.0009, zz=-0.0002, xz=0.0006), knot(86400, 803.0, xx=0.0004, xz=0.0002)],
                elasticity={"young": [[773.0, 167e9], [873.0, 151e9], [923.0, 141e9]], "poisson": 0.31},
                expansion={"mean_coefficient": 1.3e-5, "reference_temperature": 773.0}, units=PA_S),
    ]


def garofalos():
    g, t = garofalo(2e-8, 0.015, 4.0), 823.0
    shear_cycle = [(0, 298.0, 0.0), (600, 398.0, 0.006), (1500, 398.0, 0.006), (2700, 233.0, -0.004), (3300, 233.0, -0.004)]
    return [
        history("garofalo-bar-hold", "from the exponential range down to the power range", g,
                steps(bar, [(x, t, 0.002) for x in (0, 0.01, 1, 100, 10000)])),
        history("garofalo-reversal", "strain reversed through zero at high stress", g,
                steps(bar, [(0, t, 0.0), (5, t, 0.002), (25, t, 0.002), (35, t, -0.002), (55, t, -0.002), (60, t, 0.0)])),
        history("garofalo-rotation", "principal directions turned round the body diagonal", g,
                [knot(0, t), knot(10, t, xy=0.001), knot(30, t, yz=0.001), knot(50, t, xz=0.001), knot(70, t, xy=0.001),
                 knot(170, t, xy=0.001, xz=-0.0005)]),
        history("garofalo-sinh-1", "n = 1: plain hyperbolic sine, square path", garofalo(1e-6, 0.03, 1.0),
                steps(tension_shear, [(0, t, 0, 0), (10, t, 0.001, 0), (30, t, 0.001, 0.001), (50, t, 0, 0.001),
                                      (150, t, 0, 0)])),
        history("garofalo-alloy-ramp", "light alloy heated and cooled at changing strain", hot(
            garofalo(2e-9, 0.035, 3.5), 142000.0, 423.0),
                steps(bar, [(0, 373.0, 0.0), (2, 373.0, 0.0015), (10, 473.0, 0.0015), (60, 473.0, 0.002), (70, 393.0, 0.001),
                            (170, 433.0, 0.0012)], lateral=-0.33), elasticity=ALLOY,
                expansion={"mean_coefficient": [[293.0, 2.3e-5], [473.0, 2.5e-5], [523.0, 2.56e-5]],
                           "reference_temperature": 293.0}),
        history("garofalo-solder-pa-s", "solder joint sheared by two thermal cycles, Pa and s",
                hot(garofalo(1e-8, 7e-8, 3.3), 48000.0, 298.0),
                [knot(3600 * c + x, temp, xy=a, yz=a / 4) for c in range(2) for x, temp, a in shear_cycle]
                + [knot(7200, 298.0)], elasticity=SOLDER, expansion=SOLDER_EXPANSION, units=PA_S),
    ]


def bailey_nortons():
    b, t = bailey_norton(1.2e-13, 4.0, 0.4), 823.0
    warm = hot(b, 300000.0, 823.0)
    return [
        history("bailey-norton-bar-hold", "strain hardening from virgin material under stress, m = 0.4", b,
                steps(bar, [(x, t, 0.001) for x in (0, 0.1, 10, 1000, 100000)])),
        history("bailey-norton-shear-hold", "m = 0.25, a very steep start", bailey_norton(4e-10, 2.5, 0.25),
                [knot(x, t, xz=0.0011, xy=0.0003) for x in (0, 1, 100, 10000)]),
        history("bailey-norton-ramp", "loaded slowly from zero, then held", b,
                steps(bar, [(0, t, 0.0), (20, t, 0.0012), (200, t, 0.0012), (2000, t, 0.0012)])),
        history("bailey-norton-reversal", "two reversals: the hardening is kept", bailey_norton(1e-10, 3.0, 0.5),
                steps(bar, [(0, t, 0.0), (10, t, 0.001), (100, t, 0.001), (110, t, -0.001), (200, t, -0.001),
                            (210, t, 0.001), (500, t, 0.001)])),
        history("bailey-norton-shear-after-tension", "sudden tension, torsion added later", b,
                steps(tension_shear, [(0, t, 0.0009, 0), (100, t, 0.0009, 0), (120, t, 0.0009, 0.0009),
                                      (1120, t, 0.0009, 0.0009)])),
        history("bailey-norton-virgin-wait", "unloaded wait before loading, which a clock would count", b,
                steps(bar, [(0, t, 0.0), (1000, t, 0.0), (1000, t, 0.001), (1010, t, 0.001), (2000, t, 0.001)])),
        history("bailey-norton-wait", "creep, unloaded wait (stress below 0.01 MPa), reload", b,
                [knot(0, t, xx=0.001, yy=-0.0005, zz=-0.0005), knot(100, t, xx=0.001, yy=-0.0005, zz=-0.0005)]
                + [knot(x, t, **WAIT) for x in (100, 5100)]
                + [knot(x, t, xx=0.0013, yy=-0.00065, zz=-0.00065) for x in (5100, 6100)]),
        history("bailey-norton-temperatures", "hardening with temperature ramps and tables", warm,
                steps(bar, [(0, 773.0, 0.001), (50, 773.0, 0.001), (70, 873.0, 0.001), (170, 873.0, 0.0013),
                            (200, 703.0, 0.0006), (500, 843.0, 0.0009)]), elasticity=STEEL, expansion=STEEL_EXPANSION),
        history("bailey-norton-cycles", "tension and torsion cycles with E(T), loaded from zero", warm,
                [tension_shear(30 * c + x, temp, a, g) for c in range(3)
                 for x, temp, a, g in ((0, 743.0, 0.0, 0.0), (5, 783.0, 0.0011, 0.0), (15, 853.0, 0.0011, 0.0006),
                                       (25, 803.0, -0.0003, 0.0009))]
                + [tension_shear(90, 743.0, 0.0, 0.0)], elasticity=STEEL, expansion=STEEL_EXPANSION),
        history("bailey-norton-m1", "m = 1 is Norton's law", bailey_norton(1e-14, 4.0, 1.0),
                steps(tension_shear, [(0, t, 0.0008, 0.0), (50, t, 0.0008, 0.0), (60, t, -0.0004, 0.0008),
                                      (160, t, -0.0004, 0.0008)])),
    ]


WAIT = dict(xx=0.000299116, yy=-0.000149558, zz=-0.000149558)  # the creep strain of that moment, as far as written


def directs_and_sums():
    t, primary = 823.0, bailey_norton(6e-14, 4.0, 0.4)
    double = total(norton(2e-9, 1.2), norton(1e-20, 7.0))
    warm_sum = total(hot(primary, 280000.0, 823.0), hot(norton(5e-17, 5.0), 350000.0, 823.0))
    return [
        history("direct-hold", "rate form with k = -2", direct(3e-25, 6.0, -2.0),
                steps(bar, [(x, t, 0.001) for x in (0, 1, 100, 10000)])),
        history("direct-circle", "k = -0.5, tension and torsion out of phase", direct(1.5e-15, 4.0, -0.5),
                steps(tension_shear, [(0, t, 0, 0), (20, t, 0.001, 0), (50, t, 0.0005, 0.0008), (80, t, -0.0005, 0.0008),
                                      (110, t, -0.001, 0), (210, t, 0, -0.0008)])),
        history("direct-pa-s", "k = -1 in Pa and s, ramp, hold and reversal", direct(7e-49, 4.5, -1.0),
                [knot(0, t), knot(7200, t, xx=0.001, yy=-0.0004, zz=-0.0003, yz=0.0002),
                 knot(720000, t, xx=0.001, yy=-0.0004, zz=-0.0003, yz=0.0002), knot(734400, t, xx=-0.0005, xy=0.0004),
                 knot(1500000, t, xx=-0.0005, xy=0.0004)],
                elasticity={"young": 160e9, "poisson": 0.3}, units=PA_S),
        history("sum-primary-secondary-hold", "primary and secondary creep together, sudden strain held",
                total(primary, norton(5e-17, 5.0)), steps(bar, [(x, t, 0.0011) for x in (0, 0.1, 10, 1000, 100000)])),
        history("sum-primary-secondary-path", "the same pulled, sheared and reversed", total(primary, norton(5e-17, 5.0)),
                steps(tension_shear, [(0, t, 0.0006, 0), (100, t, 0.0016, 0), (200, t, 0.0016, 0.0009),
                                      (300, t, 0.0004, 0.0009), (800, t, 0.0004, 0.0009)])),
        history("sum-temperatures", "two activation energies, ramps up and down through the tables", warm_sum,
                steps(bar, [(0, 753.0, 0.001), (50, 753.0, 0.001), (80, 893.0, 0.0012), (180, 893.0, 0.0012),
                            (230, 653.0, 0.0005), (260, 793.0, 0.001), (560, 793.0, 0.001)]),
                elasticity=STEEL, expansion=STEEL_EXPANSION),
        history("sum-double-power", "two exponents, 1.2 and 7: square path", double,
                steps(tension_shear, [(0, t, 0, 0), (10, t, 0.0014, 0), (60, t, 0.0014, 0.0012), (110, t, 0, 0.0012),
                                      (160, t, 0, 0), (660, t, 0, 0)])),
        history("sum-primary-sinh-cycles", "strain hardening beside a hyperbolic sine, cycles with holds",
                total(primary, garofalo(4e-9, 0.015, 4.0)),
                [bar(60 * c + x, t, a) for c in range(3) for x, a in ((0, 0.0004), (5, 0.0014), (40, 0.0014), (50, -0.0006))]
                + [bar(180, t, 0.0004)]),
    ]


def histories():
    return (norton_holds() + norton_paths() + norton_temperatures() + garofalos() + bailey_nortons()
            + directs_and_sums())
