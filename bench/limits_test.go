package bench_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/integrate/quad"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
)

// TestElementaryCases holds the problems that need a quadrature against the parameters for which they need none.
func TestElementaryCases(t *testing.T) {
	const young, stress = 150e3, 200.0
	// Strain-hardening relaxation, n = 5 and m = 1/2 (Finnie & Heller 1959): t = 2/(EA)² [σ₀(σ⁻⁹-σ₀⁻⁹)/9 - (σ⁻⁸-σ₀⁻⁸)/8].
	const prefactor = 1e-15
	half := bench.StrainHardeningRelaxation{Young: young, Stress: stress, Curve: bailey(prefactor, 5, 0.5)}
	for _, s := range []float64{190, 150, 100, 30, 1, 1e-3} {
		want := 2 / math.Pow(young*prefactor, 2) * (stress*(math.Pow(s, -9)-math.Pow(stress, -9))/9 -
			(math.Pow(s, -8)-math.Pow(stress, -8))/8)
		check.Rel(t, "n = 5, m = 1/2", half.TimeTo(s), want, 2e-13) // the difference of the brackets costs a digit or two
		check.Rel(t, "n = 5, m = 1/2, stress", half.StressAt(want), s, 1e-12)
	}
	// With m = 1 strain hardening is Norton's law, and so is time hardening.
	bar := bench.BarRelaxation{Young: young, Stress: stress, Law: norton(1e-16, 5)}
	for _, time := range []float64{1e-9, 1, 1e3, 1e12} {
		none := bench.StrainHardeningRelaxation{Young: young, Stress: stress, Curve: bailey(1e-16, 5, 1)}
		check.Rel(t, "m = 1, strain hardening", none.StressAt(time), bar.StressAt(time), 1e-12)
		check.Rel(t, "m = 1, creep", none.CreepAt(time), bar.CreepAt(time), 1e-12)
		check.Rel(t, "m = 1, time hardening", bench.TimeHardeningRelaxation(none).StressAt(time), bar.StressAt(time), 1e-13)
	}
	// Primary and secondary rates with m = 1/2: t = p/D - (C/D²) ln(1 + D p/C), and m = 1.
	both := bench.ParallelCreep{Stress: stress, Primary: bailey(1.5625e-14, 5, 0.5), Secondary: norton(3.125e-16, 5)}
	c, d := 0.5*math.Pow(0.005, 2), 1e-4 // (Aσⁿ)²/2 and the steady rate
	for _, time := range []float64{1e-3, 1, 100, 1e4} {
		p := both.CreepAt(time)
		check.Rel(t, "m = 1/2", p/d-c/(d*d)*math.Log1p(d*p/c), time, 1e-9) // early, the two terms cancel to p²/2C: 6 digits lost
	}
	both.Primary.TimeExponent = 1
	check.Rel(t, "m = 1", both.CreepAt(10), 10*(0.005+1e-4), 1e-13)
	// The general constant-rate solution next to the two elementary exponents.
	for _, n := range []float64{1, 2} {
		exact := bench.ConstantRateTension{Young: young, StrainRate: 1e-6, Law: norton(1e-10, n)}
		near := exact
		near.Law.Exponent *= 1 + 1e-13
		for _, time := range []float64{1, 500, 3e3} {
			check.Rel(t, "constant rate", near.StressAt(time), exact.StressAt(time), 1e-11) // 1e-13 amplified by ln σ
			check.Rel(t, "constant rate, time", exact.TimeTo(exact.StressAt(time)), time, 1e-10)
		}
	}
	// ṗ = A σⁿ pᵏ with k = 0 is Norton's law, and with k = (m-1)/m a curve of Bailey and Norton.
	direct := bench.StrainHardeningCreep{Stress: 200, Law: bench.StrainHardening{Rate: 1e-12, Stress: 200, Strain: 1e-3,
		StressExponent: 5}}
	check.Rel(t, "k = 0", direct.CreepAt(1e6), 1e-6, 1e-13)
	direct.Law.StrainExponent = -1 // p² = 2 A σⁿ t with p₁ = 1e-3
	check.Rel(t, "k = -1", direct.CreepAt(1e6), math.Sqrt(2*1e-15*1e6), 1e-13)
}

