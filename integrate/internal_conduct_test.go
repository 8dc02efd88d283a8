package integrate_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// everything is a law with as many variables as there may be, each of another kind, that sees all a law may see:
//
//	ln ṗ = ln A + n ln(σ/100) + σm/m - n ln(1-d) - h + 3w + q/2
//	ḋ = B (σr/100)^χ/(1-d)^φ       damage, by time and by the greatest principal and the mean stress
//	ḣ = k ṗ - r h                  hardening by strain with recovery by time, which passes through zero
//	ẇ = c ṗ exp(σm/m)              by strain and the mean stress
//	q̇ = (1-q)/τ                    ageing, which saturates
//
// with the mean stress in the creep rate only where meanStress is finite.
type everything struct {
	prefactor, n, meanStress     float64
	damage, chi, phi             float64
	rupture                      creeplaw.RuptureStress
	hardening, recovery, opening float64
	ageing                       float64 // 1/τ
}

var _ creeplaw.Evolving = everything{}

func (l everything) Variables() []creeplaw.Variable {
	return []creeplaw.Variable{{Name: "damage", Limit: 1}, {Name: "hardening", Limit: math.Inf(1)}, {Name: "opening", Limit: 1},
		{Name: "ageing", Limit: math.Inf(1)}}
}

func (l everything) SeesPrincipal() bool { return true }

func (l everything) Rate(p creeplaw.Point) creeplaw.Rate {
	if p.Stress == 0 {
		return creeplaw.Rate{}
	}
	e := l.Evolve(creeplaw.InTension(p, [creeplaw.MaxVariables]float64{}))
	return e.RateInTension(p)
}

func (l everything) Evolve(p creeplaw.EvolvingPoint) (e creeplaw.Evolution) {
	d, h, w, q := p.Internal[0], p.Internal[1], p.Internal[2], p.Internal[3]
	if !(p.Stress >= 0 && d < 1) {
		return creeplaw.Evolution{LogRate: math.NaN()}
	}
	e.LogRate = math.Log(l.prefactor) + l.n*math.Log(p.Stress/100) + p.MeanStress/l.meanStress - l.n*math.Log(1-d) - h + 3*w + q/2
	e.Creep = creeplaw.Partials{ByLogStress: l.n, ByMeanStress: 1 / l.meanStress,
		ByInternal: [creeplaw.MaxVariables]float64{l.n / (1 - d), -1, 3, 0.5}}
	if s := l.rupture.At(p.Stress, p.MeanStress, p.PrincipalStress); !(s <= 0) {
		e.Internal[0] = creeplaw.InternalRate{
			LogScale: math.Log(l.damage) + l.chi*math.Log(s/100) - l.phi*math.Log(1-d), Value: 1,
			Partials: creeplaw.Partials{
				ByLogStress:  l.chi * (1 - l.rupture.Principal - l.rupture.Mean) * p.Stress / s,
				ByMeanStress: l.chi * 3 * l.rupture.Mean / s, ByPrincipalStress: l.chi * l.rupture.Principal / s,
				ByInternal: [creeplaw.MaxVariables]float64{l.phi / (1 - d)}}}
	}
	// k ṗ - r h in the larger of the scales ṗ and r.
	scale := math.Max(e.LogRate, math.Log(l.recovery))
	byStrain, byTime := l.hardening*math.Exp(e.LogRate-scale), l.recovery*math.Exp(-scale)
	e.Internal[1] = creeplaw.InternalRate{LogScale: scale, Value: byStrain - byTime*h,
		Partials: creeplaw.Partials{ByLogStress: byStrain * l.n, ByMeanStress: byStrain / l.meanStress}}
	for i, a := range e.Creep.ByInternal {
		e.Internal[1].ByInternal[i] = byStrain * a
	}
	e.Internal[1].ByInternal[1] -= byTime
	g := l.opening * math.Exp(p.MeanStress/200)
	e.FollowCreep(2, g, creeplaw.Partials{ByMeanStress: g / 200})
	e.Internal[3] = creeplaw.InternalRate{LogScale: math.Log(l.ageing), Value: 1 - q}
	e.Internal[3].ByInternal[3] = -1
	return e
}

