package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// bridged is the scalar problem of mixed control for a law with internal variables or a material with plasticity, whose flow
// cannot be asked for by stress and creep strain alone. For any ω the mixed control has a strain ε(ω); Step, given that strain,
// flows by some odds of its own, 3GΔp/σₑ with creep and plastic strain in Δp. Where they are ω the two agree in everything:
//
//	Φ(z) = ln ω - ln(3GΔp/σₑ of Step),   z = ln ω
//
// Φ is negative while Step flows more than the mixed control left room for. The search comes from there, so that it meets the
// first solution first. Where Φ turns down before it is zero that may be rupture, or only the strain that Step is asked at;
// then the solution is followed from a short time (see follow). Step itself may refuse a strain that all at once, from the
// start of the step, would rupture the material: such a step is beyond rupture here too, and a shorter one is not.
type bridged struct {
	step  Result
	mises float64 // σₑ of step
	odds  float64 // 3GΔp/σₑ of step
	trial float64 // q of the strain
	spent float64 // 3GΔp of step, plastic strain with it
	phi   float64
	slope float64 // dΦ/dz
}

// bridge is a bridged problem with its data, all of them values, which keeps them off the heap.
type bridge struct {
	bridged
	point mixedPoint
	x     flowed
	old   State
	inc   MixedIncrement
	asked int // how often Step was
}

const (
	bridgeMost = 200 // of Step in one search
	// farthestStrain is an inelastic strain that says there is no end: the stress prescribed is more than the material carries.
	farthestStrain = 1e6
	bridgeNoise    = 1e-9 // what Step may leave in ln Δp where damage is far advanced
)

// solve finds the solution that is connected to Δt → 0, leaving the end state in the point and x.
func (b *bridge) solve(m *Material) Code {
	code := b.search(m)
	if (code == BeyondRupture || code == NoConvergence) && m.plastic == nil {
		code = b.follow(m, code)
	}
	b.x.iterations = b.asked
	return code
}

// search looks for the first root of Φ.
func (b *bridge) search(m *Material) Code {
	if code := b.evaluate(m, 0); code != 0 {
		return code
	}
	if b.odds == 0 {
		return 0
	}
	z := math.Log(b.odds) // what flows away at the strain of the elastic step: not above the solution
	low, high, stride := math.Inf(-1), math.Inf(1), 1.0
	if m.plastic != nil { // nothing to step over
		stride = 5
	}
	for range bridgeMost {
		if code := b.evaluate(m, math.Exp(z)); code != 0 || b.odds == 0 {
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
		switch {
		case b.phi <= 0 && !(b.slope > 0), b.phi < 0 && b.x.creep > farthestStrain:
			return BeyondRupture
		case b.done(z):
			return 0
		case b.phi < 0:
			low = z
		default:
			high = z
		}
		next := z + math.Max(-stride, math.Min(stride, -b.phi/b.slope))
		if !(b.slope > 0) || !(next > low && next < high) {
			next = (math.Max(low, z-stride) + math.Min(high, z+stride)) / 2
		}
		if next == z || next == low || next == high || high-low <= 1e-13*(1+math.Abs(z)) {
			if b.slope > 0 && math.Abs(b.phi) <= bridgeNoise {
				return 0
			}
			return NoConvergence
		}
		z = next
	}
	return NoConvergence
}

// done notes the residual and reports whether z is the root as well as numbers can say.
func (b *bridge) done(z float64) bool {
	size := math.Abs(b.phi)
	b.x.residual = size
	return b.slope > 0 && (size <= 16*epsilon*(1+math.Abs(z)) || size <= 1e-13*(1+math.Abs(z))*b.slope)
}

// follow finds the solution of a short time and follows it to the end of the step, each time from the one before. Where that
// cannot go on, by however little, the solution ends: it returns BeyondRupture.
func (b *bridge) follow(m *Material, code Code) Code {
	const (
		cuts     = 20   // by 4 each
		shortest = 1e-7 // relative change of the time
		most     = 400  // times
	)
	dt := b.inc.Dt
	for k := 1; ; k++ {
		if k > cuts {
			b.inc.Dt = dt
			return code
		}
		b.inc.Dt = dt * math.Ldexp(1, -2*k)
		if b.search(m) == 0 {
			break
		}
	}
	if b.odds == 0 { // no creep yet: nothing to follow
		b.inc.Dt = dt
		return code
	}
	z, now, end := math.Log(b.odds), math.Log(b.inc.Dt), math.Log(dt)
	stride, rise := math.Ln2, 1.0 // of ln Δt, and dz/d ln Δt
	for range most {
		next := math.Min(now+stride, end)
		b.inc.Dt = math.Exp(next)
		if next == end {
			b.inc.Dt = dt
		}
		at, ok := b.correct(m, z+rise*(next-now), 1)
		switch {
		case ok && next == end:
			return 0
		case ok:
			rise = (at - z) / (next - now)
			z, now, stride = at, next, stride*1.5
		case stride < shortest:
			b.inc.Dt = dt
			return BeyondRupture
		default:
			stride, rise = stride/4, rise/2
		}
	}
	b.inc.Dt = dt
	return NoConvergence
}

// correct runs Newton's iteration from z, and gives up where it leads away by more than reach or does not settle.
func (b *bridge) correct(m *Material, z, reach float64) (float64, bool) {
	from, last := z, math.Inf(1)
	for range 20 {
		if b.evaluate(m, math.Exp(z)) != 0 || b.odds == 0 || !(b.slope > 0) {
			return z, false
		}
		if b.done(z) {
			return z, true
		}
		step := -b.phi / b.slope
		if math.Abs(b.phi) <= bridgeNoise && math.Abs(step) >= last/2 { // as far as Step goes
			return z, true
		}
		last = math.Abs(step)
		z += step
		if !(math.Abs(z-from) <= reach) {
			return z, false
		}
	}
	return z, false
}

// evaluate carries Step to the strain of the mixed control at ω.
func (b *bridge) evaluate(m *Material, odds float64) Code {
	p, x, inc := &b.point, &b.x, &b.inc
	b.asked++
	x.odds = odds
	p.end(x)
	full := Increment{Dt: inc.Dt, Strain: p.strain(inc, odds), Temperature: inc.Temperature}
	if code := m.step(&b.step, &b.old, &full); code != 0 {
		return code
	}
	x.stress = math.Sqrt(1.5 * p.deviator.Dot(p.deviator))
	b.trial = x.stress * (1 + odds)
	x.creep = odds * x.stress / (3 * p.shear)
	b.spent = 3 * p.shear * (b.step.CreepStep + b.step.PlasticStep)
	b.mises = b.trial - b.spent
	if b.spent > b.trial/2 {
		b.mises = b.step.Stress.Mises()
	}
	if x.stress == 0 || b.spent == 0 {
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
