package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// MixedIncrement is one step under any mixture of prescribed stress and strain.
type MixedIncrement struct {
	Control     Control    // what is prescribed; zero: all strains
	Dt          float64    // Δt: length of the step [time], >= 0
	Prescribed  tensor.Sym // at the end of the step, per component: ε [-] (tensor shear), σ [stress], or c of a relation
	Temperature float64    // T: absolute temperature at the end of the step [K], > 0
}

// MixedResult is what a step under mixed control gives back.
//
// The derivatives are those of the discrete update at fixed start state and Δt. StressBy[i][j] is the derivative of the number
// Stress[i] by the number Prescribed[j], StrainBy[i][j] that of Strain[i], with tensor shear in both: under a shear strain
// StressBy is twice the component C_ijij of a tensor.Tangent, for one number stands for ε_xy and ε_yx. The derivatives by
// temperature are taken at fixed prescribed values.
type MixedResult struct {
	Stress              tensor.Sym    // σ at the end of the step [stress]
	Strain              tensor.Sym    // ε at the end of the step [-]
	State               State         // the state at the end of the step
	StressBy            [6][6]float64 // ∂σ_i/∂(prescribed j)
	StrainBy            [6][6]float64 // ∂ε_i/∂(prescribed j)
	StressByTemperature tensor.Sym    // ∂σ/∂T [stress/K]
	StrainByTemperature tensor.Sym    // ∂ε/∂T [1/K]
	CreepStep           float64       // Δp: equivalent creep strain of the step [-]
	PlasticStep         float64       // Δκ: equivalent plastic strain of the step [-]; 0 without plasticity or yielding
	Iterations          int           // corrections the scalar solve made
	Residual            float64       // what it left in ln Δp, relative to the law; 0 for an elastic step
}

// StepMixed carries the material from the state old to prescribed values of stress, strain, or linear relations between
// them, by the backward Euler rule of Step: Step with the strain that is returned gives the same stress and state.
//
// For a given ω = 2Gλ, Δεc = λ s, the end state is that of a linear elastic solid with the shear modulus G/(1+ω): everything
// is linear but one scalar equation in ω, Δp = ω σₑ/3G = Δt ṗ(σₑ, p₀+Δp, T). As ω grows σₑ never rises and Δp never falls, so
// there is one root for every law that rises with stress and does not soften, whatever the mixture, the step size and the
// stress exponent. There is no iteration on the strains. With internal variables or plasticity ω
// is found through Step.
//
// Prescribed stresses and strains are met exactly, relations to rounding of stress and strain as a whole. Δt = 0 is an elastic
// step. Nothing is allocated.
//
// The error is nil or a Code; then out is untouched. old is never written, but may be &out.State. A prescribed stress so high
// that no finite creep strain satisfies the law gives LawUndefined; a softening law that has no solution connected to a
// vanishing step, as when the prescribed stress ruptures it, gives BeyondRupture. So do a law with internal variables where
// Step refuses the strain at the end, and a prescribed stress above what plasticity without further hardening can carry.
func (m *Material) StepMixed(out *MixedResult, old *State, inc MixedIncrement) error {
	if code := m.stepMixed(out, old, &inc, m.throughStep()); code != 0 {
		return code
	}
	return nil
}

func (m *Material) stepMixed(out *MixedResult, old *State, inc *MixedIncrement, throughStep bool) Code {
	if !inc.valid() {
		return BadIncrement
	}
	if !old.valid() || m.plastic != nil && !old.plasticValid() {
		return BadState
	}
	var p mixedPoint
	if code := m.begin(&p, old, inc); code != 0 {
		return code
	}
	problem := m.newFlow(old, inc.Temperature)
	p.trial.addTo(&problem, &p.system)
	problem.scale(3*p.shear, inc.Dt)
	if !(finite(problem.trial) && p.trial.base.IsFinite()) {
		return BadIncrement // finite numbers whose squares overflow
	}
	x := flowed{stress: problem.trial, strain: old.Equivalent, kept: 1}
	s := sensitivity{slope: 1, h: 1}
	if throughStep {
		return m.bridgeMixed(out, old, inc, &p, &x)
	}
	if inc.Dt > 0 && problem.count > 0 {
		if code := problem.solve(&x); code != 0 {
			return code
		}
	}
	if x.odds != 0 {
		s = sensitivity{n: x.rate.ByLogStress, h: problem.stiffening(&x), slope: problem.slope(&x),
			byT: x.rate.ByLogTemperature / inc.Temperature}
		if !(s.slope > 0) {
			return BeyondRupture
		}
	}
	p.end(&x)
	state := *old // which may be &out.State
	state.grow(x.creep, 0, p.deviator.Scale(x.odds/(2*p.shear)))
	out.write(&state, inc, &p, &x)
	out.CreepStep, out.PlasticStep = x.creep, 0
	out.derive(inc, &p, &x, s)
	return 0
}

