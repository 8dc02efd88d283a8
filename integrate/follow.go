package integrate

import (
	"math"

	"example.com/holdtime/integrate/internal/dirk"
	"example.com/holdtime/tensor"
)

// Tolerance is the local error allowed to one step of Follow. Both the stress and the creep strain keep it.
type Tolerance struct {
	// Relative is the error of one step over the von Mises stress, and over the equivalent creep strain. Above 0, at most 0.1.
	Relative float64

	// Stress is an absolute floor [stress], >= 0: below it the von Mises stress is not resolved relatively. Without one (0) a
	// thousandth of the largest von Mises stress met in the increment serves.
	Stress float64

	// Creep is an absolute floor [-], >= 0, for the creep strain, which is virgin at 0. Without one (0) the elastic strain of
	// the largest von Mises stress met serves: creep strain then counts as soon as it matters to the stress.
	Creep float64
}

// Course says how an increment was followed.
type Course struct {
	Steps, Rejected int     // accepted and rejected steps of the higher-order method
	Solves          int     // scalar problems solved, five per step
	Iterations      int     // corrections in all of them
	Dt              float64 // the length the next step would have had: where to start the next increment, see Follow
	Error           float64 // the largest estimated error of an accepted step, over what the tolerance allows
}

// Follow carries the material along the linear path of strain and temperature from start to inc with as many steps as the
// tolerance asks for, and writes the state at its end, the stress, and the exact derivatives of that stress by the end strain
// and end temperature, for the steps that were taken: what Step does with one backward-Euler step, of fourth order and with a
// known error. A host's global Newton stays quadratic on the tangent, up to the choice of steps, which changes with the
// strain: near convergence it no longer does.
//
// With plasticity, whose strain has no rate of its own, steps are extrapolated from 1, 2, 3, … plain steps instead, of an order
// that follows from the tolerance; the error of the plastic strain is kept as that of the creep strain is, and the stress is on
// the yield surface to within the tolerance.
//
// first is the length of the first step to try [time]; 0 lets Follow choose. Course.Dt of the increment before is a good one.
// Hardening from zero strain starts by itself, with steps graded from the time at which creep first matters.
//
// It allocates nothing. The error is BadIncrement for a tolerance or start that is not a number to work with, else a Code of
// Step; a rupture within the increment is BeyondRupture. Then out and the course are untouched and zero, and old is as it was;
// old may be &out.State.
func (m *Material) Follow(out *Result, old *State, start Conditions, inc Increment, tolerance Tolerance, first float64) (
	Course, error) {
	if !tolerance.valid() || !(first >= 0) || !finite(first) || !start.valid() || !inc.valid() {
		return Course{}, BadIncrement
	}
	if !old.valid() {
		return Course{}, BadState
	}
	if inc.Dt == 0 {
		if code := m.step(out, old, &inc); code != 0 {
			return Course{}, code
		}
		return Course{Dt: first}, nil
	}
	if m.plastic != nil {
		return m.followPlastic(out, old, start, &inc, tolerance, first, true)
	}
	f := m.walk(old, start, &inc, tolerance, first)
	f.differentiates = true
	if code := f.run(); code != 0 {
		return Course{}, code
	}
	out.Stress = f.stress()
	out.CreepStep = f.state.Equivalent - old.Equivalent
	out.State = f.state
	out.Iterations, out.Residual = f.course.Iterations, 0
	f.derivatives.state.tangent(out, &f.last)
	return f.course, nil
}

