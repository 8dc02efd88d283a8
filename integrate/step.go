package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// Increment is what the host prescribes for one step.
type Increment struct {
	Dt          float64    // Δt: length of the step [time], >= 0
	Strain      tensor.Sym // ε: total strain at the end of the step [-], tensor shear components
	Temperature float64    // T: absolute temperature at the end of the step [K], > 0
}

// Result is what a step gives back.
type Result struct {
	Stress        tensor.Sym     // σ at the end of the step [stress]
	State         State          // the state at the end of the step
	Tangent       tensor.Tangent // ∂σ/∂ε of the discrete update, symmetric [stress]
	ByTemperature tensor.Sym     // ∂σ/∂T of the discrete update at fixed strain [stress/K]
	CreepStep     float64        // Δp: equivalent creep strain of the step [-]
	Iterations    int            // corrections the scalar solve made
	Residual      float64        // what it left in ln Δp, relative to the law; 0 for an elastic step
}

// Step carries the material from the state old through an increment by the fully implicit (backward Euler) rule
//
//	σ = C(T) : (ε - εc - εₜ(T)),   εc = εc(old) + (3/2) Δp s/σₑ,   Δp = Δt ṗ(σₑ, p(old)+Δp, T)
//
// and writes stress, state and the exact derivatives of the update to out. Any step size is accepted. It allocates nothing.
//
// Δt = 0 is an elastic step. A trial state without deviator (hydrostatic strain) does not creep. A creep increment below
// about 1e-278 of the elastic strain is taken as zero.
//
// The error is nil or a Code; then out is untouched. old is never written, but may be &out.State.
func (m *Material) Step(out *Result, old *State, inc Increment) error {
	if code := m.step(out, old, &inc); code != 0 {
		return code
	}
	return nil
}

func (m *Material) step(out *Result, old *State, inc *Increment) Code {
	t, ok := m.trialState(old, inc)
	if !(ok && inc.Dt >= 0 && inc.Temperature > 0 && old.Equivalent >= 0 && finite(inc.Dt+inc.Temperature+old.Equivalent)) {
		return refusal(old, inc)
	}
	x := relaxed{kept: 1, strain: old.Equivalent}
	problem := relaxation{law: m.law, trial: 3 * t.shear * t.equivalent, elastic: t.equivalent, start: old.Equivalent,
		temperature: inc.Temperature}
	if inc.Dt > 0 && t.equivalent > 0 {
		problem.logTime = math.Log(inc.Dt / t.equivalent)
		var code Code
		if x, code = problem.solve(); code != 0 {
			return code
		}
	}
	stiffness, ok := problem.linearise(&x)
	if !ok {
		return BeyondRupture
	}
	out.write(old, &t, &x, stiffness)
	return 0
}

// trial is the state the step would end in if it did not creep.
type trial struct {
	moduli
	deviator   tensor.Sym // e: deviator of the elastic strain
	equivalent float64    // √(⅔ e:e) = q/3G
	volumetric float64    // trace of the elastic strain
	expansion  float64    // dεₜ/dT
}

func (m *Material) trialState(old *State, inc *Increment) (t trial, ok bool) {
	t.moduli = m.moduliAt(inc.Temperature)
	e := inc.Strain.Sub(old.Creep)
	t.volumetric = e.Trace()
	mean := t.volumetric / 3
	e[tensor.XX] -= mean
	e[tensor.YY] -= mean
	e[tensor.ZZ] -= mean
	t.deviator = e
	t.equivalent = math.Sqrt((2.0 / 3) * e.Dot(e))
	if m.expands {
		free, byT := m.expansion.strain(inc.Temperature)
		t.volumetric -= 3 * free
		t.expansion = byT
	}
	return t, t.bulk > 0 && t.shear > 0 && finite(t.volumetric+t.equivalent)
}

// refusal finds the code for a step whose trial state is not a number to work with.
func refusal(old *State, inc *Increment) Code {
	switch {
	case !inc.valid():
		return BadIncrement
	case !old.valid():
		return BadState
	case !finite(inc.Strain.Sub(old.Creep).Norm()): // finite components whose squares overflow
		return BadIncrement
	}
	return OutsideTable
}

func (inc *Increment) valid() bool {
	return inc.Dt >= 0 && inc.Temperature > 0 && finite(inc.Dt+inc.Temperature) && inc.Strain.IsFinite()
}

// linearised is the derivative of the scalar solution.
type linearised struct {
	excess        float64 // ∂σₑ/∂q - σₑ/q [-]
	byTemperature float64 // (∂σₑ/∂T at fixed strain and fixed G)/q [1/K]
	elastic       float64 // share of d(ln G)/dT that reaches d(ln σₑ)/dT [-]
}

