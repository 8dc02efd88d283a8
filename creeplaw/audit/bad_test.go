package audit_test

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/curve"
)

// All numbers of these laws are invented: about 1e-6 per hour at 100 MPa and 873 K, n = 5, Q = 300 kJ/mol.
const (
	invented   = 1e-6
	activation = 300e3 / creeplaw.GasConstant // [K]
	reference  = 873.0
)

var (
	domain = audit.Domain{
		Stress:      audit.Range{Low: 20, High: 300},
		Strain:      audit.Range{Low: 1e-6, High: 0.1},
		Temperature: audit.Range{Low: 773, High: 923},
	}
	megapascalHour = creeplaw.Units{Stress: creeplaw.Megapascal, Time: creeplaw.Hour}
)

// sound is a law with nothing wrong: Norton with Arrhenius, written out as a user would.
func sound(p creeplaw.Point) creeplaw.Rate {
	v := invented * math.Pow(p.Stress/100, 5) * math.Exp(-activation*(1/p.Temperature-1/reference))
	byStress := invented * 5 / 100 * math.Pow(p.Stress/100, 4) * math.Exp(-activation*(1/p.Temperature-1/reference))
	return creeplaw.Rate{Value: v, ByStress: byStress, ByTemperature: v * activation / (p.Temperature * p.Temperature)}
}

// times multiplies a rate by a factor with the derivatives given.
func times(r creeplaw.Rate, f, byStress, byStrain, byTemperature float64) creeplaw.Rate {
	return creeplaw.Rate{Value: r.Value * f, ByStress: r.ByStress*f + r.Value*byStress,
		ByStrain: r.ByStrain*f + r.Value*byStrain, ByTemperature: r.ByTemperature*f + r.Value*byTemperature}
}

