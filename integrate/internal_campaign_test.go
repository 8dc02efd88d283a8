package integrate_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

type softeningKind struct {
	name string
	draw func(s source) (creeplaw.Law, error)
	box  stepBox
}

// softeningLaws draws the laws that soften: with internal variables, and by their creep strain.
func softeningLaws() []softeningKind {
	brittle := widest
	brittle.strain = 1e-3 // Ω to 3e4: beyond, rates are e^1000 times the initial one
	var kinds []softeningKind
	for _, d := range damagingLaws() {
		kinds = append(kinds, softeningKind{d.name, func(s source) (creeplaw.Law, error) { return d.draw(s) }, d.box})
	}
	norton := func(s source) (creeplaw.Law, error) { return creeplaw.NewNortonAt(1e-6, 100, s.uniform(1, 15)) }
	return append(kinds,
		softeningKind{"Omega", func(s source) (creeplaw.Law, error) {
			initial, err := norton(s)
			if err != nil {
				return nil, err
			}
			return creeplaw.NewOmega(initial, s.decades(0, 4.5))
		}, brittle},
		softeningKind{"Omega after primary", func(s source) (creeplaw.Law, error) {
			initial, err := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, s.uniform(1, 10), s.uniform(0.3, 1))
			if err != nil {
				return nil, err
			}
			return creeplaw.NewOmega(initial, s.decades(0, 4.5))
		}, brittle},
		softeningKind{"Omega, polynomials", func(source) (creeplaw.Law, error) {
			return creeplaw.NewOmegaFromPolynomials(creeplaw.OmegaPolynomials{
				Rate: [5]float64{-16.3, 38060, -9165, 1200, -600}, Acceleration: [5]float64{-1.0, 3060, 135, -760, 247},
				Stress: [2]float64{2, 30}, Temperature: [2]float64{700, 900},
			})
		}, widest},
	)
}

// drawAnyStep draws a start and an increment over everything: trial stress, Δt, creep strain, variables, mean stress.
func drawAnyStep(s source, m *integrate.Material, box stepBox) (integrate.State, integrate.Increment) {
	old := integrate.State{}
	if s.IntN(4) > 0 {
		old.Equivalent = s.decades(-12, math.Log10(box.strain))
		old.Creep = s.deviator().Scale(s.decades(-6, -2))
	}
	for i, v := range m.Variables() {
		if math.IsInf(v.Limit, 0) {
			v.Limit = v.Initial + 1
		}
		switch s.IntN(4) {
		case 0:
		case 1:
			old.Internal[i] = (v.Limit - v.Initial) * box.variable * s.decades(-12, 0)
		case 2:
			old.Internal[i] = (v.Limit - v.Initial) * math.Min(1-s.decades(-4, 0), box.variable)
		default:
			old.Internal[i] = (v.Limit - v.Initial) * s.uniform(0, math.Min(0.9, box.variable))
		}
	}
	trial := s.decades(-3, box.trial)
	if s.IntN(2) == 0 {
		trial = s.decades(1, math.Min(3, box.trial))
	}
	inc := integrate.Increment{Dt: s.decades(-10, 15), Temperature: s.uniform(720, 880)}
	if s.IntN(2) == 0 {
		inc.Dt = s.decades(-2, 6)
	}
	mean := trial / young * s.uniform(-2, 2)
	inc.Strain = s.deviator().Scale(trial / (3 * shear)).Add(tensor.Identity().Scale(mean)).Add(old.Creep)
	switch s.IntN(50) {
	case 0: // hydrostatic: no creep, but ageing and damage go on
		inc.Strain = tensor.Identity().Scale(mean)
		old.Creep = tensor.Sym{}
	case 1:
		inc.Strain = old.Creep // unloaded
	}
	return old, inc
}

type internalTally struct {
	steps, ruptures, evaluations, worst int
	residual                            float64
}