// FollowStress is Follow without the derivatives, at less than half the cost: it writes the stress and the state at the end,
// the same as Follow's to the bit. end may be old.
func (m *Material) FollowStress(stress *tensor.Sym, end, old *State, start Conditions, inc Increment, tolerance Tolerance,
	first float64) (Course, error) {
	if !tolerance.valid() || !(first >= 0) || !finite(first) || !start.valid() || !inc.valid() {
		return Course{}, BadIncrement
	}
	if !old.valid() {
		return Course{}, BadState
	}
	if inc.Dt == 0 {
		return Course{Dt: first}, m.Stress(stress, end, old, inc)
	}
	if m.plastic != nil {
		return m.followStressPlastic(stress, end, old, start, &inc, tolerance, first)
	}
	f := m.walk(old, start, &inc, tolerance, first)
	if code := f.run(); code != 0 {
		return Course{}, code
	}
	*stress, *end = f.stress(), f.state
	return f.course, nil
}

func (m *Material) walk(old *State, start Conditions, inc *Increment, tolerance Tolerance, first float64) follower {
	end := Conditions{inc.Strain, inc.Temperature}
	return follower{material: m, tolerance: tolerance, path: path{start, end, inc.Dt, start == end}, state: *old, next: first, worst: 1}
}

func (t Tolerance) valid() bool {
	return t.Relative > 0 && t.Relative <= 0.1 && t.Stress >= 0 && t.Creep >= 0 && finite(t.Stress+t.Creep)
}

func (c *Conditions) valid() bool {
	return c.Temperature > 0 && finite(c.Temperature) && c.Strain.IsFinite()
}

// path is strain and temperature linear in time.
type path struct {
	from, to Conditions
	length   float64
	held     bool // from and to are the same
}

// at returns the conditions at a time and the part of the way done.
func (p *path) at(time float64) (c Conditions, part float64) {
	part = time / p.length
	if p.held || part >= 1 {
		return p.to, math.Min(part, 1)
	}
	for i := range c.Strain {
		c.Strain[i] = p.from.Strain[i] + part*(p.to.Strain[i]-p.from.Strain[i])
	}
	c.Temperature = p.from.Temperature + part*(p.to.Temperature-p.from.Temperature)
	return c, part
}

// follower is a walk along a path.
type follower struct {
	material    *Material
	tolerance   Tolerance
	path        path
	state       State
	time        float64       // from the start of the path
	next        float64       // length of the step to try next
	worst       float64       // estimated error of the last accepted step over what was allowed, 1 before the first
	largest     float64       // von Mises stress met
	mises       float64       // at the present time
	rates       [stages]rates // the first is that at the present time; the others of the step being tried
	tried, last stage         // of the step being tried, and of the last accepted one
	end         State         // of the step being tried
	course      Course

	differentiates bool
	derivatives    walkSlopes
}

// walkSlopes are the derivatives of a walk by the end of its path.
type walkSlopes struct {
	state slopes
	stage [stages]slopes // of the rates
}

// run walks to the end of the path.
func (f *follower) run() Code {
	if code := f.begin(); code != 0 {
		return code
	}
	for f.time < f.path.length {
		if code := f.advance(); code != 0 {
			return code
		}
	}
	f.course.Dt = f.next
	return 0
}

func (f *follower) stress() tensor.Sym {
	s := f.last.deviator.Scale(2 * f.last.shear * (1 - f.last.fraction))
	addMean(&s, f.last.bulk*f.last.volumetric)
	return s
}

// A step is given up when it is shorter than this part of the time behind it, or was cut this often in a row.
const (
	least    = 1e-13
	mostCuts = 40
)

// begin finds the rates at the start, and a first step if none was given. Where the first rate is infinite it takes a
// backward-Euler step so short that its creep strain does not matter, from which the others grow.
func (f *follower) begin() Code {
	var code Code
	f.mises, code = f.material.ratesAt(&f.rates[0], &f.state, &f.path.from)
	if code != 0 {
		return code
	}
	f.largest = math.Max(f.mises, f.tolerance.Stress)
	if !finite(f.rates[0].equivalent) {
		return f.beginSingular()
	}
	if f.next == 0 {
		f.next = f.firstLength()
	}
	return 0
}