// rateOf makes a law of a change to the sound one.
func rateOf(f func(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate) creeplaw.Law {
	return creeplaw.RateFunc(func(p creeplaw.Point) creeplaw.Rate { return f(p, sound(p)) })
}

func negativeAtLargeStrain(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	return times(r, 1-p.Strain/0.02, 0, -1/0.02, 0)
}

func undefinedWhenHotAndHigh(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress > 210 && p.Temperature > 880 {
		return times(r, math.NaN(), 0, 0, 0)
	}
	return r
}

// overflowing leaves the range of a float64 above 709 of its argument, at 236 MPa.
func overflowing(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	e := math.Exp(3 * p.Stress)
	return times(r, math.Expm1(3*p.Stress), 3*e, 0, 0)
}

// hump falls to a tenth around 150 MPa, within some per cent.
func hump(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress == 0 {
		return r
	}
	e := math.Exp(-math.Log(p.Stress/150) / 0.03)
	s := 1 / (1 + e)
	return times(r, 1-0.9*s, -0.9*s*(1-s)/0.03/p.Stress, 0, 0)
}

func doubledDerivative(_ creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	r.ByStress *= 2
	return r
}

// forgottenStrain hardens and says it does not.
func forgottenStrain(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	return times(r, 1/(1+p.Strain/0.01), 0, 0, 0)
}

func forgottenSquare(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	r.ByTemperature *= p.Temperature // Q/(RT) for Q/(RT²)
	return r
}

// slightlyOff is a derivative by a crude difference: one part in 10⁴.
func slightlyOff(_ creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	r.ByStress *= 1.0001
	return r
}

// omega is Prager's exponential of strain, Ω = 50.
func omega(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := math.Exp(50 * p.Strain)
	return times(r, f, 0, 50*f, 0)
}

// lateSoftening begins at 2 % strain, smoothly.
func lateSoftening(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	z := math.Max(0, p.Strain-0.02) / 0.01
	return times(r, 1+z*z*z, 0, 3*z*z/0.01, 0)
}

// regime jumps by a factor where an argument passes a value.
func regime(by audit.Argument, value, factor float64) func(creeplaw.Point, creeplaw.Rate) creeplaw.Rate {
	return func(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
		v := map[audit.Argument]float64{audit.Stress: p.Stress, audit.Strain: p.Strain, audit.Temperature: p.Temperature}[by]
		if v > value {
			return times(r, factor, 0, 0, 0)
		}
		return r
	}
}

// twoSlopes turns from n = 5 to n = 8 at 90 MPa.
func twoSlopes(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress > 90 {
		f := math.Pow(p.Stress/90, 3)
		return times(r, f, 3*f/p.Stress, 0, 0)
	}
	return r
}

// jumpOnACorner turns from Q to 2Q at 851 K and misses the other branch by two parts in a thousand, as published branches may.
func jumpOnACorner(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Temperature > 851 {
		f := 1.002 * math.Exp(-activation*(1/p.Temperature-1/851.0))
		return times(r, f, 0, 0, f*activation/(p.Temperature*p.Temperature))
	}
	return r
}

// jumpOnACurve jumps by one part in 10⁴ at 137 MPa on a law of growing exponent.
func jumpOnACurve(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := math.Exp(p.Stress / 40)
	if p.Stress > 137 {
		f *= 1.0001
	}
	return times(r, f, f/40, 0, 0)
}

// startsFromNowhere switches creep on at 45 MPa.
func startsFromNowhere(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress < 45 {
		return creeplaw.Rate{}
	}
	return r
}

// signSlip has exp(+Q/RT).
func signSlip(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := math.Exp(2 * activation * (1/p.Temperature - 1/reference))
	return times(r, f, 0, 0, -2*activation*f/(p.Temperature*p.Temperature))
}

// kiloSlip has an activation energy of 300 J/mol.
func kiloSlip(p creeplaw.Point, _ creeplaw.Rate) creeplaw.Rate {
	const q = activation / 1000
	f := math.Exp(-q * (1/p.Temperature - 1/reference))
	return times(isothermal(p, creeplaw.Rate{}), f, 0, 0, q*f/(p.Temperature*p.Temperature))
}

func isothermal(p creeplaw.Point, _ creeplaw.Rate) creeplaw.Rate {
	v := invented * math.Pow(p.Stress/100, 5)
	return creeplaw.Rate{Value: v, ByStress: invented * 5 / 100 * math.Pow(p.Stress/100, 4)}
}

func endsAtOneGigapascal(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress > 1000 {
		return times(r, math.NaN(), 0, 0, 0)
	}
	return r
}

func explosive(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := math.Exp(p.Stress / 100)
	return times(r, f, f/100, 0, 0)
}

// levelling tends to a constant rate at high stress.
func levelling(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := math.Pow(1+p.Stress/100, -5)
	return times(r, f, -5*f/(1+p.Stress/100)/100, 0, 0)
}

// hardened multiplies by (p/0.01)ᵏ, with the derivative as it is at zero strain.
func hardened(p creeplaw.Point, r creeplaw.Rate, f, k float64) creeplaw.Rate {
	if r.Value == 0 {
		return creeplaw.Rate{ByStress: r.ByStress}
	}
	if p.Strain == 0 {
		return creeplaw.Rate{Value: r.Value * f, ByStress: r.ByStress * f, ByStrain: math.Inf(int(math.Copysign(1, k))),
			ByTemperature: r.ByTemperature * f}
	}
	return times(r, f, 0, k*f/p.Strain, 0)
}

// inert needs some strain to creep at all.
func inert(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	return hardened(p, r, math.Sqrt(p.Strain/0.01), 0.5)
}

// zeroTimesInfinity hardens from an infinite rate and forgets its limit.
func zeroTimesInfinity(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	return hardened(p, r, p.Strain/0.01*math.Pow(p.Strain/0.01, -1.5), -0.5)
}

// guarded replaces the infinite rate of virgin material by any number.
func guarded(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Strain == 0 {
		return r
	}
	return hardened(p, r, math.Pow(p.Strain/0.01, -0.5), -0.5)
}

// slopeOfVirgin gives k ṗ/p = 0/0 as the derivative by strain of virgin material, in a law that hardens mildly.
func slopeOfVirgin(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	f := 1 / (1 + p.Strain/0.01)
	return times(r, f, 0, (f*f-f)/p.Strain, 0)
}

// ratioOfZeros gives 0/0 under no stress.
func ratioOfZeros(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	return times(r, p.Stress/p.Stress, 0, 0, 0)
}

// slopeOfZeros gives n ṗ/σ = 0/0 as the slope under no stress.
func slopeOfZeros(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	r.ByStress = 5 * r.Value / p.Stress
	return r
}

// patched is an exponential of stress with zero put in at zero stress only.
func patched(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if p.Stress == 0 {
		return creeplaw.Rate{}
	}
	temperature := r.Value / (invented * math.Pow(p.Stress/100, 5))
	v := invented * math.Exp(p.Stress/40) * temperature
	return creeplaw.Rate{Value: v, ByStress: v / 40, ByTemperature: v * activation / (p.Temperature * p.Temperature)}
}

func swallowing(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	if !(p.Stress > 0) {
		return creeplaw.Rate{}
	}
	return r
}

// shortTable reads a table of three temperatures and runs off its end.
func shortTable(p creeplaw.Point, r creeplaw.Rate) creeplaw.Rate {
	rows := []float64{1, 1, 1}
	return times(r, rows[int((p.Temperature-773)/40)], 0, 0, 0)
}

// counting keeps its last result.
type counting struct{ calls *int }

func (c counting) Rate(p creeplaw.Point) creeplaw.Rate {
	*c.calls++
	return times(sound(p), 1+1e-12*float64(*c.calls), 0, 0, 0)
}

// timed reads a clock that the host program moves: time hardening behind the back of the interface.
type timed struct{ clock *float64 }

func (l timed) Rate(p creeplaw.Point) creeplaw.Rate {
	return times(sound(p), math.Pow(*l.clock/1000+1e-3, -0.6), 0, 0, 0)
}

// logged is the sound law with a LogRate of its own that may be wrong.
type logged struct {
	creeplaw.RateFunc
	log func(creeplaw.LogRate) creeplaw.LogRate
}

func (l logged) LogRate(p creeplaw.Point) creeplaw.LogRate {
	return l.log(creeplaw.LogRate{
		Value:            math.Log(invented) + 5*math.Log(p.Stress/100) - activation*(1/p.Temperature-1/reference),
		ByLogStress:      5,
		ByLogTemperature: activation / p.Temperature,
	})
}

func decimal(l creeplaw.LogRate) creeplaw.LogRate {
	l.Value /= math.Ln10
	l.ByLogStress /= math.Ln10
	l.ByLogTemperature /= math.Ln10
	return l
}

func exponentOfSlope(l creeplaw.LogRate) creeplaw.LogRate {
	l.ByLogStress--
	return l
}

// misread is wrong at the very node of a table, 851 K, and nowhere else; it names its node.
type misread struct{ creeplaw.RateFunc }

func (misread) TemperatureBreakpoints() []float64 { return []float64{851} }

func newMisread() misread {
	return misread{func(p creeplaw.Point) creeplaw.Rate {
		if p.Temperature == 851 {
			return times(sound(p), 2, 0, 0, 0)
		}
		return sound(p)
	}}
}

// saturatingExponential is a saturating transient and steady creep with exponential functions of stress.
func saturatingExponential() creeplaw.Law {
	factor, _ := creeplaw.NewArrheniusAt(300e3, reference)
	c, err := curve.NewGarofaloTransient(
		curve.Transient{Strain: curve.Exponential{Prefactor: 1e-4, StressCoefficient: 0.02},
			Rate: curve.Exponential{Prefactor: 1e-4, StressCoefficient: 0.02}},
		curve.Exponential{Prefactor: 1e-8, StressCoefficient: 0.03})
	if err != nil {
		panic(err)
	}
	law, err := curve.NewStrainHardened(c)
	if err != nil {
		panic(err)
	}
	thermal, err := creeplaw.WithTemperature(law, factor)
	if err != nil {
		panic(err)
	}
	return thermal
}

func rawExponential() creeplaw.Law {
	factor, _ := creeplaw.NewArrheniusAt(300e3, reference)
	law, err := creeplaw.NewExponential(1e-9, 40)
	if err != nil {
		panic(err)
	}
	thermal, err := creeplaw.WithTemperature(law, factor)
	if err != nil {
		panic(err)
	}
	return thermal
}

// timeHardening is the clocked form of ε = A σⁿ tᵐ, Arrhenius left out.
func timeHardening() creeplaw.Clocked {
	c, err := curve.NewBaileyNorton(1e-14, 5, 0.4)
	if err != nil {
		panic(err)
	}
	clocked, err := curve.NewTimeHardened(c)
	if err != nil {
		panic(err)
	}
	return clocked
}