// TestSofteningStepNeverFails takes random steps with every law that softens. The only failure allowed is BeyondRupture; no NaN
// is. The equations of the step are formed again from the result alone.
func TestSofteningStepNeverFails(t *testing.T) {
	count := 5_000
	if *campaign {
		count = 1_000_000
	}
	for k, kind := range softeningLaws() {
		t.Run(kind.name, func(t *testing.T) {
			s := newSource(uint64(2000 + k))
			var sum internalTally
			for i := range count {
				law, err := kind.draw(s)
				require.NoError(t, err)
				m := material(t, law)
				old, inc := drawAnyStep(s, m, kind.box)
				before := old
				var out integrate.Result
				err = m.Step(&out, &old, inc)
				require.Equal(t, before, old)
				if err != nil {
					require.Equal(t, integrate.Result{}, out)
					require.ErrorIs(t, err, integrate.BeyondRupture, "%s (seed %d, case %d): %+v from %+v with %+v", kind.name, seed, i, inc, old, law)
					sum.ruptures++
					continue
				}
				sum.steps++
				sum.evaluations += out.Iterations + 1
				sum.worst = max(sum.worst, out.Iterations+1)
				require.True(t, allFinite(&out), "%s (seed %d, case %d): %+v at %+v from %+v with %+v", kind.name, seed, i, out, inc, old, law)
				r := equationsOf(law, m, &out, &old, inc)
				sum.residual = math.Max(sum.residual, r)
				if !(r <= 1e-11) {
					t.Fatalf("%s (seed %d, case %d): residual %v: %+v at %+v from %+v with %+v", kind.name, seed, i, r, out, inc, old, law)
				}
			}
			t.Logf("%-28s %7d steps, %6d beyond rupture, law asked %.2f times, %d at worst, residual %.1e", kind.name, sum.steps,
				sum.ruptures, float64(sum.evaluations)/float64(sum.steps), sum.worst, sum.residual)
			require.Positive(t, sum.steps)
		})
	}
}

func allFinite(r *integrate.Result) bool {
	sum := r.CreepStep + r.State.Equivalent + r.Residual
	for i := range r.Tangent {
		for j := range r.Tangent[i] {
			sum += r.Tangent[i][j]
		}
	}
	for _, v := range r.State.Internal {
		sum += v
	}
	return sum-sum == 0 && r.Stress.IsFinite() && r.State.Creep.IsFinite() && r.ByTemperature.IsFinite()
}

// equationsOf is the largest error of the step's equations, formed from the result: of ln Δp, and of the increment of each
// variable over its size, each less what the rounding of stress and variables alone can do to it.
func equationsOf(law creeplaw.Law, m *integrate.Material, out *integrate.Result, old *integrate.State, inc integrate.Increment) float64 {
	const smallest = 1e-270
	e, ok := law.(creeplaw.Evolving)
	if !ok {
		r, meaningful := residual(law, out, old, inc)
		if !meaningful || math.IsNaN(r) {
			return 0
		}
		mises := out.Stress.Mises()
		if mises == 0 {
			return 0
		}
		l := creeplaw.Log(law).LogRate(creeplaw.Point{Stress: mises, Strain: out.State.Equivalent, Temperature: inc.Temperature})
		return math.Max(0, r-64*0x1p-52*(math.Abs(l.ByLogStrain)+math.Abs(l.ByLogStress)*(1+out.Stress.Norm()/mises)))
	}
	mises, trial := out.Stress.Mises(), 3*shear*inc.Strain.Sub(old.Creep).EquivalentStrain()
	if trial > 0 && (mises < 1e-13*trial || trial < 1e-9*out.Stress.Norm()) {
		return 0 // the rounding of the stress hides the deviator
	}
	p := creeplaw.EvolvingPoint{
		Point:      creeplaw.Point{Stress: mises, Strain: out.State.Equivalent, Temperature: inc.Temperature},
		MeanStress: out.Stress.Mean(), PrincipalStress: out.Stress.PrincipalValues()[0],
	}
	variables := m.Variables()
	for i, v := range variables {
		p.Internal[i] = v.Initial + out.State.Internal[i]
	}
	at := e.Evolve(p)
	const rounding = 64 * 0x1p-52
	size := out.Stress.Norm()
	// What rounding of the arguments does to a rate whose partial derivatives are given.
	noise := func(by *creeplaw.Partials) float64 {
		if p.Stress == 0 {
			return 0
		}
		n := math.Abs(by.ByLogStress) + (math.Abs(by.ByMeanStress)+math.Abs(by.ByPrincipalStress))*size +
			math.Abs(by.ByLogStrain)
		n += math.Abs(by.ByLogStress) * size / p.Stress
		for i, v := range variables {
			n += math.Abs(by.ByInternal[i]) * (math.Abs(v.Initial) + math.Abs(p.Internal[i]))
		}
		return rounding * n
	}
	worst := 0.0
	if out.CreepStep > smallest && mises > 0 {
		f := math.Abs(math.Log(out.CreepStep) - math.Log(inc.Dt) - at.LogRate)
		worst = math.Max(0, f-noise(&at.Creep)-rounding*math.Abs(at.LogRate))
	}
	for i := range variables {
		r := &at.Internal[i]
		growth := math.Exp(math.Log(inc.Dt) + r.LogScale)
		if growth == 0 {
			continue
		}
		change := out.State.Internal[i] - old.Internal[i]
		f := math.Abs(change - growth*r.Value)
		f -= growth*(noise(&r.Partials)+rounding*math.Abs(r.Value)*math.Abs(r.LogScale)) + 4*0x1p-52*math.Abs(out.State.Internal[i])
		scale := math.Abs(change) + 1e-4*math.Abs(out.State.Internal[i]) + 1e-20
		// A stable, stiff equation amplifies the residual over the error.
		worst = math.Max(worst, f/scale/(1+growth*math.Abs(r.ByInternal[i])))
	}
	return worst
}

