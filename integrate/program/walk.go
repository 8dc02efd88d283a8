package program

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/internal/dirk"
	"example.com/holdtime/tensor"
)

// rates are the time derivatives of a state, and the power dissipated.
type rates struct {
	creep      tensor.Sym
	equivalent float64
	internal   [creeplaw.MaxVariables]float64
	power      float64 // σ:ε̇c
}

// point is the material at a time of the segment.
type point struct {
	time       float64 // from the start of the segment
	state      integrate.State
	stress     tensor.Sym
	strain     tensor.Sym
	warmth     float64 // absolute temperature
	dissipated float64
}

// add adds h·f to the state of a point.
func (p *point) add(h float64, f *rates) {
	for i := range p.state.Creep {
		p.state.Creep[i] += h * f.creep[i]
	}
	p.state.Equivalent += h * f.equivalent
	for i := range p.state.Internal {
		p.state.Internal[i] += h * f.internal[i]
	}
	p.dissipated += h * f.power
}

// walker walks one segment.
type walker struct {
	material  *integrate.Material
	law       creeplaw.Logarithmic
	evolving  creeplaw.Evolving // nil for a law without variables of its own
	variables []creeplaw.Variable
	tolerance integrate.Tolerance
	plastic   bool // see plastic.go

	segment *Segment
	before  point // what the segment began with: where signals that hold what was reached take their values
	reached tensor.Sym

	now     point
	rates   [dirk.Stages]rates // the first is that of now, when fresh
	fresh   bool
	next    float64 // length of the step to try next
	last    float64 // estimated error of the last accepted step over what was allowed, 1 before the first
	largest float64 // von Mises stress met in the run
	elastic float64 // elastic strain of that stress
	count   Count
	out     integrate.MixedResult
}

func newWalker(m *integrate.Material, tolerance integrate.Tolerance) walker {
	w := walker{material: m, law: creeplaw.Log(m.Law()), variables: m.Variables(), tolerance: tolerance}
	w.evolving, _ = m.Law().(creeplaw.Evolving)
	w.plastic = m.Plasticity().Hardening != nil
	return w
}

// enter begins a segment where the last one ended.
func (w *walker) enter(s *Segment) {
	w.segment = s
	w.now.time = 0
	w.before = w.now
	w.reached = s.Control.Values(w.now.stress, w.now.strain)
	w.fresh = false
}

// increment is what is prescribed at a time of the segment. At a jump, after chooses what comes.
func (w *walker) increment(time, dt float64, after bool) integrate.MixedIncrement {
	s := w.segment
	inc := integrate.MixedIncrement{Control: s.Control, Dt: dt,
		Temperature: s.Temperature.at(time, s.Duration, w.before.warmth, after)}
	for i := range inc.Prescribed {
		inc.Prescribed[i] = s.Prescribed[i].at(time, s.Duration, w.reached[i], after)
	}
	return inc
}

// jump answers the signals of this moment elastically. It reports whether anything moved.
func (w *walker) jump() (moved bool, err error) {
	inc := w.increment(w.now.time, 0, true)
	if err := w.material.StepMixed(&w.out, &w.now.state, inc); err != nil {
		return false, w.explain(err, inc)
	}
	scale := math.Max(w.out.Stress.Norm(), w.now.stress.Norm())
	moved = w.out.Stress.Sub(w.now.stress).Norm() > 1e-12*scale || inc.Temperature != w.now.warmth
	w.now.dissipated += w.out.Stress.Dot(inelastic(&w.now.state, &w.out.State)) // by yielding; nothing creeps in no time
	w.now.state, w.now.stress, w.now.strain, w.now.warmth = w.out.State, w.out.Stress, w.out.Strain, inc.Temperature
	w.fresh = w.fresh && !moved
	w.meet(&w.now)
	return moved, nil
}

// inelastic is what creep and plastic strain gained from one state to another.
func inelastic(from, to *integrate.State) tensor.Sym {
	return to.Creep.Sub(from.Creep).Add(to.Plastic.Sub(from.Plastic))
}

func (w *walker) meet(p *point) {
	if m := p.stress.Mises(); m > w.largest {
		w.largest = m
		w.elastic = p.strain.Sub(p.state.Creep).Sub(p.state.Plastic).Deviator().EquivalentStrain()
	}
}