// firstLength is the time to creep away a part of the stress that a fourth-order step could resolve.
func (f *follower) firstLength() float64 {
	moduli := f.material.moduliAt(f.path.from.Temperature)
	relaxation := 3 * moduli.shear * f.rates[0].equivalent / f.mises // 1/time
	if !(relaxation > 0) {
		return f.path.length / 8
	}
	return math.Min(f.path.length, 0.3*math.Sqrt(math.Sqrt(f.tolerance.Relative))/relaxation)
}

func (f *follower) beginSingular() Code {
	conditions := f.path.from
	moduli := f.material.moduliAt(conditions.Temperature)
	const slight = 1e-2 // part of the tolerated creep strain that the first step may make
	creep := slight * f.tolerance.Relative * math.Max(f.mises/(3*moduli.shear), f.tolerance.Creep)
	probe := f.state
	probe.Equivalent += creep
	var r rates
	if _, code := f.material.ratesAt(&r, &probe, &conditions); code != 0 {
		return code
	}
	dt := math.Min(creep/r.equivalent, f.path.length)
	if !(dt > 0) {
		return LawUndefined
	}
	to, part := f.path.at(dt)
	inc := Increment{Dt: dt, Strain: to.Strain, Temperature: to.Temperature}
	if code := f.last.solve(f.material, &f.state, &inc, f.differentiates); code != 0 {
		return code
	}
	f.last.rates(&f.rates[0], &f.state, dt, f.material.memory.count)
	if d := &f.derivatives; f.differentiates {
		d.stage[0].through(&f.last, &slopes{}, part, dt, f.material.memory.count)
		d.state.add(dt, &d.stage[0])
	}
	f.state.add(dt, &f.rates[0], f.material.memory.count)
	f.time, f.mises = dt, f.last.mises()
	f.course.Solves++
	f.next = dt
	return 0
}

// advance takes one step, after as many rejections as it needs.
func (f *follower) advance() Code {
	code := BeyondRupture
	for range mostCuts {
		h := f.corner() - f.time
		if f.next < 0.999*h { // no crumb for the end
			h = f.next
		}
		if !(h > least*f.time) {
			return code
		}
		var worst float64
		if code = f.try(h); code == 0 {
			worst = f.judge(h)
		}
		switch {
		case code != 0 && !Recoverable(code) && code != BadState:
			return code
		case code != 0 || math.IsNaN(worst):
			f.next = h / 4
		default:
			f.next = h * dirk.Factor(worst, f.worst)
		}
		if code == 0 && worst <= 1 {
			f.accept(h, worst)
			return 0
		}
		f.course.Rejected++
		if code == 0 {
			code = NoConvergence
		}
	}
	return code
}

// corner is the next time at which the temperature passes a point of the elastic tables, where the stress has a kink that a
// step must not straddle, or the end of the path.
func (f *follower) corner() float64 {
	end, from, to := f.path.length, f.path.from.Temperature, f.path.to.Temperature
	if f.material.isConstant || from == to {
		return end
	}
	const passed = 1e-12 // of the path
	for _, table := range [...]*Table{&f.material.elastic.Young, &f.material.elastic.Poisson} {
		for _, t := range table.temperature {
			if at := (t - from) / (to - from) * f.path.length; at > f.time+passed*f.path.length && at < end {
				end = at
			}
		}
	}
	return end
}

// try runs the stages of a step of length h.
func (f *follower) try(h float64) Code {
	count, dt := f.material.memory.count, diagonal*h
	for i := 1; i < stages; i++ {
		y := f.state
		for j, w := range dirk.Weights[i][:i] {
			if w != 0 {
				y.add(h*w, &f.rates[j], count)
			}
		}
		if y.Equivalent < 0 { // by rounding, or by the weights at a singular start, where the error shows it
			y.Equivalent = 0
		}
		to, part := f.path.at(f.time + dirk.Abscissae[i]*h)
		if i == stages-1 && f.time+h >= f.path.length {
			to, part = f.path.to, 1
		}
		inc := Increment{Dt: dt, Strain: to.Strain, Temperature: to.Temperature}
		if code := f.tried.solve(f.material, &y, &inc, f.differentiates); code != 0 {
			return code
		}
		f.course.Solves++
		f.course.Iterations += f.tried.iterations
		f.tried.rates(&f.rates[i], &y, dt, count)
		if f.differentiates {
			f.differentiate(i, h, part)
		}
		if i == stages-1 {
			f.end = y
			f.end.add(dt, &f.rates[i], count)
		}
	}
	return 0
}