func drawEverything(s source) (creeplaw.Evolving, error) {
	l := everything{prefactor: 1e-6, n: s.uniform(1, 12), meanStress: math.Inf(1), damage: s.decades(-6, -2), chi: s.uniform(1, 12),
		phi: s.uniform(0, 15), rupture: creeplaw.RuptureStress{Principal: s.uniform(0, 0.7), Mean: s.uniform(0, 0.3)},
		hardening: s.decades(0, 3), recovery: s.decades(-6, -2), opening: s.decades(-1, 1), ageing: s.decades(-6, -2)}
	if s.IntN(2) == 0 {
		l.meanStress = s.uniform(200, 2000)
	}
	return l, nil
}

func TestEverythingConforms(t *testing.T) {
	s := newSource(42)
	for range 3 {
		law, _ := drawEverything(s)
		l := law.(everything)
		l.n = math.Max(l.n, 2) // its Rate gives no slope at zero stress
		lawtest.Run(t, l, lawtest.Box{Claims: lawtest.Evolving, Stress: lawtest.Range{1, 1000}, Strain: lawtest.Range{1e-6, 0.1},
			Temperature: lawtest.Range{700, 900}, Points: 50, Internal: []lawtest.Range{{0, 0.9}, {0, 5}, {0, 0.5}, {0, 1}}})
	}
}

// TestNoAllocation: neither a step nor a refusal of a law with internal variables allocates, whichever way it is solved.
func TestEvolvingStepDoesNotAllocate(t *testing.T) {
	for k, kind := range softeningLaws() {
		s := newSource(uint64(5000 + k))
		law, err := kind.draw(s)
		require.NoError(t, err)
		m := material(t, law)
		var olds []integrate.State
		var incs []integrate.Increment
		for range 200 {
			old, inc := drawAnyStep(s, m, kind.box)
			olds, incs = append(olds, old), append(incs, inc)
		}
		olds[0].Internal[0] = math.NaN()
		incs[1].Dt = -1
		var out integrate.Result
		refused := 0
		n := testing.AllocsPerRun(2, func() {
			refused = 0
			for i := range olds {
				if m.Step(&out, &olds[i], incs[i]) != nil {
					refused++
				}
			}
		})
		assert.Zero(t, n, kind.name)
		assert.Positive(t, refused, kind.name)
	}
}

func textbookMaterial(t testing.TB) *integrate.Material { return material(t, textbookDamage(t)) }

func TestInternalStateIsJudged(t *testing.T) {
	m := textbookMaterial(t)
	inc := integrate.Increment{Dt: 1, Temperature: 800, Strain: tensor.Sym{1e-4, -5e-5, -5e-5}}
	for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 1, 1.5} {
		old := integrate.State{Internal: [creeplaw.MaxVariables]float64{bad}}
		out := integrate.Result{CreepStep: 7}
		err := m.Step(&out, &old, inc)
		require.ErrorIs(t, err, integrate.BadState, bad)
		assert.Equal(t, integrate.Result{CreepStep: 7}, out, "nothing is written")
		var why *integrate.UpdateError
		require.True(t, errors.As(m.Explain(err, &old, inc), &why))
		assert.Equal(t, "damage less its initial value", why.Quantity)
		assert.False(t, integrate.Recoverable(err))
	}
	// What the law does not use is neither judged nor touched.
	old := integrate.State{Internal: [creeplaw.MaxVariables]float64{0.1, math.NaN(), 5}}
	var out integrate.Result
	require.NoError(t, m.Step(&out, &old, inc))
	assert.True(t, math.IsNaN(out.State.Internal[1]))
	assert.Equal(t, 5.0, out.State.Internal[2])
}

func TestInternalStatesPack(t *testing.T) {
	m := textbookMaterial(t)
	assert.Equal(t, 8, m.StateLength())
	assert.Equal(t, []creeplaw.Variable{{Name: "damage", Limit: 1}}, m.Variables())
	in := integrate.State{Creep: tensor.Sym{1, 2, 3, 4, 5, 6}, Equivalent: 7, Internal: [creeplaw.MaxVariables]float64{0.25}}
	packed := make([]float64, 8)
	m.PackState(packed, &in)
	var back integrate.State
	m.UnpackState(&back, packed)
	assert.Equal(t, in, back)
	assert.Panics(t, func() { m.PackState(make([]float64, 7), &in) })
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	plain := material(t, norton)
	assert.Equal(t, 7, plain.StateLength())
	assert.Empty(t, plain.Variables())
}