// TestStartsAndLimits lists the special times.
func TestStartsAndLimits(t *testing.T) {
	law := norton(1e-16, 5)
	inf := math.Inf(1)
	curve := bailey(1e-15, 5, 0.4)
	bar := bench.BarRelaxation{Young: 150e3, Stress: 200, Law: law}
	follow := bench.FollowUpRelaxation{Young: 150e3, Stress: 200, FollowUp: 3, Law: law}
	strain := bench.StrainHardeningRelaxation{Young: 150e3, Stress: 200, Curve: curve}
	still := bench.SolidRelaxation{Young: 150e3, Poisson: 0.3, Stress: tensor.Sym{7, 7, 7}, Law: law}
	for _, c := range []struct {
		name         string
		at           func(float64) float64
		start, limit float64
	}{
		{"bar", bar.StressAt, 200, 0},
		{"bar, creep", bar.CreepAt, 0, 200. / 150e3},
		{"follow-up", follow.StressAt, 200, 0},
		{"follow-up, strain", follow.StrainAt, 200. / 150e3, 3 * 200. / 150e3},
		{"sinh", bench.SinhRelaxation{Young: 150e3, Stress: 200, Prefactor: 1e-9, Coefficient: 0.05}.StressAt, 200, 0},
		{"shear", bench.ShearRelaxation{Shear: 60e3, Stress: 100, Law: law}.StressAt, 100, 0},
		{"solid", bench.SolidRelaxation{Young: 150e3, Poisson: 0.3, Stress: tensor.Sym{200}, Law: law}.MisesAt, 200, 0},
		{"solid without deviator", still.MisesAt, 0, 0},
		{"solid without deviator, creep", still.EquivalentCreepAt, 0, 0},
		{"strain hardening", strain.StressAt, 200, 0},
		{"strain hardening, creep", strain.CreepAt, 0, 200. / 150e3},
		{"time hardening", bench.TimeHardeningRelaxation(strain).StressAt, 200, 0},
		{"constant rate", bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: norton(1e-15, 5)}.StressAt, 0,
			math.Pow(1e9, 0.2)},
		{"Norton creep", bench.NortonCreep{Stress: 200, Law: law}.CreepAt, 0, inf},
		{"primary creep", bench.BaileyNortonCreep{Stress: 200, Curve: curve}.CreepAt, 0, inf},
		{"parallel creep", bench.ParallelCreep{Stress: 200, Primary: curve, Secondary: law}.CreepAt, 0, inf},
		{"two steps", bench.TwoStepCreep{First: 1, Change: 1, Second: 2, Curve: curve}.StrainHardeningAt, 0, inf},
	} {
		check.Rel(t, c.name+" at the start", c.at(0), c.start, 1e-14)
		check.Rel(t, c.name+" in the end", c.at(inf), c.limit, 1e-13)
		for _, bad := range []float64{-1, math.NaN()} {
			require.True(t, math.IsNaN(c.at(bad)), "%s at time %v", c.name, bad)
		}
	}
	require.Equal(t, still.Stress, still.StressAt(1e9), "a mean stress does not creep")

	for _, s := range []float64{-1, 201, math.NaN()} {
		require.True(t, math.IsNaN(bar.TimeTo(s)) && math.IsNaN(strain.TimeTo(s)), "time to %v", s)
	}
	require.Zero(t, bar.TimeTo(200))
	require.Zero(t, strain.TimeTo(200))
	require.True(t, math.IsInf(bar.TimeTo(0), 1) && math.IsInf(strain.TimeTo(0), 1), "never")

	root := bench.BarRelaxation{Young: 150e3, Stress: 200, Law: norton(1e-9, 0.5)} // gone after 2√σ₀/(E A)
	gone := 2 * math.Sqrt(200) / (150e3 * 1e-9)
	check.Rel(t, "time to nothing, n = 1/2", root.TimeTo(0), gone, 1e-13)
	check.Rel(t, "half way, n = 1/2", root.StressAt(gone/2), 50, 1e-13)
	require.Zero(t, root.StressAt(gone*1.01))
}

