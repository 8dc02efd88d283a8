package bench_test

import (
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
)

// The tests of this file hold each solution against the differential equation it solves, over random parameters: the rate
// is taken from the solution by differences, the right-hand side is written out here.

const (
	seed   = 20261201
	trials = 300
	// difference bounds the relative error of byLogTime: truncation h⁴/30 times a fifth derivative, which is of the order of
	// the function's own for solutions that vary over decades of time, and rounding 1e-14/h.
	difference = 1e-8
)

// byLogTime is df/d ln t by central differences of fourth order.
func byLogTime(f func(t float64) float64, t float64) float64 { return byLogTimeStep(f, t, 0x1p-8) }

func byLogTimeStep(f func(t float64) float64, t, h float64) float64 {
	at := func(k float64) float64 { return f(t * math.Exp(k*h)) }
	return (8*(at(1)-at(-1)) - (at(2) - at(-2))) / (12 * h)
}

// draw is a source of parameters: numbers spread evenly in the logarithm.
type draw struct{ *rand.Rand }

func newDraw() draw { return draw{rand.New(rand.NewPCG(seed, 0))} }

func (d draw) log(low, high float64) float64 {
	return low * math.Exp(d.Float64()*math.Log(high/low))
}

func (d draw) between(low, high float64) float64 { return low + d.Float64()*(high-low) }

// law is a Norton law whose rate at the stress is 1/unit.
func (d draw) law(stress, unit float64) bench.Norton {
	ratio := d.log(0.1, 10)
	n := d.log(0.5, 50)
	return bench.Norton{Rate: math.Pow(ratio, n) / unit, Stress: stress * ratio, Exponent: n}
}

// holds reports a failed equation with what is needed to repeat it.
func holds(t *testing.T, p any, time, got, want, scale float64) {
	t.Helper()
	if !(math.Abs(got-want) <= difference*math.Abs(scale)) {
		t.Errorf("seed %d: %T%+v at time %v: rate by differences %v, by the equation %v", seed, p, p, time, got, want)
	}
}

func TestBarEquations(t *testing.T) {
	d := newDraw()
	for range trials {
		young, stress, poisson := d.log(1e3, 1e12), d.log(1e-3, 1e9), d.between(-0.5, 0.49)
		natural := d.log(1e-6, 1e6)                // time in which the elastic strain would creep
		law := d.law(stress, natural*young/stress) // rate at the stress: elastic strain/natural
		time := natural * d.log(1e-6, 0.9)         // for n < 1 the stress is gone after natural/(1-n)
		if law.Exponent >= 1 {
			time = natural * d.log(1e-6, 100)
		}
		bar := valid(t, bench.BarRelaxation{Young: young, Stress: stress, Law: law})
		holds(t, bar, time, byLogTime(bar.CreepAt, time), time*law.RateAt(bar.StressAt(time)), bar.CreepAt(time))
		check.Rel(t, "elastic and creep strain", bar.StressAt(time)/young+bar.CreepAt(time), stress/young, 1e-13)

		z := valid(t, bench.FollowUpRelaxation{Young: young, Stress: stress, FollowUp: d.log(1, 100), Law: law})
		holds(t, z, time, byLogTime(z.CreepAt, time), time*law.RateAt(z.StressAt(time)), z.CreepAt(time))
		check.Rel(t, "strain of the bar", z.StrainAt(time), z.StressAt(time)/young+z.CreepAt(time), 1e-13)
		// What the surroundings give is elastic: (Z-1)/E per stress.
		check.Rel(t, "follow-up", z.StrainAt(time)+(z.FollowUp-1)*z.StressAt(time)/young, z.FollowUp*stress/young, 1e-12)

		sheet := valid(t, bench.EqualBiaxialRelaxation{Young: young, Poisson: poisson, Stress: stress, Law: law})
		kept := sheet.StressAt(time)
		flow := bench.SteadyFlow{Stress: tensor.Sym{kept, kept}, Law: law}
		holds(t, sheet, time, byLogTime(sheet.StressAt, time), -time*flow.Rate()[tensor.XX]*young/(1-poisson), stress)
		elastic := func(t float64) float64 { return -2 * poisson * sheet.StressAt(t) / young }
		holds(t, sheet, time, byLogTime(sheet.ThicknessStrainAt, time), byLogTime(elastic, time)+time*flow.Rate()[tensor.ZZ],
			stress/young)

		opposite := valid(t, bench.OppositeBiaxialRelaxation{Young: young, Poisson: poisson, Stress: stress / 3, Law: law})
		kept = opposite.StressAt(time)
		flow.Stress = tensor.Sym{kept, -kept}
		holds(t, opposite, time, byLogTime(opposite.StressAt, time), -time*flow.Rate()[tensor.XX]*young/(1+poisson), stress)
	}
}

func TestSolidEquations(t *testing.T) {
	d := newDraw()
	for range trials {
		var stress tensor.Sym
		for i := range stress {
			stress[i] = d.between(-100, 100)
		}
		young, natural := d.log(1e3, 1e6), d.log(1e-6, 1e6)
		law := d.law(stress.Mises(), natural*young/stress.Mises())
		law.Exponent = math.Max(law.Exponent, 1)
		p := valid(t, bench.SolidRelaxation{Young: young, Poisson: d.between(-0.5, 0.49), Stress: stress, Law: law})
		time := natural * d.log(1e-6, 100)
		flow := bench.SteadyFlow{Stress: p.StressAt(time), Law: law}.Rate()
		for i := range flow {
			creep := func(t float64) float64 { return p.CreepAt(t)[i] }
			holds(t, p, time, byLogTime(creep, time), time*flow[i], p.EquivalentCreepAt(time))
		}
		holds(t, p, time, byLogTime(p.EquivalentCreepAt, time), time*law.RateAt(p.MisesAt(time)), p.EquivalentCreepAt(time))
		check.Scaled(t, "Mises of the tensor", p.StressAt(time).Mises(), p.MisesAt(time), stress.Mises(), 1e-14)
		// The strain does not move: Hooke's law on what is left.
		left := stressOf(p.Young, p.Poisson, p.Strain().Sub(p.CreepAt(time)))
		check.Slice(t, "Hooke's law", slice(p.StressAt(time)), slice(left), stress.Norm(), 1e-12)
	}
}

