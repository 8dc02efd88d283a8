package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// A material with plasticity is followed another way than by the higher-order method of Follow. On the yield surface the plastic
// strain has no rate that the state alone gives: it follows from the strain rate through a constraint, and a method that adds up
// rates leaves the surface. Plain steps keep to it. So a step of this walk is carried out again and again, as 1, 2, 3, … plain
// steps, and their results are extrapolated to infinitely many, which raises the order by one for each repetition, as long as
// plastic flow neither sets in nor stops between. Where it does, extrapolation is blind to when: the first of 1, 2, 3, … parts may
// hold the onset each time. Such a step is judged by what the creep rate and the flow direction change within it, and shrinks.
//
// Source: P. Deuflhard, Order and stepsize control in extrapolation methods, Numer. Math. 41 (1983) 399–422 (from memory): the
// Aitken–Neville scheme over 1, 2, 3, … implicit Euler steps.

// mostColumns bounds the repetitions.
const mostColumns = 7

// columns is how often steps are repeated: the order of the walk, chosen by the tolerance.
func (t Tolerance) columns() int {
	return max(3, min(mostColumns, 2+int(math.Round(-math.Log10(t.Relative)/2))))
}

// carried is a state, first, and its derivatives by the strains and the temperature at the end of the path: creep strain,
// plastic strain, p and κ.
type carried [1 + temperatureColumn + 1][carriedLength]float64

const (
	carriedPlastic    = 6
	carriedEquivalent = 12
	carriedKappa      = 13
	carriedLength     = 14
)

func carry(s *State) (c carried) {
	copy(c[0][:carriedPlastic], s.Creep[:])
	copy(c[0][carriedPlastic:carriedEquivalent], s.Plastic[:])
	c[0][carriedEquivalent], c[0][carriedKappa] = s.Equivalent, s.EquivalentPlastic
	return c
}

// state is the state; extrapolation may leave the equivalent strains a little below zero.
func (c *carried) state(rest *State) State {
	s := *rest
	copy(s.Creep[:], c[0][:carriedPlastic])
	copy(s.Plastic[:], c[0][carriedPlastic:carriedEquivalent])
	s.Equivalent, s.EquivalentPlastic = math.Max(0, c[0][carriedEquivalent]), math.Max(0, c[0][carriedKappa])
	return s
}

// plasticFollower is a walk along a path.
type plasticFollower struct {
	material  *Material
	tolerance Tolerance
	path      path
	start     State
	now       carried
	time      float64
	next      float64 // length of the step to try next
	mises     float64 // at the present time
	reached   float64 // at the end of the step being tried
	largest   float64 // met
	direction tensor.Sym
	onSurface bool // at the present time, and
	reaches   bool // at the end of the step being tried: plastic flow goes on, or would with the least load
	span      span // of the step being tried
	rows      int  // of carried that are used: the state, and the derivatives if they are wanted
	columns   int
	tableau   [mostColumns]carried
	course    Course
}

// followPlastic is Follow for a material with plasticity; it fills the derivatives of out only if they are wanted.
func (m *Material) followPlastic(out *Result, old *State, start Conditions, inc *Increment, tolerance Tolerance, first float64,
	differentiates bool) (Course, error) {
	if !old.plasticValid() {
		return Course{}, BadState
	}
	end := Conditions{inc.Strain, inc.Temperature}
	f := plasticFollower{material: m, tolerance: tolerance, path: path{start, end, inc.Dt, start == end}, start: *old,
		now: carry(old), next: first, rows: 1, columns: tolerance.columns()}
	if differentiates {
		f.rows = len(f.now)
	}
	if code := f.begin(); code != 0 {
		return Course{}, code
	}
	for f.time < inc.Dt {
		if code := f.advance(); code != 0 {
			return Course{}, code
		}
	}
	f.course.Dt = f.next
	f.write(out, old, inc)
	return f.course, nil
}

// followStressPlastic is FollowStress for a material with plasticity.
func (m *Material) followStressPlastic(stress *tensor.Sym, end, old *State, start Conditions, inc *Increment,
	tolerance Tolerance, first float64) (Course, error) {
	var out Result
	course, err := m.followPlastic(&out, old, start, inc, tolerance, first, false)
	if err == nil {
		*stress, *end = out.Stress, out.State
	}
	return course, err
}