// TestExponentNearOne holds the limits n → 1 against their neighbours: no digits may be lost in n-1.
func TestExponentNearOne(t *testing.T) {
	for _, off := range []float64{-1e-9, -1e-13, 1e-13, 1e-9} {
		one, near := bench.BarRelaxation{Young: 150e3, Stress: 200, Law: norton(1e-8, 1)}, bench.BarRelaxation{}
		near = one
		near.Law = bench.Norton{Rate: 200e-8, Stress: 200, Exponent: 1 + off}
		tolerance := 1e-14 + 10*math.Abs(off)
		check.Rel(t, "stress", near.StressAt(500), one.StressAt(500), tolerance)
		check.Rel(t, "half-life", near.HalfLife(), one.HalfLife(), tolerance)
		beam := bench.RectangularBeam{Width: 1, HalfDepth: 1, Moment: 1, Law: near.Law}
		check.Rel(t, "skeletal point", beam.SkeletalPoint(), math.Exp(-1./3), tolerance)
	}
}

// TestUnits takes cases with n = 50 from MPa and h to Pa and s, where the prefactor A would be 1e-8 × 10⁻³⁰⁰⁻¹¹⁵/3600.
func TestUnits(t *testing.T) {
	const pa, s = 1e6, 3600.0
	law := bench.Norton{Rate: 1e-8, Stress: 200, Exponent: 50}
	other := bench.Norton{Rate: 1e-8 / s, Stress: 200 * pa, Exponent: 50}
	for _, time := range []float64{1e-12, 1, 1e3, 1e12, 1e30} {
		a := bench.BarRelaxation{Young: 150e3, Stress: 250, Law: law}
		b := bench.BarRelaxation{Young: 150e3 * pa, Stress: 250 * pa, Law: other}
		check.Rel(t, "bar", b.StressAt(time*s), a.StressAt(time)*pa, 1e-14)
		check.Rel(t, "bar, creep", b.CreepAt(time*s), a.CreepAt(time), 1e-13)
		curve := bench.BaileyNorton{Strain: 1e-4, Stress: 200, Time: 100, StressExponent: 50, TimeExponent: 0.2}
		changed := bench.BaileyNorton{Strain: 1e-4, Stress: 200 * pa, Time: 100 * s, StressExponent: 50, TimeExponent: 0.2}
		c := bench.StrainHardeningRelaxation{Young: 150e3, Stress: 250, Curve: curve}
		d := bench.StrainHardeningRelaxation{Young: 150e3 * pa, Stress: 250 * pa, Curve: changed}
		check.Rel(t, "strain hardening", d.StressAt(time*s), c.StressAt(time)*pa, 1e-12)
		e := bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: law}
		f := bench.ConstantRateTension{Young: 150e3 * pa, StrainRate: 1e-6 / s, Law: other}
		check.Rel(t, "constant rate", f.StressAt(time*s), e.StressAt(time)*pa, 1e-12)
	}
	// The prefactor's form and the reference form are one law.
	check.Rel(t, "one law", norton(1e-16, 5).RateAt(200), bench.Norton{Rate: 1e-16 * 3.2e11, Stress: 200, Exponent: 5}.RateAt(200),
		1e-13)
}

