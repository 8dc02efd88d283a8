package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// TwoRegime is primary creep by a power of time until a time t_fp that depends on the stress, and steady creep from then on,
// as codes for nuclear components have it,
//
//	ε = c tᵐ                          t ≤ t_fp
//	ε = c t_fpᵐ + ṡ (t - t_fp)        t > t_fp
//
// Symbols: t time [time]; c primary coefficient [time⁻ᵐ]; m time exponent [-], 0 < m ≤ 1; t_fp end of the primary stage
// [time]; ṡ steady rate [1/time]; c, t_fp and ṡ functions of von Mises stress σ [stress] and absolute temperature T [K].
//
// The strain is continuous. The rate jumps at t_fp, and the law made from the curve at the strain reached there, unless the
// three functions match: NewMatchedTwoRegime makes t_fp the time at which the primary rate has fallen to the steady one. A
// jump of the rate is a place where an implicit step may have no solution and where no tangent exists.
//
// Zero at zero time, with a rate of +Inf for m < 1; at large time the rate is ṡ. At zero stress it is zero if c and ṡ are.
//
// Source: the form of the primary and secondary creep laws of RCC-MR, Design and Construction Rules for Mechanical Components
// of Nuclear Installations, AFCEN, for austenitic steels (from memory).
type TwoRegime struct {
	primary, steady, end prepared // end is nil where the rates match
	exponent             float64
	first                sum // the primary stage alone
	given                *regimesGiven
}

// regimesGiven are the coefficients as they were given; no end where the rates match.
type regimesGiven struct{ primary, end, steady Coefficient }

var (
	_ Logarithmic = TwoRegime{}
	_ direct      = TwoRegime{}
)

// NewTwoRegime builds the curve from c [time⁻ᵐ], m, t_fp [time] and ṡ [1/time]. InversePower is the usual t_fp. A missing
// coefficient is a *creeplaw.MissingError, a parameter out of bounds a *creeplaw.ParameterError.
func NewTwoRegime(primary Coefficient, timeExponent float64, endOfPrimary, steadyRate Coefficient) (TwoRegime, error) {
	end, err := prepare(twoRegime, "end of primary creep", endOfPrimary)
	if err != nil {
		return TwoRegime{}, err
	}
	return newTwoRegime(timeExponent, end, &regimesGiven{primary, endOfPrimary, steadyRate})
}

// NewMatchedTwoRegime builds the curve without a jump of the rate, t_fp = (m c/ṡ)^(1/(1-m)), from c [time⁻ᵐ], 0 < m < 1 and
// ṡ [1/time]. Errors are those of NewTwoRegime.
func NewMatchedTwoRegime(primary Coefficient, timeExponent float64, steadyRate Coefficient) (TwoRegime, error) {
	if timeExponent == 1 {
		return TwoRegime{}, &creeplaw.ParameterError{Law: twoRegime, Parameter: "time exponent", Value: 1,
			Want: "below 1 for rates to match"}
	}
	return newTwoRegime(timeExponent, nil, &regimesGiven{primary, nil, steadyRate})
}

const twoRegime = "two-regime curve"

func newTwoRegime(timeExponent float64, end prepared, given *regimesGiven) (TwoRegime, error) {
	c := TwoRegime{end: end, exponent: timeExponent, given: given}
	err := atMostOne(twoRegime, timeExponent)
	if err == nil {
		c.first, err = newSum(twoRegime, part{PowerOfTime(given.primary, timeExponent), "primary coefficient", ""})
	}
	if err == nil {
		c.steady, err = prepare(twoRegime, "steady rate", given.steady)
	}
	if err != nil {
		return TwoRegime{}, err
	}
	c.primary, err = prepare(twoRegime, "primary coefficient", given.primary)
	return c, err
}

// EndOfPrimary returns the time t_fp and the creep strain at which primary creep ends.
func (c TwoRegime) EndOfPrimary(stress, temperature float64) (time, strain float64) {
	r := c.regimes(stress, temperature)
	return math.Exp(r.end.Value), math.Exp(r.strainAtEnd)
}

// regimes are the coefficients at one stress and temperature.
type regimes struct {
	primary, steady, end LogValue
	strainAtEnd          float64 // ln(c t_fpᵐ)
}

func (c TwoRegime) regimes(stress, temperature float64) (r regimes) {
	if c.primary == nil || !(stress >= 0) {
		return regimes{undefinedValue(), undefinedValue(), undefinedValue(), math.NaN()}
	}
	at := conditionAt(stress, temperature)
	r.primary, r.steady = c.primary.at(at), c.steady.at(at)
	if c.end != nil {
		r.end = c.end.at(at)
	} else {
		f := 1 / (1 - c.exponent)
		r.end.Value = f * (math.Log(c.exponent) + r.primary.Value - r.steady.Value)
		r.end.ByLogStress = f * (r.primary.ByLogStress - r.steady.ByLogStress)
		r.end.ByLogTemperature = f * (r.primary.ByLogTemperature - r.steady.ByLogTemperature)
	}
	if math.IsInf(r.primary.Value, -1) {
		if c.end == nil {
			r.end.Value = math.Inf(-1)
		}
		r.strainAtEnd = math.Inf(-1)
		return r
	}
	r.strainAtEnd = r.primary.Value + c.exponent*r.end.Value
	return r
}