// TestNoTimeNoEvolution: Δt = 0 is an elastic step; the variables stay.
func TestNoTimeNoEvolution(t *testing.T) {
	m := textbookMaterial(t)
	old := integrate.State{Equivalent: 1e-3, Internal: [creeplaw.MaxVariables]float64{0.3}}
	var out integrate.Result
	require.NoError(t, m.Step(&out, &old, integrate.Increment{Temperature: 800, Strain: tensor.Sym{1e-3, -5e-4, -5e-4}}))
	assert.Equal(t, old, out.State)
	var elastic tensor.Tangent
	elastic.SetIsotropic(young/(3*(1-2*poisson)), shear)
	for i := range elastic {
		check.Slice(t, "elastic tangent", out.Tangent[i][:], elastic[i][:], young, 1e-15)
	}
}

// TestAgeingWithoutStress: without a deviator nothing creeps, but time passes: Φ' = (Kc/3)(1-Φ)⁴ by backward Euler, whose
// equation is checked here, for a hydrostatic and for no stress.
func TestAgeingWithoutStress(t *testing.T) {
	law, err := creeplaw.NewPerrinHayhurst(creeplaw.CavitationParameters{Prefactor: 2e-9, StressCoefficient: 0.2, Hardening: 24e3,
		HardeningSaturation: 0.6, Ageing: 1e-4, Cavitation: 2, TriaxialityExponent: 2})
	require.NoError(t, err)
	m := material(t, law)
	for _, strain := range []float64{0, 1e-3, -1e-3} {
		for _, dt := range []float64{1, 1e4, 1e9} {
			old := integrate.State{Internal: [creeplaw.MaxVariables]float64{0, 0.2}}
			var out integrate.Result
			require.NoError(t, m.Step(&out, &old, integrate.Increment{Dt: dt, Temperature: 800, Strain: tensor.Identity().Scale(strain)}))
			phi := out.State.Internal[1]
			check.Rel(t, "ageing", phi-0.2, dt*1e-4/3*math.Pow(1-phi, 4), 1e-11)
			assert.Zero(t, out.CreepStep)
			assert.Equal(t, tensor.Sym{}, out.State.Creep)
		}
	}
}

// TestTurningTheStrainTurnsTheResult, with a law that sees the principal stress: the variables stay, stress and tangent turn.
func TestEvolvingStepIsObjective(t *testing.T) {
	s := newSource(77)
	for range 300 {
		law, err := drawEverything(s)
		require.NoError(t, err)
		m := material(t, law)
		old := integrate.State{Equivalent: 1e-4, Internal: [creeplaw.MaxVariables]float64{s.uniform(0, 0.3), s.uniform(0, 1), 0, 0.2}}
		trial := s.decades(1, 2.5)
		inc := integrate.Increment{Dt: s.decades(-2, 3), Temperature: 800,
			Strain: s.deviator().Scale(trial / (3 * shear)).Add(tensor.Identity().Scale(trial / young * s.uniform(-1, 1)))}
		var out, turned integrate.Result
		if m.Step(&out, &old, inc) != nil {
			continue
		}
		q, err := tensor.AxisAngle([3]float64{s.NormFloat64(), s.NormFloat64(), s.NormFloat64()}, s.uniform(0, 3))
		require.NoError(t, err)
		inc.Strain = inc.Strain.Rotate(q)
		require.NoError(t, m.Step(&turned, &old, inc))
		want := out.Stress.Rotate(q)
		// Rounding of the strains, magnified by exponents up to 12/(1-d), and near a fold more.
		check.Slice(t, "stress", turned.Stress[:], want[:], trial, 1e-9)
		check.Slice(t, "variables", turned.State.Internal[:], out.State.Internal[:], 1, 1e-9)
	}
}

