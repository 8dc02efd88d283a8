package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// UniaxialIncrement is one step of a bar along x whose strain is prescribed; its sides are free of stress.
type UniaxialIncrement struct {
	Dt          float64 // Δt: length of the step [time], >= 0
	Strain      float64 // ε_xx: total axial strain at the end of the step [-]
	Temperature float64 // T: absolute temperature at the end of the step [K], > 0
}

// UniaxialLoad is one step of a bar along x whose stress is prescribed; its sides are free of stress.
type UniaxialLoad struct {
	Dt          float64 // Δt: length of the step [time], >= 0
	Stress      float64 // σ_xx at the end of the step [stress], tension positive
	Temperature float64 // T: absolute temperature at the end of the step [K], > 0
}

// UniaxialResult is what a step of a bar gives back.
//
// Tangent and ByTemperature mean the same whether strain or stress was prescribed. Under a prescribed stress the
// derivatives of the strain follow: ∂ε/∂σ = 1/Tangent and ∂ε/∂T = -ByTemperature/Tangent. The lateral strains follow the axial
// one by ∂ε_yy/∂ε_xx = ∂ε_zz/∂ε_xx = -½ + (½-ν) Tangent/E.
type UniaxialResult struct {
	Stress        float64    // σ_xx at the end of the step [stress]; all other stresses are zero
	Strain        tensor.Sym // ε at the end of the step [-]: axial xx, lateral yy and zz, and what creep left in shear
	State         State      // the state at the end of the step
	Tangent       float64    // ∂σ_xx/∂ε_xx of the discrete update [stress]
	ByTemperature float64    // ∂σ_xx/∂T of the discrete update at fixed ε_xx [stress/K]
	CreepStep     float64    // Δp: equivalent creep strain of the step [-]
	PlasticStep   float64    // Δκ: equivalent plastic strain of the step [-]; 0 without plasticity or yielding
	Iterations    int        // corrections the scalar solve made
	Residual      float64    // what it left in ln Δp, relative to the law; 0 for an elastic step
}

// StepUniaxial carries a bar from the state old through an increment of axial strain. Stress, creep strain and time obey the
// backward Euler rule of Step with all stresses but σ_xx zero, which leaves one equation in which E stands for 3G:
//
//	|σ| = |σ_trial| - E Δp,   σ_trial = E (ε - εc_xx - εₜ),   Δεc = ±Δp diag(1, -½, -½)
//
// The state is that of Step: a point may change between the entry points. Any step size is accepted; nothing is allocated.
// With internal variables or plasticity the step goes through StepMixed, at several times the cost.
//
// The error is nil or a Code; then out is untouched. old is never written, but may be &out.State.
func (m *Material) StepUniaxial(out *UniaxialResult, old *State, inc UniaxialIncrement) error {
	if code := m.stepUniaxial(out, old, &inc); code != 0 {
		return code
	}
	return nil
}

func (m *Material) stepUniaxial(out *UniaxialResult, old *State, inc *UniaxialIncrement) Code {
	if m.throughStep() {
		return m.bridgeUniaxial(out, old, inc.asMixed())
	}
	b := m.barAt(inc.Temperature)
	elastic := inc.Strain - old.Creep[tensor.XX] - b.free
	if !(b.ok && inc.Dt >= 0 && finite(inc.Dt) && finite(b.young*elastic) && old.valid()) {
		return b.refusal(old, inc.Dt, inc.Strain, inc.Temperature)
	}
	x := flowed{strain: old.Equivalent, kept: 1}
	problem := m.newFlow(old, inc.Temperature)
	if inc.Dt > 0 && elastic != 0 {
		problem.single(math.Abs(elastic), b.young, 1, inc.Dt)
		if code := problem.solve(&x); code != 0 {
			return code
		}
	}
	tangent, byT := b.young, b.youngByT*elastic
	if x.odds != 0 {
		u, r, h := x.spent, x.kept, problem.stiffening(&x)
		slope := problem.slope(&x)
		if !(slope > 0) {
			return BeyondRupture
		}
		tangent *= r * (h / slope)
		byT = elastic * (r / slope) * (b.youngByT*r*h - b.young*u*x.rate.ByLogTemperature/inc.Temperature)
	}
	stress := b.young * x.kept * elastic
	out.write(old, &b, stress, x.spent*elastic)
	out.Strain[tensor.XX] = inc.Strain
	out.Tangent, out.ByTemperature = tangent, byT-tangent*b.freeByT
	out.Iterations, out.Residual = x.iterations, x.residual
	return 0
}