// bridgeMixed is stepMixed for a material that only Step knows how to carry.
func (m *Material) bridgeMixed(out *MixedResult, old *State, inc *MixedIncrement, p *mixedPoint, x *flowed) Code {
	b := bridge{point: *p, x: *x, old: *old, inc: *inc}
	if code := b.solve(m); code != 0 {
		return code
	}
	creep, plastic := b.step.CreepStep, b.step.PlasticStep
	if sum := creep + plastic; sum > 0 {
		creep, plastic = b.x.creep*(creep/sum), b.x.creep*(plastic/sum)
	}
	b.old.Internal = b.step.State.Internal
	b.old.grow(creep, plastic, b.point.deviator.Scale(b.x.odds/(2*p.shear)))
	out.write(&b.old, inc, &b.point, &b.x)
	out.CreepStep, out.PlasticStep = creep, plastic
	out.derive(inc, &b.point, &b.x, sensitivity{bridge: &b.bridged})
	return 0
}

// grow adds the inelastic strain of a step to a state: its equivalents, and the tensor that they share.
func (s *State) grow(creep, plastic float64, strain tensor.Sym) {
	s.Equivalent += creep
	if plastic == 0 {
		s.Creep = s.Creep.Add(strain)
		return
	}
	s.EquivalentPlastic += plastic
	s.Creep = s.Creep.Add(strain.Scale(creep / (creep + plastic)))
	s.Plastic = s.Plastic.Add(strain.Scale(plastic / (creep + plastic)))
}

func (inc *MixedIncrement) valid() bool {
	return inc.Dt >= 0 && inc.Temperature > 0 && finite(inc.Dt+inc.Temperature) && inc.Prescribed.IsFinite()
}

// mixedPoint is a step under mixed control while it is being solved.
type mixedPoint struct {
	moduli
	system        mixedSystem
	trial         mixedAmplitudes
	free, freeByT float64    // εₜ, dεₜ/dT
	inelastic     tensor.Sym // creep and plastic strain at the start
	odds          float64    // ω of the end state
	keep          mixedKeep  // and what it leaves of the modes
	stress        tensor.Sym // the end state
	deviator      tensor.Sym
	mean          float64

	along, alongDeviator tensor.Sym // its derivative by ln ω
	alongMean            float64
}

// begin sets up the linear system and its right side.
func (m *Material) begin(p *mixedPoint, old *State, inc *MixedIncrement) Code {
	p.moduli = m.moduliAt(inc.Temperature)
	p.free, p.freeByT = m.freeStrain(inc.Temperature)
	if !(p.bulk > 0 && p.shear > 0 && finite(p.free)) {
		return OutsideTable
	}
	p.inelastic = old.Creep
	if m.plastic != nil {
		p.inelastic = old.Creep.Add(old.Plastic)
	}
	p.system.build(&inc.Control, p.bulk, p.shear)
	var data tensor.Sym
	for i := range data {
		k := &inc.Control.component[i]
		data[i] = inc.Prescribed[i] * k.unit()
		if !k.stress {
			data[i] -= p.inelastic[i]
			if i <= tensor.ZZ {
				data[i] -= p.free
			}
		}
	}
	p.trial = p.system.amplitudes(&data)
	return 0
}

// end sets the end state from ω.
func (p *mixedPoint) end(x *flowed) {
	p.odds = x.odds
	p.keep = p.system.keep(x.odds)
	p.stress, p.deviator, p.mean = p.system.stress(&p.trial, &p.keep, 1)
	turn := p.keep.byOdds()
	p.along, p.alongDeviator, p.alongMean = p.system.stress(&p.trial, &turn, 0)
}

// byRelation reports whether the strain of a component is better found from what is prescribed than from the flow rule: where
// the surroundings give way less than the material does.
func (p *mixedPoint) byRelation(k *condition) bool {
	own := (1+p.odds)/(2*p.shear)*p.deviator.Norm() + math.Abs(p.mean)/(3*p.bulk)
	return !k.stress && k.compliance*p.stress.Norm() <= own
}

// strain is the total strain of the end state: as prescribed, or by the flow rule and Hooke's law.
func (p *mixedPoint) strain(inc *MixedIncrement, odds float64) (strain tensor.Sym) {
	elastic, creep := 1/(2*p.shear), odds/(2*p.shear)
	volume := p.mean/(3*p.bulk) + p.free
	for i := range strain {
		if k := &inc.Control.component[i]; p.byRelation(k) {
			strain[i] = inc.Prescribed[i]*k.unit() - k.compliance*p.stress[i]
			continue
		}
		strain[i] = p.inelastic[i] + creep*p.deviator[i] + elastic*p.deviator[i]
		if i <= tensor.ZZ {
			strain[i] += volume
		}
	}
	return strain
}

// write sets stress, strain and state.
func (out *MixedResult) write(state *State, inc *MixedIncrement, p *mixedPoint, x *flowed) {
	out.Strain = p.strain(inc, x.odds)
	out.Stress = p.stress
	out.State = *state
	out.Iterations, out.Residual = x.iterations, x.residual
}
