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
//
// The tangent is symmetric whenever the law sees only the von Mises stress. A law that sees the mean or the greatest principal
// stress has an unsymmetric one; where the two greatest principal stresses coincide, σ1 has a corner, and the tangent is the
// mean of those on both sides. A step long enough to relax a point completely
// has a tangent without deviatoric stiffness: that is correct, and a host structure of such points alone is singular, so a
// host that meets it should cut the step.
type Result struct {
	Stress        tensor.Sym     // σ at the end of the step [stress]
	State         State          // the state at the end of the step
	Tangent       tensor.Tangent // ∂σ/∂ε of the discrete update [stress]; see below
	ByTemperature tensor.Sym     // ∂σ/∂T of the discrete update at fixed strain [stress/K]
	CreepStep     float64        // Δp: equivalent creep strain of the step [-]
	PlasticStep   float64        // Δκ: equivalent plastic strain of the step [-]; 0 without plasticity or yielding
	Iterations    int            // corrections the scalar solve made
	Residual      float64        // what it left in ln Δp, relative to the law; 0 for an elastic step
}

// Step carries the material from the state old through an increment by the fully implicit (backward Euler) rule
//
//	σ = C(T) : (ε - εc - εₜ(T)),   εc = εc(old) + (3/2) Δp s/σₑ,   Δp = Δt ṗ(σₑ, p(old)+Δp, T)
//
// and writes stress, state and the exact derivatives of the update to out. Any step size is accepted. It allocates nothing.
//
// The strain is total, so the elastic strain is a difference: once creep has outgrown it, rounding of the strains shows in the
// stress as modulus × strain × 2⁻⁵³, and a host's stopping limit for its residual must not be tighter than that.
//
// Δt = 0 is an elastic step. A trial state without deviator (hydrostatic strain) does not creep. A creep increment below
// about 1e-278 of the elastic strain is taken as zero.
//
// Internal variables of the law are carried along by the same rule, vᵢ = vᵢ(old) + Δt v̇ᵢ, solved together with Δp. Where the
// equations of a softening law have several solutions, or none, the step takes the one that is connected to Δt → 0. Where
// that solution ends before the end of the step, by turning back or because a variable comes to within 1e-6 of the way from
// its initial value to its limit, the error is BeyondRupture, and Explain names the time. The local stress exponent of such a
// law may go to some thousands.
//
// The error is nil or a Code; then out is untouched. old is never written, but may be &out.State.
func (m *Material) Step(out *Result, old *State, inc Increment) error {
	if code := m.step(out, old, &inc); code != 0 {
		return code
	}
	return nil
}