// TestCoincidingPrincipalStresses: where the two greatest principal stresses are equal σ1 has a corner. The tangent there is the
// mean of those on both sides, and favours neither axis.
func TestCoincidingPrincipalStresses(t *testing.T) {
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-12, DamageStressExponent: 4.5, DamageExponent: 6, RuptureStress: creeplaw.RuptureStress{Principal: 0.5}})
	require.NoError(t, err)
	m := material(t, law)
	old := integrate.State{Internal: [creeplaw.MaxVariables]float64{0.2}}
	at := func(more float64) *integrate.Result {
		var out integrate.Result
		require.NoError(t, m.Step(&out, &old, integrate.Increment{Dt: 5, Temperature: 800, Strain: tensor.Sym{6e-4 + more, 6e-4, -6e-4}}))
		return &out
	}
	corner, right, left := at(0), at(1e-12), at(-1e-12)
	for i := range 6 {
		for j := range 6 {
			check.Scaled(t, "tangent", corner.Tangent[i][j], (right.Tangent[i][j]+left.Tangent[i][j])/2, young, 1e-9)
		}
	}
	check.Rel(t, "neither axis", corner.Tangent[tensor.ZZ][tensor.XX], corner.Tangent[tensor.ZZ][tensor.YY], 1e-12)
	check.Rel(t, "nor on either side", right.Tangent[tensor.ZZ][tensor.XX], left.Tangent[tensor.ZZ][tensor.YY], 1e-8)
	assert.Greater(t, math.Abs(right.Tangent[tensor.ZZ][tensor.XX]/right.Tangent[tensor.ZZ][tensor.YY]-1), 1e-6, "there is a corner")
}

// TestUnitsDoNotMatter: the same step in (MPa, h) and in (Pa, s), to a few units of rounding times the exponents.
func TestEvolvingStepInOtherUnits(t *testing.T) {
	mega := material(t, textbookDamage(t))
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15 * 1e-30 / 3600, StressExponent: 5,
		DamagePrefactor: 1e-13 * 1e-27 / 3600, DamageStressExponent: 4.5, DamageExponent: 6})
	require.NoError(t, err)
	pascal, err := integrate.New(integrate.NewIsotropic(young*1e6, poisson), law, integrate.Options{})
	require.NoError(t, err)
	for _, dt := range []float64{1e-3, 1, 100, 1e6} {
		old := integrate.State{Internal: [creeplaw.MaxVariables]float64{0.2}}
		inc := integrate.Increment{Dt: dt, Temperature: 800, Strain: tensor.Sym{1e-3, -4e-4, -3e-4, 1e-4}}
		var a, b integrate.Result
		require.NoError(t, mega.Step(&a, &old, inc))
		inc.Dt *= 3600
		require.NoError(t, pascal.Step(&b, &old, inc))
		assert.Equal(t, a.Iterations, b.Iterations)
		check.Rel(t, "damage", b.State.Internal[0], a.State.Internal[0], 1e-13)
		check.Rel(t, "stress", b.Stress.Mises(), 1e6*a.Stress.Mises(), 1e-13)
	}
}

// broken is a law that says something impossible of itself.
type broken struct {
	everything
	variables []creeplaw.Variable
	principal bool
}

func (b broken) Variables() []creeplaw.Variable { return b.variables }
func (b broken) SeesPrincipal() bool            { return b.principal }

func TestImpossibleVariablesAreRefused(t *testing.T) {
	good := creeplaw.Variable{Name: "damage", Limit: 1}
	for want, variables := range map[string][]creeplaw.Variable{
		"number of internal variables": {good, good, good, good, good},
		"initial value of the damage":  {{Name: "damage", Initial: math.NaN(), Limit: 1}},
		"limit of the damage":          {{Name: "damage", Initial: 1, Limit: 1}},
		"limit of the hardening":       {good, {Name: "hardening", Limit: math.NaN()}},
	} {
		m, err := integrate.New(integrate.NewIsotropic(young, poisson), broken{variables: variables}, integrate.Options{})
		var e *integrate.MaterialError
		if assert.True(t, errors.As(err, &e), want) {
			assert.Equal(t, want, e.Quantity)
		}
		assert.Nil(t, m)
	}
}

// TestLawThatPeeksIsCaught: a law that says it does not see the principal stress gets NaN for it.
func TestLawThatPeeksIsCaught(t *testing.T) {
	law, err := drawEverything(newSource(3))
	require.NoError(t, err)
	m := material(t, broken{everything: law.(everything), variables: law.Variables()})
	var out integrate.Result
	err = m.Step(&out, &integrate.State{}, integrate.Increment{Dt: 1, Temperature: 800, Strain: tensor.Sym{1e-3, -5e-4, -5e-4}})
	require.ErrorIs(t, err, integrate.LawUndefined)
}