func (w *walker) explain(err error, inc integrate.MixedIncrement) error {
	return w.material.ExplainControlled(err, &w.now.state, inc)
}

// breakpoint is the next time at which a signal of the segment bends or jumps, at most its end.
func (w *walker) breakpoint() float64 {
	next := math.Min(w.segment.Duration, w.segment.Temperature.next(w.now.time))
	for i := range w.segment.Prescribed {
		next = math.Min(next, w.segment.Prescribed[i].next(w.now.time))
	}
	return next
}

// refresh finds the rates of now from the law: after a jump they are not those of the last stage. They are infinite where
// hardening starts from zero strain.
func (w *walker) refresh() {
	if w.fresh {
		return
	}
	w.fresh = true
	p := &w.now
	f := &w.rates[0]
	*f = rates{}
	s := p.stress.Deviator()
	mises := p.stress.Mises()
	if mises == 0 {
		return
	}
	at := creeplaw.Point{Stress: mises, Strain: p.state.Equivalent, Temperature: p.warmth}
	if w.evolving == nil {
		f.equivalent = math.Exp(w.law.LogRate(at).Value)
	} else {
		e := creeplaw.EvolvingPoint{Point: at, MeanStress: p.stress.Mean(), PrincipalStress: math.NaN()}
		if w.evolving.SeesPrincipal() {
			e.PrincipalStress = p.stress.PrincipalValues()[0]
		}
		for i, v := range w.variables {
			e.Internal[i] = v.Initial + p.state.Internal[i]
		}
		rate := w.evolving.Evolve(e)
		f.equivalent = math.Exp(rate.LogRate)
		for i := range w.variables {
			f.internal[i] = rate.Internal[i].Value * math.Exp(rate.Internal[i].LogScale)
		}
	}
	f.creep = s.Scale(1.5 * f.equivalent / mises)
	f.power = f.equivalent * mises
}

// length chooses the first step: the given one, or the time to creep a part of the elastic strain that a fourth-order step
// could resolve.
func (w *walker) length(first float64) {
	w.last = 1
	if w.next = first; first > 0 {
		return
	}
	relaxation := w.rates[0].equivalent / math.Max(w.elastic, w.now.state.Equivalent)
	w.next = 0.3 * math.Sqrt(math.Sqrt(w.tolerance.Relative)) / relaxation
	if !(w.next < w.segment.Duration) {
		w.next = w.segment.Duration / 8
	}
	if !(w.next > 0) { // an infinite rate, where the plain step starts by itself
		w.next = 1e-6 * w.segment.Duration
	}
}

// singular takes the first step where the rate is infinite: by backward Euler, so short that its creep strain does not matter.
func (w *walker) singular(limit float64) error {
	const slight = 1e-2 // part of the tolerated creep strain
	elastic := w.now.strain.Sub(w.now.state.Creep).Deviator().EquivalentStrain()
	creep := slight * w.tolerance.Relative * math.Max(elastic, w.tolerance.Creep)
	rate := math.Exp(w.law.LogRate(creeplaw.Point{Stress: w.now.stress.Mises(), Strain: w.now.state.Equivalent + creep,
		Temperature: w.now.warmth}).Value)
	dt := math.Min(creep/rate, limit-w.now.time)
	if !(dt > 0) {
		return integrate.LawUndefined
	}
	end, f, err := w.stage(&w.now, w.now.time+dt, dt, false)
	if err != nil {
		return err
	}
	w.now, w.rates[0], w.fresh, w.next = end, f, true, dt
	w.now.dissipated += dt * f.power
	w.count.Steps++
	w.meet(&w.now)
	return nil
}

// stage is one backward-Euler step dt from a start to what is prescribed at a time.
func (w *walker) stage(start *point, time, dt float64, after bool) (end point, f rates, err error) {
	inc := w.increment(time, dt, after)
	w.count.Solves++
	if err := w.material.StepMixed(&w.out, &start.state, inc); err != nil {
		return end, f, err
	}
	w.count.Iterations += w.out.Iterations
	end = point{time: time, state: w.out.State, stress: w.out.Stress, strain: w.out.Strain, warmth: inc.Temperature,
		dissipated: start.dissipated}
	if dt > 0 {
		for i := range f.creep {
			f.creep[i] = (end.state.Creep[i] - start.state.Creep[i]) / dt
		}
		f.equivalent = w.out.CreepStep / dt
		for i := range w.variables {
			f.internal[i] = (end.state.Internal[i] - start.state.Internal[i]) / dt
		}
		f.power = end.stress.Dot(f.creep)
	}
	return end, f, nil
}