func (m *Material) step(out *Result, old *State, inc *Increment) Code {
	if m.plastic != nil {
		return m.stepPlastic(out, old, inc)
	}
	var t trial
	if ok := t.set(m, old, inc); !(ok && inc.Dt >= 0 && inc.Temperature > 0 && old.Equivalent >= 0 && finite(inc.Dt+inc.Temperature+old.Equivalent)) {
		return refusal(old, inc)
	}
	if m.memory.law != nil {
		code := m.stepInternal(out, old, inc, &t)
		if code == 0 {
			out.State.Plastic, out.State.EquivalentPlastic, out.PlasticStep = old.Plastic, old.EquivalentPlastic, 0
		}
		return code
	}
	x := relaxed{kept: 1, strain: old.Equivalent}
	problem := relaxation{law: m.law, trial: 3 * t.shear * t.equivalent, elastic: t.equivalent, start: old.Equivalent,
		temperature: inc.Temperature}
	if inc.Dt > 0 && t.equivalent > 0 {
		problem.logTime = math.Log(inc.Dt / t.equivalent)
		if code := problem.solve(&x); code != 0 {
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
	if m.plastic != nil {
		sum := old.inelastic()
		old = &sum
	}
	ok = t.set(m, old, inc)
	return t, ok
}

// set forms the trial state, and reports false where it is not a number to work with.
func (t *trial) set(m *Material, old *State, inc *Increment) bool {
	if m.isConstant {
		t.moduli = m.constant
	} else {
		t.moduli = m.elastic.at(inc.Temperature)
	}
	xx, yy, zz := inc.Strain[0]-old.Creep[0], inc.Strain[1]-old.Creep[1], inc.Strain[2]-old.Creep[2]
	yz, xz, xy := inc.Strain[3]-old.Creep[3], inc.Strain[4]-old.Creep[4], inc.Strain[5]-old.Creep[5]
	volumetric := xx + yy + zz
	mean := volumetric / 3
	xx, yy, zz = xx-mean, yy-mean, zz-mean
	t.deviator = tensor.Sym{xx, yy, zz, yz, xz, xy}
	t.equivalent = math.Sqrt((2.0 / 3) * (xx*xx + yy*yy + zz*zz + 2*(yz*yz+xz*xz+xy*xy)))
	t.expansion = 0
	if m.expands {
		free, byT := m.expansion.At(inc.Temperature)
		volumetric -= 3 * free
		t.expansion = byT
	}
	t.volumetric = volumetric
	return t.bulk > 0 && t.shear > 0 && finite(volumetric+t.equivalent)
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

// write fills the result. Each component of old is read before the same one of out.State is written, so old may be &out.State.
func (out *Result) write(old *State, t *trial, x *relaxed, d linearised) {
	t.write(&out.Stress, &out.State, old, x.fraction, x.kept)
	out.CreepStep, out.PlasticStep = x.fraction*t.equivalent, 0
	out.Iterations, out.Residual = x.iterations, x.residual

	var n tensor.Sym // flow direction s/σₑ, the same for trial and end
	if t.equivalent > 0 {
		n = t.deviator.Scale((2.0 / 3) / t.equivalent)
	}
	fillTangent(&out.Tangent, t.bulk, 2*t.shear*x.kept, 3*t.shear*d.excess, &n)
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
// symmetric to the bit whatever the compiler fuses; written out, it takes half the time of loops.
func fillTangent(c *tensor.Tangent, bulk, keep, along float64, n *tensor.Sym) {
	n0, n1, n2, n3, n4, n5 := n[0], n[1], n[2], n[3], n[4], n[5]
	lame, half := bulk-keep/3, keep/2
	direct := lame + keep
	a := along * n0
	c01, c02, c03, c04, c05 := lame+a*n1, lame+a*n2, a*n3, a*n4, a*n5
	c[0][0], c[0][1], c[0][2], c[0][3], c[0][4], c[0][5] = direct+a*n0, c01, c02, c03, c04, c05
	a = along * n1
	c12, c13, c14, c15 := lame+a*n2, a*n3, a*n4, a*n5
	c[1][0], c[1][1], c[1][2], c[1][3], c[1][4], c[1][5] = c01, direct+a*n1, c12, c13, c14, c15
	a = along * n2
	c23, c24, c25 := a*n3, a*n4, a*n5
	c[2][0], c[2][1], c[2][2], c[2][3], c[2][4], c[2][5] = c02, c12, direct+a*n2, c23, c24, c25
	a = along * n3
	c34, c35 := a*n4, a*n5
	c[3][0], c[3][1], c[3][2], c[3][3], c[3][4], c[3][5] = c03, c13, c23, half+a*n3, c34, c35
	a = along * n4
	c45 := a * n5
	c[4][0], c[4][1], c[4][2], c[4][3], c[4][4], c[4][5] = c04, c14, c24, c34, half+a*n4, c45
	c[5][0], c[5][1], c[5][2], c[5][3], c[5][4], c[5][5] = c05, c15, c25, c35, c45, half+along*n5*n5
}

// Explain tells why a step was refused. It takes the error of Step and the same arguments, and returns an *UpdateError that
// names the quantity and its value, and the law's own reason where it has one. For BeyondRupture the value is the time within
// the step at which its solution ends: a step that long, or a little less, can still be taken. An error that is not a Code
// comes back as it is.
func (m *Material) Explain(err error, old *State, inc Increment) error {
	code, ok := err.(Code)
	if !ok {
		return err
	}
	if m.plastic != nil {
		return m.explainPlastic(code, old, &inc)
	}
	switch code {
	case BadIncrement:
		return inc.fault()
	case BadState:
		if fault := m.memory.fault(old); fault != nil {
			return fault
		}
		return old.fault()
	case BeyondRupture:
		if time, found := m.ruptureWithin(old, &inc); found {
			return &UpdateError{Code: code, Quantity: "time within the step at which its solution ends", Value: time}
		}
	case OutsideTable:
		return &UpdateError{Code: code, Quantity: "temperature for " + m.tableWithout(inc.Temperature), Value: inc.Temperature}
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

// tableWithout names the tabulated property that is undefined at a temperature.
func (m *Material) tableWithout(temperature float64) string {
	for _, p := range []struct {
		name  string
		table Table
	}{{"Young's modulus", m.elastic.Young}, {"Poisson's ratio", m.elastic.Poisson}, {"thermal expansion", m.expansion.Mean}} {
		if low, high := p.table.Range(); !(temperature >= low && temperature <= high) {
			return p.name
		}
	}
	return "a property"
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