// linearise differentiates F(σₑ, q, T) = 0. It reports false where the solution turns back, which is rupture.
func (a *relaxation) linearise(x *relaxed) (linearised, bool) {
	if x.fraction == 0 {
		return linearised{elastic: 1}, true
	}
	u, r, n, h := x.fraction, x.kept, x.rate.ByLogStress, a.stiffening(x)
	slope := r*h + n*u
	if !(slope > 0) {
		return linearised{}, false
	}
	return linearised{
		excess:        r * u * (h - n) / slope,
		byTemperature: -r * u * x.rate.ByLogTemperature / (a.temperature * slope),
		elastic:       r * h / slope,
	}, true
}

// write fills the result. Everything read from old has been read before its first line, so old may be &out.State.
func (out *Result) write(old *State, t *trial, x *relaxed, d linearised) {
	start := *old
	twoG := 2 * t.shear
	mean := t.bulk * t.volumetric
	keep := twoG * x.kept
	for i := range out.Stress {
		out.Stress[i] = keep * t.deviator[i]
		out.State.Creep[i] = start.Creep[i] + x.fraction*t.deviator[i]
	}
	out.Stress[tensor.XX] += mean
	out.Stress[tensor.YY] += mean
	out.Stress[tensor.ZZ] += mean
	out.CreepStep = x.fraction * t.equivalent
	out.State.Equivalent = start.Equivalent + out.CreepStep
	out.Iterations, out.Residual = x.iterations, x.residual

	var n tensor.Sym // flow direction s/σₑ, the same for trial and end
	if t.equivalent > 0 {
		n = t.deviator.Scale((2.0 / 3) / t.equivalent)
	}
	fillTangent(&out.Tangent, t.bulk, keep, 3*t.shear*d.excess, &n)
	meanByT := t.bulkByT*t.volumetric - 3*t.bulk*t.expansion
	misesByT := 3 * t.equivalent * (t.shearByT*x.kept*d.elastic + t.shear*d.byTemperature)
	for i := range out.ByTemperature {
		out.ByTemperature[i] = misesByT * n[i]
	}
	out.ByTemperature[tensor.XX] += meanByT
	out.ByTemperature[tensor.YY] += meanByT
	out.ByTemperature[tensor.ZZ] += meanByT
}

// fillTangent writes K I⊗I + keep (I - ⅓ I⊗I) + along n⊗n. The upper half is computed and mirrored, so that the tangent is
// symmetric to the bit whatever the compiler fuses.
func fillTangent(c *tensor.Tangent, bulk, keep, along float64, n *tensor.Sym) {
	lame := bulk - keep/3
	for i := 0; i < 6; i++ {
		scaled := along * n[i]
		for j := i; j < 6; j++ {
			v := scaled * n[j]
			c[i][j], c[j][i] = v, v
		}
	}
	for i := 0; i < 3; i++ {
		for j := 0; j < 3; j++ {
			c[i][j] += lame
		}
		c[i][i] += keep
		c[i+3][i+3] += keep / 2
	}
}

// Explain tells why a step was refused. It takes the error of Step and the same arguments, and returns an *UpdateError that
// names the quantity and its value, and the law's own reason where it has one. An error that is not a Code comes back as it
// is.
func (m *Material) Explain(err error, old *State, inc Increment) error {
	code, ok := err.(Code)
	if !ok {
		return err
	}
	switch code {
	case BadIncrement:
		return inc.fault()
	case BadState:
		return old.fault()
	case OutsideTable:
		return &UpdateError{Code: code, Quantity: "temperature", Value: inc.Temperature}
	}
	e := &UpdateError{Code: code, Quantity: "time step", Value: inc.Dt}
	if t, ok := m.trialState(old, &inc); ok {
		e.Quantity, e.Value = "trial von Mises stress", 3*t.shear*t.equivalent
		if x, ok := m.given.(creeplaw.Explainer); ok {
			e.Reason = x.CheckPoint(creeplaw.Point{Stress: e.Value, Strain: old.Equivalent, Temperature: inc.Temperature})
		}
	}
	return e
}

var componentNames = [6]string{"xx", "yy", "zz", "yz", "xz", "xy"}

func (inc *Increment) fault() error {
	if !(inc.Dt >= 0) || math.IsInf(inc.Dt, 1) {
		return &UpdateError{Code: BadIncrement, Quantity: "time step", Value: inc.Dt}
	}
	if !(inc.Temperature > 0) || math.IsInf(inc.Temperature, 1) {
		return &UpdateError{Code: BadIncrement, Quantity: "temperature", Value: inc.Temperature}
	}
	return componentFault(BadIncrement, "strain ", &inc.Strain)
}

func (s *State) fault() error {
	if !(s.Equivalent >= 0) || math.IsInf(s.Equivalent, 1) {
		return &UpdateError{Code: BadState, Quantity: "equivalent creep strain", Value: s.Equivalent}
	}
	return componentFault(BadState, "creep strain ", &s.Creep)
}

func componentFault(code Code, name string, a *tensor.Sym) error {
	for i, v := range a {
		if !finite(v) {
			return &UpdateError{Code: code, Quantity: name + componentNames[i], Value: v}
		}
	}
	return code
}
