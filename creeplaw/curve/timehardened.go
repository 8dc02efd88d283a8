package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// TimeHardened takes the rate of a curve at the time a clock shows, whatever stress acted before: ṗ = ∂ε/∂t (σ, T, t). It is
// a creeplaw.Clocked and not a law: creeplaw.During makes one of it for a given interval of time, and an integration
// accepts it only where that is asked for.
//
// It exists to reproduce legacy analyses and published benchmarks. The clock starts with the analysis; after a late rise of
// stress it gives too little creep, and an unloaded wait changes what comes after it. StrainHardened has neither fault.
//
// The mean rate over an interval is exact, [ε(t₁) - ε(t₀)]/(t₁ - t₀), formed without cancellation for short intervals. At
// zero stress it is zero if the curve does not creep there. Negative or NaN stress, and times negative or out of order, give
// NaN.
//
// Source: the time-hardening hypothesis, I. Finnie, W. R. Heller, Creep of Engineering Materials, McGraw-Hill 1959 (from
// memory).
type TimeHardened struct {
	curve Curve
	logs  Logarithmic
}

var _ creeplaw.Clocked = TimeHardened{}

// NewTimeHardened makes a clocked rate of a curve. A nil curve is a *creeplaw.MissingError.
func NewTimeHardened(c Curve) (TimeHardened, error) {
	if c == nil {
		return TimeHardened{}, &creeplaw.MissingError{Law: "time-hardened curve", Part: "curve"}
	}
	return TimeHardened{c, Log(c)}, nil
}

// Curve returns the curve.
func (h TimeHardened) Curve() Curve { return h.curve }

// short is the part of its end time below which an interval is integrated, not differenced: six bits are the most that
// differencing then loses.
const short = 1.0 / 64

// MeanLogRate returns ln [ε(t₁) - ε(t₀)]/(t₁ - t₀) and its exponents by stress and temperature.
func (h TimeHardened) MeanLogRate(p creeplaw.Point, start, end float64) creeplaw.LogRate {
	switch {
	case !(p.Stress >= 0 && start >= 0 && end >= start) || math.IsInf(end, 1) || h.curve == nil:
		return undefinedRate()
	case end == 0:
		return h.atZeroTime(p)
	case end-start < short*end:
		return h.byQuadrature(p, start, end)
	}
	last := h.logs.LogAt(LogPoint{p.Stress, p.Temperature, math.Log(end)}).Strain
	rate := creeplaw.LogRate{Value: last.Value - math.Log(end-start), ByLogStress: last.ByLogStress,
		ByLogTemperature: last.ByLogTemperature}
	if start == 0 || math.IsInf(last.Value, -1) {
		return rate
	}
	first := h.logs.LogAt(LogPoint{p.Stress, p.Temperature, math.Log(start)}).Strain
	before := math.Exp(first.Value - last.Value)
	rest := -math.Expm1(first.Value - last.Value)
	if !(rest > 0) { // saturated
		return creeplaw.LogRate{Value: math.Log(rest)}
	}
	rate.Value += math.Log(rest)
	rate.ByLogStress = (last.ByLogStress - before*first.ByLogStress) / rest
	rate.ByLogTemperature = (last.ByLogTemperature - before*first.ByLogTemperature) / rest
	return rate
}

// byQuadrature is the mean of the rate by Gauss's rule of three points.
func (h TimeHardened) byQuadrature(p creeplaw.Point, start, end float64) creeplaw.LogRate {
	mean := nothing()
	half := (end - start) / 2
	for i, node := range [...]float64{-0.7745966692414834, 0, 0.7745966692414834} {
		t := start + half*(1+node)
		e := h.logs.LogAt(LogPoint{p.Stress, p.Temperature, math.Log(t)}).Rate
		e.Value += math.Log([...]float64{5.0 / 18, 8.0 / 18, 5.0 / 18}[i])
		mean.add(e)
	}
	l := mean.total()
	return creeplaw.LogRate{Value: l.Value, ByLogStress: l.ByLogStress, ByLogTemperature: l.ByLogTemperature}
}

func (h TimeHardened) atZeroTime(p creeplaw.Point) creeplaw.LogRate {
	at := Point{p.Stress, p.Temperature, 0}
	e := h.curve.At(at)
	x := exponentsOf(at, e.ByTime, 0, e.ByTimeStress, e.ByTimeTemperature)
	return creeplaw.LogRate{Value: x.Value, ByLogStress: x.ByLogStress, ByLogTemperature: x.ByLogTemperature}
}