func TestSinhEquation(t *testing.T) {
	d := newDraw()
	for range trials {
		p := bench.SinhRelaxation{Young: d.log(1e3, 1e6), Stress: d.log(1, 1e3), Prefactor: d.log(1e-12, 1e-3)}
		p.Coefficient = d.log(1e-3, 100) / p.Stress
		valid(t, p)
		time := p.TimeTo(p.Stress * d.between(0.01, 0.95))
		x := p.Coefficient * p.StressAt(time)
		holds(t, p, time, byLogTime(p.StressAt, time), -time*p.Young*p.Prefactor*math.Sinh(x), p.Stress)
	}
}

func TestHardeningEquations(t *testing.T) {
	d := newDraw()
	for range trials {
		stress, young := d.log(1, 1e3), d.log(1e3, 1e6)
		n, m := d.log(1, 50), d.between(0.05, 1)
		natural := d.log(1e-6, 1e6) // time in which the elastic strain would creep under the stress at the start
		curve := bench.BaileyNorton{Strain: stress / young, Stress: stress, Time: natural, StressExponent: n, TimeExponent: m}
		p := valid(t, bench.StrainHardeningRelaxation{Young: young, Stress: stress, Curve: curve})
		time := p.TimeTo(stress * d.log(math.Exp(-100*m/n), 0.999)) // the rate falls by up to e¹⁰⁰
		creep, left := p.CreepAt(time), p.StressAt(time)/stress
		// ṗ = m A^(1/m) σ^(n/m) p^((m-1)/m) with A σ₀ⁿ natural^m = σ₀/E.
		rate := m / natural * stress / young * math.Pow(left, n/m) * math.Pow(creep*young/stress, (m-1)/m)
		holds(t, p, time, byLogTime(p.CreepAt, time), time*rate, creep)
		check.Rel(t, "elastic and creep strain", p.StressAt(time)/young+creep, stress/young, 1e-12)

		clock := bench.TimeHardeningRelaxation(p)
		rate = m * curve.StrainAt(clock.StressAt(time), time) // times t
		holds(t, clock, time, byLogTime(clock.CreepAt, time), rate, clock.CreepAt(time))
		if m < 1 && !(clock.StressAt(time) < p.StressAt(time)) {
			t.Errorf("seed %d: %+v: time hardening does not relax faster at %v", seed, p, time)
		}
	}
}

func TestConstantRateEquation(t *testing.T) {
	d := newDraw()
	for range trials {
		p := bench.ConstantRateTension{Young: d.log(1e3, 1e6), StrainRate: d.log(1e-12, 1)}
		p.Law = d.law(d.log(1, 1e3), 1/p.StrainRate)
		valid(t, p)
		time := p.TimeTo(p.Saturation() * d.between(0.01, 0.999))
		rate := p.Young * (p.StrainRate - p.Law.RateAt(p.StressAt(time)))
		h := 0x1p-9 / (1 + p.Law.Exponent) // near saturation the stress settles n times faster than it rose
		holds(t, p, time, byLogTimeStep(p.StressAt, time, h), time*rate, time*p.Young*p.StrainRate)
	}
}

func TestConstantStressEquations(t *testing.T) {
	d := newDraw()
	for range trials {
		stress, natural, strain := d.log(1, 1e3), d.log(1e-6, 1e6), d.log(1e-6, 1)
		n, m := d.log(1, 50), d.between(0.05, 0.95)
		time := natural * d.log(1e-4, 1e4)
		curve := bench.BaileyNorton{Strain: strain, Stress: stress, Time: natural, StressExponent: n, TimeExponent: m}
		second := bench.Norton{Rate: strain / natural, Stress: stress, Exponent: d.log(1, 50)}

		alone := valid(t, bench.BaileyNortonCreep{Stress: stress, Curve: curve})
		holds(t, alone, time, byLogTime(alone.CreepAt, time), m*alone.CreepAt(time), alone.CreepAt(time))
		check.Rel(t, "time to the strain", alone.TimeTo(alone.CreepAt(time)), time, 1e-12/m)

		both := valid(t, bench.ParallelCreep{Stress: stress, Primary: curve, Secondary: second})
		p := both.CreepAt(time)
		rate := m*math.Pow(p/strain, (m-1)/m) + 1 // times strain/natural
		holds(t, both, time, byLogTime(both.CreepAt, time), rate*strain*time/natural, p)

		direct := valid(t, bench.StrainHardeningCreep{Stress: stress, Law: bench.StrainHardening{Rate: strain / natural,
			Stress: stress, Strain: strain, StressExponent: n, StrainExponent: -d.between(0, 20)}})
		p = direct.CreepAt(time)
		rate = math.Pow(p/strain, direct.Law.StrainExponent)
		holds(t, direct, time, byLogTime(direct.CreepAt, time), rate*strain*time/natural, p)
	}
}
