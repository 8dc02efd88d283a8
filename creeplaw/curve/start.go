package curve

import "math"

// start is how a sum leaves zero: ε → C tᵐ.
type start struct {
	exponent  float64   // m; +Inf where no term grows
	prefactor Exponents // of C
}

func (s sum) start(stress, temperature float64) start {
	at := conditionAt(stress, temperature)
	first := start{math.Inf(1), Exponents{Value: math.Inf(-1)}}
	leading := nothing()
	for i := range s.terms {
		t := &s.terms[i]
		c := t.coefficients(at)
		m := 1.0
		if t.shape == powerOfTime {
			m = t.exponent
		}
		a := Exponents{c.amplitude.Value + c.rate.Value, 0, c.amplitude.ByLogStress + c.rate.ByLogStress,
			c.amplitude.ByLogTemperature + c.rate.ByLogTemperature}
		switch {
		case math.IsInf(a.Value, -1) || m > first.exponent:
			continue
		case m < first.exponent:
			first.exponent, leading = m, nothing()
		}
		leading.add(a)
	}
	first.prefactor = leading.total()
	return first
}

// atStart returns the limits of the curve at zero time.
func (s sum) atStart(p Point) Strain {
	first := s.start(p.Stress, p.Temperature)
	c := first.prefactor
	switch {
	case math.IsNaN(c.Value) || len(s.terms) == 0:
		return undefined()
	case first.exponent < 1:
		return Strain{
			ByTime:            math.Inf(1),
			ByTimeTwice:       math.Inf(-1),
			ByTimeStress:      signedInfinity(c.ByLogStress),
			ByTimeTemperature: signedInfinity(c.ByLogTemperature),
		}
	case first.exponent > 1: // also where no term grows, at zero stress
		return Strain{ByTimeTwice: s.startCurvature(p), ByTimeStress: s.startSlope(p)}
	}
	return Strain{
		ByTime:            math.Exp(c.Value),
		ByTimeTwice:       s.startCurvature(p),
		ByTimeStress:      s.startSlope(p),
		ByTimeTemperature: derivative(c.Value, c.ByLogTemperature, p.Temperature),
	}
}

// startSlope is the derivative of a finite rate at zero time by stress.
func (s sum) startSlope(p Point) float64 {
	if p.Stress > 0 {
		c := s.start(p.Stress, p.Temperature)
		if c.exponent > 1 {
			return 0
		}
		return derivative(c.prefactor.Value, c.prefactor.ByLogStress, p.Stress)
	}
	switch c := s.start(faint, p.Temperature); {
	case c.exponent < 1:
		return signedInfinity(c.prefactor.ByLogStress)
	case c.exponent > 1:
		return 0
	default:
		return slopeFrom(c.prefactor)
	}
}

// startCurvature is ∂²ε/∂t² at zero time where the rate is finite.
func (s sum) startCurvature(p Point) float64 {
	at, total := conditionAt(p.Stress, p.Temperature), 0.0
	for i := range s.terms {
		t := &s.terms[i]
		c := t.coefficients(at)
		m := t.exponent
		switch {
		case math.IsInf(c.amplitude.Value, -1):
		case t.shape != powerOfTime: // c r x with the bend of the rate: d ln ε̇/dx at x = 0
			total += t.bend(0x1p-60) * 0x1p60 * math.Exp(c.amplitude.Value+2*c.rate.Value)
		case m > 1 && m < 2:
			return math.Inf(1)
		case m == 2:
			total += 2 * math.Exp(c.amplitude.Value)
		}
	}
	return total
}

func signedInfinity(x float64) float64 {
	if x == 0 {
		return 0
	}
	return math.Inf(int(math.Copysign(1, x)))
}