// attempt takes a step of length h from now and returns its end, with its estimated error over what the tolerance allows.
func (w *walker) attempt(h float64) (end point, worst float64, err error) {
	if w.plastic {
		return w.attemptPlastic(h)
	}
	if end, err = w.try(h); err != nil {
		return end, 0, err
	}
	worst, err = w.judge(h, &end)
	return end, worst, err
}

// factor is how much longer the next step may be.
func (w *walker) factor(worst float64) float64 {
	if w.plastic {
		return math.Max(0.15, math.Min(6, 0.85/math.Sqrt(worst))) // the error judged is that of first-order steps
	}
	return dirk.Factor(worst, w.last)
}

// try runs the stages of a step of length h from now and returns its end.
func (w *walker) try(h float64) (end point, err error) {
	dt := dirk.Diagonal * h
	for i := 1; i < dirk.Stages; i++ {
		start := w.now
		for j, weight := range dirk.Weights[i][:i] {
			if weight != 0 {
				start.add(h*weight, &w.rates[j])
			}
		}
		if start.state.Equivalent < 0 { // by rounding, or by the weights at a singular start, where the error shows it
			start.state.Equivalent = 0
		}
		if end, w.rates[i], err = w.stage(&start, w.now.time+dirk.Abscissae[i]*h, dt, false); err != nil {
			return end, err
		}
		end.dissipated += dt * w.rates[i].power
	}
	return end, nil
}

// judge returns the estimated error of the step just tried over what the tolerance allows.
func (w *walker) judge(h float64, end *point) (float64, error) {
	other := *end // the embedded result
	for i := range dirk.Stages {
		other.add(h*(dirk.Embedded[i]-dirk.Weights[dirk.Stages-1][i]), &w.rates[i])
	}
	other.state.Equivalent = math.Max(other.state.Equivalent, 0)
	elastic, _, err := w.stage(&other, end.time, 0, false)
	if err != nil {
		return 0, err
	}
	largest, strain := w.largest, w.elastic
	mises := end.stress.Mises()
	if mises > largest {
		largest, strain = mises, end.strain.Sub(end.state.Creep).Deviator().EquivalentStrain()
	}
	stressFloor, creepFloor := w.tolerance.Stress, w.tolerance.Creep
	if stressFloor == 0 {
		stressFloor = 1e-3 * largest
	}
	if creepFloor == 0 {
		creepFloor = strain
	}
	// Errors of many steps add up: a step may use up the part of the tolerance that its creep strain is of the whole, and a
	// little for its time and for being one. What adds up is of the fifth order in the step where the estimate is of the fourth, hence the power.
	const idle, least, sharing = 0.1, 0.003, 4.0 / 5
	time := least + idle*h/w.segment.Duration
	made := end.state.Equivalent - w.now.state.Equivalent
	apart := elastic.stress.Sub(end.stress)
	size := math.Max(stressFloor, math.Max(mises, w.now.stress.Mises()))
	whole := math.Max(creepFloor, end.state.Equivalent)
	stress := math.Max(apart.Mises(), math.Abs(apart.Mean())) / (size * math.Pow(math.Min(1, made/strain+time), sharing))
	creep := end.state.Creep.Sub(other.state.Creep).EquivalentStrain()
	creep = math.Max(creep, math.Abs(end.state.Equivalent-other.state.Equivalent)) /
		(whole * math.Pow(math.Max(made, 0)/whole+time, sharing))
	worst := math.Max(stress, creep)
	for i, v := range w.variables {
		unit := math.Abs(v.Limit - v.Initial)
		if !finite(unit) {
			unit = math.Max(math.Abs(v.Initial), 1)
		}
		const floor = 0.1
		scale := math.Max(math.Abs(end.state.Internal[i]), floor*unit)
		part := math.Abs(end.state.Internal[i]-w.now.state.Internal[i])/scale + time
		worst = math.Max(worst, math.Abs(end.state.Internal[i]-other.state.Internal[i])/
			(scale*math.Pow(math.Min(1, part), sharing)))
	}
	return worst / w.tolerance.Relative, nil
}