// differentiate carries the derivatives through stage i.
func (f *follower) differentiate(i int, h, part float64) {
	d := &f.derivatives
	from := d.state
	for j, w := range dirk.Weights[i][:i] {
		if w != 0 {
			from.add(h*w, &d.stage[j])
		}
	}
	d.stage[i].through(&f.tried, &from, part, diagonal*h, f.material.memory.count)
}

// judge returns the estimated error of the step just tried over what the tolerance allows.
func (f *follower) judge(h float64) float64 {
	var e rates
	count := f.material.memory.count
	for i := range stages {
		w := h * (dirk.Weights[stages-1][i] - dirk.Embedded[i])
		for c := range e.creep {
			e.creep[c] += w * f.rates[i].creep[c]
		}
		e.equivalent += w * f.rates[i].equivalent
		for v := range count {
			e.internal[v] += w * f.rates[i].internal[v]
		}
	}
	mises := f.tried.mises()
	largest := math.Max(f.largest, mises)
	stressFloor, creepFloor := f.tolerance.Stress, f.tolerance.Creep
	if stressFloor == 0 {
		stressFloor = 1e-3 * largest
	}
	if creepFloor == 0 {
		creepFloor = largest / (3 * f.tried.shear)
	}
	// Errors of many steps add up: a step may use up the part of the tolerance that its creep strain is of the whole, and a
	// little for its time and for being one. What adds up is of the fifth order in the step where the estimate is of the fourth, hence the power.
	const idle, least, sharing = 0.1, 0.003, 4.0 / 5
	time := least + idle*h/f.path.length
	made := f.end.Equivalent - f.state.Equivalent
	size := math.Max(stressFloor, math.Max(mises, f.mises))
	whole := math.Max(creepFloor, f.end.Equivalent)
	equivalent := e.creep.EquivalentStrain()
	stress := 3 * f.tried.shear * equivalent / (size * math.Pow(math.Min(1, 3*f.tried.shear*made/size+time), sharing))
	creep := math.Max(math.Abs(e.equivalent), equivalent) / (whole * math.Pow(made/whole+time, sharing))
	worst := math.Max(stress, creep)
	for v := range count {
		const floor = 0.1 // of the variable's unit: the way to its limit, or its initial value
		scale := math.Max(math.Abs(f.end.Internal[v]), floor*f.material.memory.unit[v])
		part := math.Abs(f.end.Internal[v]-f.state.Internal[v])/scale + time
		worst = math.Max(worst, math.Abs(e.internal[v])/(scale*math.Pow(math.Min(1, part), sharing)))
	}
	return worst / f.tolerance.Relative
}

func (f *follower) accept(h, worst float64) {
	f.course.Steps++
	f.course.Error = math.Max(f.course.Error, worst)
	f.worst = worst
	f.time += h
	if f.path.length-f.time <= 4*epsilon*f.path.length {
		f.time = f.path.length
	}
	f.state, f.rates[0], f.last = f.end, f.rates[stages-1], f.tried
	f.mises = f.tried.mises()
	f.largest = math.Max(f.largest, f.mises)
	if d := &f.derivatives; f.differentiates {
		for i, w := range dirk.Weights[stages-1] {
			if w != 0 {
				d.state.add(h*w, &d.stage[i])
			}
		}
		d.stage[0] = d.stage[stages-1]
	}
}