// TestSofteningTangentIsTheDerivative compares ∂σ/∂ε and ∂σ/∂T with differences of Step for every law that softens, over
// random steps that do not reach rupture. Tolerance: 1e-7 of the deviatoric size of the tangent, more where the rounding of the
// differenced stress is more; steps with a neighbour beyond rupture, or too near a corner of the law, are not counted.
func TestSofteningTangentIsTheDerivative(t *testing.T) {
	count := 120
	if *campaign {
		count = 10_000
	}
	for k, kind := range softeningLaws() {
		t.Run(kind.name, func(t *testing.T) {
			s := newSource(uint64(3000 + k))
			resolved, unsymmetric := 0, 0
			var worst, worstByT float64
			for i := range count {
				law, err := kind.draw(s)
				require.NoError(t, err)
				m, free := warm(t, law)
				old, inc := drawAnyStep(s, m, kind.box)
				inc.Strain = inc.Strain.Add(tensor.Identity().Scale(free(inc.Temperature)))
				var out integrate.Result
				if m.Step(&out, &old, inc) != nil {
					continue
				}
				byStrain, byT, ok := softeningGaps(t, m, &old, inc, &out)
				if !ok {
					continue
				}
				resolved++
				worst, worstByT = math.Max(worst, byStrain), math.Max(worstByT, byT)
				if !out.Tangent.IsSymmetric(1e-9) {
					unsymmetric++
				}
				if !(byStrain <= 1e-7 && byT <= 1e-7) {
					t.Fatalf("%s (seed %d, case %d): ∂σ/∂ε off by %v, ∂σ/∂T by %v: %+v from %+v with %+v", kind.name, seed, i, byStrain, byT, inc, old, law)
				}
			}
			t.Logf("%-28s %6d of %6d resolved, %5d unsymmetric: worst relative error of ∂σ/∂ε %.1e, of ∂σ/∂T %.1e", kind.name, resolved,
				count, unsymmetric, worst, worstByT)
			require.Greater(t, resolved, count/5)
		})
	}
}

