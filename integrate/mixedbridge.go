package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// bridged is the scalar problem of mixed control for a law with internal variables, whose rate cannot be asked for by stress
// and creep strain alone. For any ω the mixed control has a strain ε(ω); Step, given that strain, creeps by some odds of its
// own, 3GΔp/σₑ. Where they are ω the two agree in everything:
//
//	Φ(z) = ln ω - ln(3GΔp/σₑ of Step),   z = ln ω
//
// Φ is negative while Step creeps more than the mixed control left room for. The search comes from there, so that it meets the
// solution that is connected to Δt → 0 first; where Φ turns down before it is zero, no such solution exists.
type bridged struct {
	step  Result
	mises float64 // σₑ of step
	odds  float64 // 3GΔp/σₑ of step
	trial float64 // q of the strain
	spent float64 // 3GΔp of step
	phi   float64
	slope float64 // dΦ/dz
}

// solve finds the solution, leaving the end state in p and x.
func (b *bridged) solve(m *Material, p *mixedPoint, x *flowed, old *State, inc *MixedIncrement) Code {
	const most = 200
	if code := b.evaluate(m, p, x, old, inc, 0); code != 0 {
		return code
	}
	if b.odds == 0 {
		return 0
	}
	z := math.Log(b.odds) // what creeps away at the strain of the elastic step: not above the solution
	low, high, stride := math.Inf(-1), math.Inf(1), 1.0
	for x.iterations = 1; x.iterations < most; x.iterations++ {
		code := b.evaluate(m, p, x, old, inc, math.Exp(z))
		if code != 0 || b.odds == 0 {
			if code == 0 {
				code = NoConvergence
			}
			if !Recoverable(code) || math.IsInf(low, -1) || z-low < 1e-6*math.Max(1, math.Abs(z)) {
				return code
			}
			high, stride = math.Min(high, z), (z-low)/4
			z = low + stride
			continue
		}
		size := math.Abs(b.phi)
		step := -b.phi / b.slope
		switch {
		case b.phi <= 0 && !(b.slope > 0):
			return BeyondRupture
		case b.slope > 0 && (size <= 16*epsilon*(1+math.Abs(z)) || math.Abs(step) <= 1e-13*(1+math.Abs(z))):
			x.residual = size
			return 0
		case b.phi < 0:
			low = z
		default:
			high = z
		}
		next := z + math.Max(-stride, math.Min(stride, step))
		if !(b.slope > 0) || !(next > low && next < high) {
			next = (math.Max(low, z-stride) + math.Min(high, z+stride)) / 2
		}
		if next == z || next == low || next == high {
			x.residual = size
			if b.slope > 0 && size <= 1e-11 {
				return 0
			}
			return NoConvergence
		}
		z = next
	}
	return NoConvergence
}

// evaluate carries Step to the strain of the mixed control at ω.
func (b *bridged) evaluate(m *Material, p *mixedPoint, x *flowed, old *State, inc *MixedIncrement, odds float64) Code {
	x.odds = odds
	p.end(x)
	full := Increment{Dt: inc.Dt, Strain: p.strain(inc, old, odds), Temperature: inc.Temperature}
	if code := m.step(&b.step, old, &full); code != 0 {
		return code
	}
	x.stress = math.Sqrt(1.5 * p.deviator.Dot(p.deviator))
	b.trial = x.stress * (1 + odds)
	x.creep = odds * x.stress / (3 * p.shear)
	b.spent = 3 * p.shear * b.step.CreepStep
	b.mises = b.trial - b.spent
	if b.spent > b.trial/2 {
		b.mises = b.step.Stress.Mises()
	}
	if x.stress == 0 || b.step.CreepStep == 0 {
		b.odds = 0
		return 0
	}
	b.odds = b.spent / b.mises
	b.phi = math.Log(odds / b.odds)
	// dε/dz: the stress moves along, and the multiplier grows.
	b.slope = 1
	if b.spent > 1e-9*b.trial { // below, ln Δp of Step is lost in the rounding of its tangent, and no slope is needed
		change := mixedChange{deviator: p.alongDeviator, mean: p.alongMean}
		b.slope -= b.logStepOdds(p, &change, odds, odds)
	}
	return 0
}

// logStepOdds is the change of ln(3GΔp/σₑ) of Step for a change of the mixed end state, ω growing by dOdds.
func (b *bridged) logStepOdds(p *mixedPoint, d *mixedChange, odds, dOdds float64) float64 {
	hard, grow := (1+odds)/(2*p.shear), dOdds/(2*p.shear)
	var strain tensor.Sym
	for i := range strain {
		strain[i] = hard*d.deviator[i] + grow*p.deviator[i] - d.softer[i]
		if i <= tensor.ZZ {
			strain[i] += d.mean / (3 * p.bulk)
		}
	}
	mises := p.deviator.Norm() * math.Sqrt(1.5)
	n := p.deviator.Scale(1.5 / mises) // flow direction, that of Step too
	stress := b.step.Tangent.Contract(strain).Add(b.step.ByTemperature.Scale(d.byKelvin))
	stepMises := n.Dot(stress)
	trial := b.trial*d.logShear + 2*p.shear*n.Dot(strain) // dq = q d ln G + 2G n:dε
	return (trial-stepMises)/b.spent - stepMises/b.mises
}

// logOdds is δz for a change of the data.
func (b *bridged) logOdds(p *mixedPoint, d *mixedChange) float64 {
	return b.logStepOdds(p, d, p.odds, 0) / b.slope
}