// StepUniaxialStress carries a bar from the state old to a prescribed axial stress. The creep rate is that at the end of the
// step: with a law that does not harden the creep strain is Δt ṗ(σ, T) at once, and otherwise the equation
// ln Δp = ln Δt + ln ṗ(|σ|, p₀+Δp, T) is solved. Everything else is as in StepUniaxial.
//
// A stress so high that no finite creep strain satisfies the law is refused with LawUndefined; a softening law that has no
// solution connected to a vanishing step gives BeyondRupture.
func (m *Material) StepUniaxialStress(out *UniaxialResult, old *State, load UniaxialLoad) error {
	if code := m.stepUniaxialStress(out, old, &load); code != 0 {
		return code
	}
	return nil
}

func (m *Material) stepUniaxialStress(out *UniaxialResult, old *State, load *UniaxialLoad) Code {
	if m.throughStep() {
		return m.bridgeUniaxial(out, old, load.asMixed())
	}
	b := m.barAt(load.Temperature)
	if !(b.ok && load.Dt >= 0 && finite(load.Dt) && finite(load.Stress) && old.valid()) {
		return b.refusal(old, load.Dt, load.Stress, load.Temperature)
	}
	x := flowed{strain: old.Equivalent, kept: 1}
	problem := m.newFlow(old, load.Temperature)
	if load.Dt > 0 && load.Stress != 0 {
		problem.single(math.Abs(load.Stress)/b.young, b.young, 0, load.Dt)
		if code := problem.solve(&x); code != 0 {
			return code
		}
	}
	compliance, byT := 1/b.young, b.freeByT-load.Stress*b.youngByT/(b.young*b.young)
	creep := math.Copysign(x.creep, load.Stress)
	if x.creep != 0 {
		h := problem.stiffening(&x)
		if !(h > 0) {
			return BeyondRupture
		}
		compliance += x.rate.ByLogStress / h * (x.creep / problem.trial)
		byT += creep * x.rate.ByLogTemperature / (load.Temperature * h)
	}
	out.write(old, &b, load.Stress, creep)
	out.Tangent, out.ByTemperature = 1/compliance, -byT/compliance
	out.Iterations, out.Residual = x.iterations, x.residual
	return 0
}

// bar is what a bar's material has at one temperature.
type bar struct {
	young, youngByT float64 // E, dE/dT
	lateral         float64 // ν/E
	free, freeByT   float64 // εₜ, dεₜ/dT
	ok              bool
}

func (m *Material) barAt(temperature float64) bar {
	k := m.moduliAt(temperature)
	var b bar
	inverse := 1/(9*k.bulk) + 1/(3*k.shear)
	b.young = 1 / inverse
	b.youngByT = b.young * b.young * (k.bulkByT/(9*k.bulk*k.bulk) + k.shearByT/(3*k.shear*k.shear))
	b.lateral = 1/(6*k.shear) - 1/(9*k.bulk)
	b.free, b.freeByT = m.freeStrain(temperature)
	b.ok = k.bulk > 0 && k.shear > 0 && temperature > 0 && finite(temperature+b.free)
	return b
}

// freeStrain is εₜ and dεₜ/dT.
func (m *Material) freeStrain(temperature float64) (value, slope float64) {
	if !m.expands {
		return 0, 0
	}
	alpha, byT := m.expansion.Mean.At(temperature)
	dT := temperature - m.expansion.Reference
	return alpha * dT, alpha + byT*dT
}

// write sets stress, strain and state for the axial creep strain of the step. old may be &out.State.
func (out *UniaxialResult) write(old *State, b *bar, stress, creep float64) {
	state := *old
	state.Creep[tensor.XX] += creep
	state.Creep[tensor.YY] -= creep / 2
	state.Creep[tensor.ZZ] -= creep / 2
	out.CreepStep, out.PlasticStep = math.Abs(creep), 0
	state.Equivalent += out.CreepStep
	out.State = state
	out.Stress = stress
	out.Strain = state.Creep
	out.Strain[tensor.XX] += b.free + stress/b.young
	out.Strain[tensor.YY] += b.free - stress*b.lateral
	out.Strain[tensor.ZZ] += b.free - stress*b.lateral
}

// refusal finds the code for a step of a bar that is not a number to work with.
func (b *bar) refusal(old *State, dt, prescribed, temperature float64) Code {
	switch {
	case !(dt >= 0 && temperature > 0 && finite(dt+temperature) && finite(prescribed)):
		return BadIncrement
	case !old.valid():
		return BadState
	case !b.ok:
		return OutsideTable
	}
	return BadIncrement // finite numbers that make an infinite stress
}