// softeningGaps are the deviations of both tangents from differences, each less its noise, and whether differences could tell.
func softeningGaps(t *testing.T, m *integrate.Material, old *integrate.State, inc integrate.Increment, out *integrate.Result) (byStrain, byT float64, ok bool) {
	t.Helper()
	ok = true
	stress := func(moved integrate.Increment) tensor.Sym {
		var r integrate.Result
		if err := m.Step(&r, old, moved); err != nil {
			require.ErrorIs(t, err, integrate.BeyondRupture, "%+v from %+v with %+v", moved, old, m.Law())
			ok = false
		}
		return r.Stress
	}
	elastic := inc.Strain.Sub(old.Creep)
	size := math.Max(elastic.EquivalentStrain(), 1e-3*largest(inc.Strain))
	rounded := math.Max(largest(out.Stress), 2*shear*largest(inc.Strain)) // what the stress and the strain were rounded at
	var deviation, scale, noise float64
	for j := range 6 {
		var unit tensor.Sym
		unit[j] = 1
		column := out.Tangent.Contract(unit).Deviator()
		d, n := resolvedGap(func(x float64) tensor.Sym {
			moved := inc
			moved.Strain[j] += x
			return stress(moved).Deviator()
		}, size, rounded, column)
		if !ok {
			return 0, 0, false
		}
		deviation, noise, scale = math.Max(deviation, d), math.Max(noise, n), math.Max(scale, largest(column))
	}
	d, n := resolvedGap(func(x float64) tensor.Sym {
		moved := inc
		moved.Temperature += x
		return stress(moved).Deviator()
	}, 64, rounded, out.ByTemperature.Deviator())
	scaleByT := math.Max(largest(out.ByTemperature.Deviator()), largest(out.Stress.Deviator())/inc.Temperature)
	if !ok || !(noise <= 1e-8*scale) || !(n <= 1e-8*scaleByT) || scale == 0 || scaleByT == 0 {
		return 0, 0, false
	}
	return deviation / scale, d / scaleByT, true
}

// resolvedGap is the deviation of a derivative from the sixth-order difference whose own error, estimated from the steps next to
// it and the rounding of the stress, is least; and that error.
func resolvedGap(f func(x float64) tensor.Sym, scale, stress float64, got tensor.Sym) (deviation, noise float64) {
	steps := []float64{0x1p-4, 0x1p-6, 0x1p-8, 0x1p-10, 0x1p-12, 0x1p-14, 0x1p-16}
	var ladder []tensor.Sym
	for _, h := range steps {
		ladder = append(ladder, sixth(f, h*scale))
	}
	noise = math.Inf(1)
	for i := 1; i < len(ladder); i++ {
		n := largest(ladder[i].Sub(ladder[i-1])) + 4*0x1p-52*stress/(steps[i]*scale)
		if n < noise {
			noise, deviation = n, math.Min(largest(got.Sub(ladder[i])), largest(got.Sub(ladder[i-1])))
		}
	}
	return deviation, noise
}

// TestExplainLocatesRupture: the time that Explain names divides the steps that can be taken from those that cannot.
func TestExplainLocatesRupture(t *testing.T) {
	count := 300
	if *campaign {
		count = 30_000
	}
	for k, kind := range softeningLaws() {
		t.Run(kind.name, func(t *testing.T) {
			s := newSource(uint64(4000 + k))
			located := 0
			for i := range count {
				law, err := kind.draw(s)
				require.NoError(t, err)
				m := material(t, law)
				old, inc := drawAnyStep(s, m, kind.box)
				var out integrate.Result
				if err = m.Step(&out, &old, inc); err == nil {
					continue
				}
				var why *integrate.UpdateError
				require.True(t, errors.As(m.Explain(err, &old, inc), &why))
				require.ErrorIs(t, why, integrate.BeyondRupture, "%+v from %+v with %+v", inc, old, law)
				require.Equal(t, "time within the step at which its solution ends", why.Quantity, "%s (seed %d, case %d): %+v from %+v with %+v", kind.name, seed, i, inc, old, law)
				require.LessOrEqual(t, why.Value, inc.Dt*(1+1e-9))
				if !(why.Value > 1e-290) {
					continue // e^1000 and more times the usual rate: no number for the time
				}
				located++
				shorter := inc
				shorter.Dt = why.Value * (1 - 1e-8)
				require.NoError(t, m.Step(&out, &old, shorter), "%s (seed %d, case %d): %+v from %+v with %+v", kind.name, seed, i, shorter, old, law)
				shorter.Dt = why.Value * (1 + 1e-8)
				require.ErrorIs(t, m.Step(&out, &old, shorter), integrate.BeyondRupture, "%s (seed %d, case %d): %+v from %+v with %+v", kind.name, seed, i, shorter, old, law)
			}
			t.Logf("%-28s %d ruptures located", kind.name, located)
		})
	}
}