// begin finds the present stress, and a first step.
func (f *plasticFollower) begin() Code {
	m, at := f.material, &f.path.from
	inc := Increment{Strain: at.Strain, Temperature: at.Temperature}
	var s plasticStep // of no length: a start state may be above the yield surface
	if code := s.solve(m, &f.start, &inc); code != 0 {
		return code
	}
	f.mises, f.direction = s.x.kept*s.relaxation.trial, s.flowDirection()
	f.onSurface = f.mises >= s.surface.yield0*(1-f.tolerance.Relative)
	f.largest = math.Max(f.mises, f.tolerance.Stress)
	return f.firstLength(f.mises / (3 * s.shear))
}

// firstLength is the length of the first step: the one given, or the time to creep away a part of the elastic strain that a
// step could resolve; where hardening starts from zero strain, at most that to a creep strain that does not matter.
func (f *plasticFollower) firstLength(elastic float64) Code {
	m := f.material
	point := creeplaw.Point{Stress: f.mises, Strain: m.plastic.remembered(&f.start), Temperature: f.path.from.Temperature}
	rate, part := m.law.LogRate(point), 0.3*math.Pow(f.tolerance.Relative, 1/float64(f.columns))
	given := f.next
	if math.IsInf(rate.Value, 1) {
		part = 1e-3 * f.tolerance.Relative
		point.Strain += part * elastic
		rate = m.law.LogRate(point)
	} else if given > 0 {
		return 0
	}
	switch f.next = part * elastic / math.Exp(rate.Value); {
	case math.IsNaN(rate.Value) && f.mises > 0:
		return LawUndefined
	case !(f.next > 0 && f.next <= f.path.length):
		f.next = f.path.length / 8
	}
	if given > 0 {
		f.next = math.Min(f.next, given)
	}
	return 0
}

// advance takes one step, after as many rejections as it needs. Each in a row cuts harder: where the creep strain grows as a
// fractional power of time, the error falls more slowly than its order says.
func (f *plasticFollower) advance() Code {
	code := BeyondRupture
	for cuts := range mostCuts {
		h := f.path.length - f.time
		if f.next < 0.999*h { // no crumb for the end
			h = f.next
		}
		if !(h > least*f.time) {
			return code
		}
		most := math.Ldexp(h, -cuts-1)
		var worst float64
		var column int
		column, worst, code = f.try(h)
		switch {
		case code == 0 && worst <= 1:
			f.accept(h, column, worst)
			return 0
		case code != 0 && !Recoverable(code):
			return code
		case code == 0 && worst > 1: // and no NaN
			most = math.Min(most, f.length(h, column, worst))
			code = NoConvergence
		default:
			most /= 2
		}
		f.next = most
		f.course.Rejected++
	}
	return code
}

// length is the length of a step after one of length h whose error is of the order of the column.
func (f *plasticFollower) length(h float64, column int, worst float64) float64 {
	return h * math.Max(0.15, math.Min(6, 0.85*math.Pow(worst, -1/float64(column))))
}

// try fills the tableau for a step of length h, until its error is small or does not fall. Column j is of order j.
func (f *plasticFollower) try(h float64) (column int, worst float64, code Code) {
	const slight = 0.01 // an error that needs no further column
	before := math.Inf(1)
	f.span = span{lowest: f.mises, highest: f.mises}
	for j := range f.columns {
		latest := f.now
		for i := range j + 1 {
			if code := f.substep(&latest, h, i+1, j+1); code != 0 {
				return 0, 0, code
			}
		}
		for k := range j { // Aitken–Neville: latest becomes T_jk, and the tableau keeps the row before
			f.tableau[k], latest = latest, f.extrapolate(&latest, &f.tableau[k], float64(j+1)/float64(j-k))
		}
		f.tableau[j] = latest
		if j == 0 {
			continue
		}
		var unseen float64
		worst, unseen = f.judge(&f.tableau[j], &f.tableau[j-1], h)
		if unseen > 1 && unseen > worst {
			return 2, unseen, 0
		}
		column = j + 1
		if worst <= slight || j >= 2 && !(worst < before) {
			break
		}
		before = worst
	}
	return column, worst, 0
}

