package curve

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// The quick search for sums of powers of time works on ln Σ exp(Lᵢ + mᵢ s), s = ln t, which is convex and nearly straight: its
// slope goes from the least time exponent to the largest. Like the other quick search it gives up where that does not do.

// quickPower is a power of time at one stress and temperature, scaled by the creep strain p that is looked for.
type quickPower struct {
	exponent, logAmplitude  float64 // m, ln(c/p)
	byStress, byTemperature float64
	v                       float64 // ε/p at a time
}

// findPowers returns false if it has given up.
func findPowers(terms []Term, p creeplaw.Point, r *found) bool {
	var kept [few]quickPower
	a := kept[:len(terms)]
	logStrain := math.Log(p.Strain)
	at := conditionAt(p.Stress, p.Temperature)
	s := math.Inf(1) // the first of the times at which one term alone gives all the strain
	for i := range a {
		f, c := &a[i], terms[i].c.at(&at)
		f.exponent, f.logAmplitude = terms[i].exponent, c.Value-logStrain
		f.byStress, f.byTemperature = c.ByLogStress, c.ByLogTemperature
		s = min(s, -f.logAmplitude/f.exponent)
	}
	if !(math.Abs(s) < math.MaxFloat64) {
		return false
	}
	for i := range a {
		a[i].v = math.Exp(a[i].logAmplitude + a[i].exponent*s)
	}
	for evaluations := 1; evaluations <= quickEvaluations; evaluations++ {
		var v, m, mm, mmm float64 // Σ v mʲ
		for i := range a {
			f := &a[i]
			x := f.v * f.exponent
			v += f.v
			m += x
			x *= f.exponent
			mm += x
			mmm += x * f.exponent
		}
		// Householder's step of third order on ln v, whose derivatives are the cumulants of the exponents.
		one := 1 / v
		mean := m * one
		square := mm * one
		second := square - mean*mean
		third := mmm*one - mean*(3*square-2*mean*mean)
		d := -logOnePlus(v-1) / mean
		b := second / mean * d
		step := d * (1 + 0.5*b) / (1 + b + third/mean*d*d*(1.0/6))
		r.evaluations = evaluations
		if math.Abs(step)*square <= 1e-6*mean {
			r.rate = resultOfPowers(a, logStrain-s, step)
			r.logTime = s + step
			return true
		}
		if !(math.Abs(step) < 4) {
			return false
		}
		s += step
		for i := range a {
			a[i].v *= exponential(a[i].exponent * step)
		}
	}
	return false
}

// resultOfPowers forms the rate from the terms at one time, for a time later by the small step in its logarithm that is left.
func resultOfPowers(a []quickPower, logStrainByTime, step float64) creeplaw.LogRate {
	var m, mm, mmm float64
	var s, t struct{ strain, rate, rise float64 } // derivatives of ε, t ε̇ and its own by ln t, by stress and by temperature
	for i := range a {
		f := &a[i]
		x := f.v * f.exponent
		xx := x * f.exponent
		m += x
		mm += xx
		mmm += xx * f.exponent
		s.strain += f.v * f.byStress
		s.rate += x * f.byStress
		s.rise += xx * f.byStress
		t.strain += f.v * f.byTemperature
		t.rate += x * f.byTemperature
		t.rise += xx * f.byTemperature
	}
	m += step * (mm + 0.5*step*mmm)
	mm += step * mmm
	one := 1 / m
	bend := mm*one - 1
	return creeplaw.LogRate{
		Value:            logStrainByTime - step + math.Log(m),
		ByLogStress:      (s.rate + step*s.rise - bend*(s.strain+step*s.rate)) * one,
		ByLogStrain:      bend * one,
		ByLogTemperature: (t.rate + step*t.rise - bend*(t.strain+step*t.rate)) * one,
	}
}

// logOnePlus is ln(1+u), by its series for small u.
func logOnePlus(u float64) float64 {
	if math.Abs(u) > 0.01 {
		return math.Log1p(u)
	}
	return u * (1 - u*(0.5-u*(1.0/3-u*(0.25-u*(0.2-u*(1.0/6-u*(1.0/7)))))))
}