// TestEquilibrium holds the steady states of vessels and beams against the loads they carry, by quadrature of gonum.
func TestEquilibrium(t *testing.T) {
	integral := func(f func(float64) float64, low, high float64) float64 {
		return quad.Fixed(f, low, high, 200, quad.Legendre{}, 0)
	}
	for _, n := range []float64{0.7, 1, 2, 5, 12, 50} {
		law := bench.Norton{Rate: 1e-6, Stress: 100, Exponent: n}
		c := valid(t, bench.ThickCylinder{Inner: 10, Outer: 17, Pressure: 30, Law: law})
		check.Rel(t, "cylinder, hoop force", integral(c.HoopAt, 10, 17), 30*10, 1e-12)
		axial := func(r float64) float64 { return 2 * math.Pi * r * c.AxialAt(r) }
		check.Rel(t, "cylinder, end force", integral(axial, 10, 17), 30*math.Pi*100, 1e-12)
		check.Rel(t, "cylinder, incompressible flow", c.VelocityAt(10)*10, c.VelocityAt(16)*16, 1e-12)
		check.Rel(t, "cylinder, Mises", tensor.Sym{c.RadialAt(12), c.HoopAt(12), c.AxialAt(12)}.Mises(), c.MisesAt(12), 1e-12)

		s := valid(t, bench.ThickSphere{Inner: 10, Outer: 17, Pressure: 30, Law: law})
		hoop := func(r float64) float64 { return 2 * math.Pi * r * s.HoopAt(r) }
		check.Rel(t, "sphere, force", integral(hoop, 10, 17), 30*math.Pi*100, 1e-12)
		check.Rel(t, "sphere, incompressible flow", s.VelocityAt(10)*100, s.VelocityAt(16)*256, 1e-12)

		// The integrand goes as y^(1+1/n): 200 points give six digits or more.
		b := valid(t, bench.RectangularBeam{Width: 3, HalfDepth: 2, Moment: 500, Law: law})
		check.Rel(t, "beam, moment", 2*integral(func(y float64) float64 { return 3 * y * b.StressAt(y) }, 0, 2), 500, 1e-6)
		check.Rel(t, "beam, plane sections", law.RateAt(b.StressAt(0.3))/0.3, b.CurvatureRate(), 1e-12)
		check.Rel(t, "beam, I_n", math.Pow(500/b.CreepInertia(), n)*2, math.Pow(b.MaxStress(), n), 1e-11)

		bar := valid(t, bench.TorsionBar{Radius: 2, Torque: 500, Law: law})
		torque := func(r float64) float64 { return 2 * math.Pi * r * r * bar.StressAt(r) }
		check.Rel(t, "torsion, torque", integral(torque, 0, 2), 500, 1e-6)
		flow := bench.SteadyFlow{Stress: tensor.Sym{tensor.XY: bar.StressAt(0.3)}, Law: law}
		check.Rel(t, "torsion, twist", 2*flow.Rate()[tensor.XY]/0.3, bar.TwistRate(), 1e-12)

		two := valid(t, bench.TwoBars{Length1: 3, Length2: 7, Area1: 2, Area2: 5, Load: 600, Law: law})
		one, other := two.SteadyStresses()
		check.Rel(t, "two bars, load", 2*one+5*other, 600, 1e-14)
		check.Rel(t, "two bars, compatibility", 7*law.RateAt(other), two.ElongationRate(), 1e-12)
		truss := valid(t, bench.ThreeBarTruss{Angle: 0.6, Length: 3, Area: 2, Load: 600, Law: law})
		one, other = truss.SteadyStresses()
		check.Rel(t, "truss, load", 2*(one+2*other*math.Cos(0.6)), 600, 1e-13)
		check.Rel(t, "truss, compatibility", law.RateAt(other)*3/math.Cos(0.6)/math.Cos(0.6), truss.DeflectionRate(), 1e-12)
	}
	tip := bench.Cantilever{Width: 3, HalfDepth: 2, Length: 40, Load: 7, Law: norton(1e-12, 3)}
	curvature := func(x float64) float64 {
		beam := tip.Root()
		beam.Moment = 7 * x
		return x * beam.CurvatureRate()
	}
	check.Rel(t, "cantilever", integral(curvature, 0, 40), tip.TipVelocity(), 1e-12)
}