// extrapolate is T_jk from T_j,k-1 and T_j-1,k-1, whose numbers of steps have the ratio given.
func (f *plasticFollower) extrapolate(fine, coarse *carried, ratio float64) carried {
	out := *fine
	weight := 1 / (ratio - 1)
	for r := range f.rows {
		for i := range out[r] {
			out[r][i] += weight * (fine[r][i] - coarse[r][i])
		}
	}
	return out
}

// substep carries c through step i of n.
func (f *plasticFollower) substep(c *carried, h float64, i, n int) Code {
	from, _ := f.path.at(f.time + h*float64(i-1)/float64(n))
	stress := f.mises
	if i > 1 {
		stress = f.span.stress
	}
	to, part := f.path.at(f.time + h*float64(i)/float64(n))
	if i == n && f.time+h >= f.path.length {
		to, part = f.path.to, 1
	}
	inc := Increment{Dt: h / float64(n), Strain: to.Strain, Temperature: to.Temperature}
	old := c.state(&f.start)
	var s plasticStep
	if code := s.solve(f.material, &old, &inc); code != 0 {
		return code
	}
	threat := 0.0
	if s.x.plastic == 0 {
		threat = f.threat(&s, &old, &inc, stress, from.Temperature)
	}
	f.span.add(&s, i, n, threat)
	f.course.Solves++
	f.course.Iterations += s.x.iterations
	d, ok := s.linearise(&s.x)
	if !ok {
		return BeyondRupture
	}
	if f.rows > 1 {
		s.through(c, &d, part)
	}
	for k, e := range s.deviator {
		c[0][k] = old.Creep[k] + s.x.fraction*e
	}
	c[0][carriedEquivalent] = old.Equivalent + s.x.fraction*s.equivalent
	s.write(&old, &old)
	copy(c[0][carriedPlastic:carriedEquivalent], old.Plastic[:])
	c[0][carriedKappa] = old.EquivalentPlastic
	return 0
}

func (f *plasticFollower) accept(h float64, column int, worst float64) {
	f.course.Steps++
	f.course.Error = math.Max(f.course.Error, worst)
	f.next = f.length(h, column, worst)
	f.time += h
	if f.path.length-f.time <= 4*epsilon*f.path.length {
		f.time = f.path.length
	}
	f.now, f.mises = f.tableau[column-1], f.reached
	f.direction, f.onSurface = f.span.direction, f.reaches
	f.largest = math.Max(f.largest, f.mises)
}

// write fills the result at the end of the path.
func (f *plasticFollower) write(out *Result, old *State, inc *Increment) {
	state := f.now.state(old)
	t, _ := f.material.trialState(&state, inc)
	out.Stress = t.deviator.Scale(2 * t.shear)
	addMean(&out.Stress, t.bulk*t.volumetric)
	out.CreepStep, out.PlasticStep = state.Equivalent-old.Equivalent, state.EquivalentPlastic-old.EquivalentPlastic
	out.State = state
	out.Iterations, out.Residual = f.course.Iterations, 0
	if f.rows > 1 {
		f.now.tangent(out, &t)
	}
}

// strainBy is the derivative of creep and plastic strain together by column k.
func (c *carried) strainBy(k int) (e tensor.Sym) {
	row := &c[1+k]
	for i := range e {
		e[i] = row[i] + row[carriedPlastic+i]
	}
	return e
}

// tangent writes ∂σ/∂ε and ∂σ/∂T at the end of the path, σ = C(T):(ε-εc-εp-εₜ).
func (c *carried) tangent(out *Result, t *trial) {
	for k := range temperatureColumn {
		e := c.strainBy(k).Scale(-1)
		e[k]++
		column := e.Deviator().Scale(2 * t.shear)
		if k < 3 {
			addMean(&column, t.bulk)
		} else {
			column = column.Scale(0.5) // the strain is one of two equal components, the tangent's column counts them both
		}
		for i := range column {
			out.Tangent[i][k] = column[i]
		}
	}
	out.ByTemperature = c.strainBy(temperatureColumn).Deviator().Scale(-2 * t.shear).Add(t.deviator.Scale(2 * t.shearByT))
	addMean(&out.ByTemperature, t.meanByTemperature())
}