// LogAt returns the logarithms of strain and rate. At t_fp itself the rate is the primary one.
func (c TwoRegime) LogAt(q LogPoint) LogStrain {
	r := c.regimes(q.Stress, q.Temperature)
	switch {
	case math.IsNaN(r.primary.Value + r.steady.Value + q.LogTime):
		return undefinedLog()
	case q.LogTime <= r.end.Value:
		m, p := c.exponent, r.primary
		return LogStrain{
			Strain: Exponents{p.Value + m*q.LogTime, m, p.ByLogStress, p.ByLogTemperature},
			Rate:   Exponents{p.Value + math.Log(m) + (m-1)*q.LogTime, m - 1, p.ByLogStress, p.ByLogTemperature},
		}
	}
	return r.secondary(c.exponent, q.LogTime)
}

// secondary is the curve after t_fp.
func (r *regimes) secondary(m, logTime float64) LogStrain {
	steady := Exponents{r.steady.Value, 0, r.steady.ByLogStress, r.steady.ByLogTemperature}
	since := logTime + math.Log(-math.Expm1(r.end.Value-logTime)) // ln(t - t_fp)
	strain := Exponents{Value: logAdd(r.strainAtEnd, r.steady.Value+since)}
	if math.IsInf(strain.Value, -1) {
		return LogStrain{strain, steady}
	}
	// Shares of the strain: that of the primary stage, ṡ (t - t_fp), ṡ t and ṡ t_fp.
	share := func(part float64) float64 { return math.Exp(part - strain.Value) }
	primary, after := share(r.strainAtEnd), share(r.steady.Value+since)
	shift := share(r.steady.Value + r.end.Value)
	strain.ByLogTime = share(r.steady.Value + logTime)
	strain.ByLogStress = primary*r.primary.ByLogStress + after*r.steady.ByLogStress + (m*primary-shift)*r.end.ByLogStress
	strain.ByLogTemperature = primary*r.primary.ByLogTemperature + after*r.steady.ByLogTemperature +
		(m*primary-shift)*r.end.ByLogTemperature
	return LogStrain{strain, steady}
}

// find has closed forms: before and after t_fp the rate is that of a law. The regime is told by the strain, since a rate that
// jumps up may leave a time after t_fp that is no other number than t_fp.
func (c TwoRegime) find(p creeplaw.Point) found {
	r := c.regimes(p.Stress, p.Temperature)
	logStrain, m := math.Log(p.Strain), c.exponent
	switch {
	case math.IsNaN(r.primary.Value + r.steady.Value):
		return foundNothing()
	case logStrain <= r.strainAtEnd:
		logTime := (logStrain - r.primary.Value) / m
		return found{logTime: logTime, rate: creeplaw.LogRate{
			Value:            logStrain + math.Log(m) - logTime,
			ByLogStress:      r.primary.ByLogStress / m,
			ByLogStrain:      (m - 1) / m,
			ByLogTemperature: r.primary.ByLogTemperature / m,
		}}
	case math.IsInf(r.steady.Value, -1):
		return never()
	}
	after := logStrain + math.Log(-math.Expm1(r.strainAtEnd-logStrain)) // ln(p - c t_fpᵐ)
	return found{logTime: logAdd(r.end.Value, after-r.steady.Value), rate: creeplaw.LogRate{
		Value:            r.steady.Value,
		ByLogStress:      r.steady.ByLogStress,
		ByLogTemperature: r.steady.ByLogTemperature,
	}}
}

// At returns strain, rate and their derivatives. At zero stress and at zero time they are the limits from above.
func (c TwoRegime) At(p Point) Strain {
	switch {
	case !(p.Stress >= 0 && p.Time >= 0) || c.primary == nil:
		return undefined()
	case p.Time == 0:
		return c.first.atStart(p)
	}
	q := LogPoint{p.Stress, p.Temperature, math.Log(p.Time)}
	l := c.LogAt(q)
	if p.Stress == 0 {
		q.Stress = faint
		return unloaded(p, l, c.LogAt(q))
	}
	return plain(p, l)
}

// logAdd is ln(eᵃ + eᵇ).
func logAdd(a, b float64) float64 {
	high, low := max(a, b), min(a, b)
	if math.IsInf(high, 0) {
		return high
	}
	return high + math.Log1p(math.Exp(low-high))
}
