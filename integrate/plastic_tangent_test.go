package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// warmPlastic is warm with a hardening whose parameters all depend on temperature.
func warmPlastic(t testing.TB, law creeplaw.Law, p integrate.Plasticity) (*integrate.Material, func(float64) float64) {
	t.Helper()
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 700, 1100}, values)
		require.NoError(t, err)
		return made
	}
	mean := table(11e-6, 13e-6, 14.5e-6)
	m, err := integrate.New(
		integrate.Isotropic{Young: table(200e3, 165e3, 110e3), Poisson: table(0.28, 0.3, 0.33)}, law,
		integrate.Options{Expansion: integrate.Expansion{Mean: mean, Reference: 293}, Plasticity: p})
	require.NoError(t, err)
	return m, func(temperature float64) float64 {
		alpha, _ := mean.At(temperature)
		return alpha * (temperature - 293)
	}
}

// drawWarmHardening draws a curve from the initial yield stress at 700 K, with every parameter a table over temperature.
func drawWarmHardening(t *testing.T, s source, kind int, yield float64) integrate.Hardening {
	t.Helper()
	table := func(v float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 700, 1100}, []float64{v * s.uniform(1, 1.5), v, v * s.uniform(0.5, 1)})
		require.NoError(t, err)
		return made
	}
	switch kind {
	case 0:
		return integrate.LinearHardening{Yield: table(yield)}
	case 1:
		return integrate.LinearHardening{Yield: table(yield), Modulus: table(young * s.decades(-3, 0.5))}
	case 2:
		return integrate.VoceHardening{Yield: table(yield), Saturation: table(yield * s.uniform(0.2, 3)), Rate: table(s.decades(0, 3))}
	case 3:
		return integrate.VoceHardening{Yield: table(yield), Saturation: table(yield * s.uniform(0.2, 3)),
			Rate: table(s.decades(0, 3)), Modulus: table(young * s.decades(-3, 0))}
	}
	return drawHardeningTable(s, yield)
}

// TestPlasticTangentIsTheDerivativeOfTheUpdate compares ∂σ/∂ε and ∂σ/∂T with sixth-order differences of Step itself, over
// random laws, hardenings, memories, states and increments, with E, ν, α, the law and the hardening depending on temperature.
// Steps that end near the corner where plastic flow sets in, or near a knot of a tabulated curve, have different derivatives
// on its two sides and are left out; both sides of it are compared away from it.
//
// Tolerance: 1e-8 as in TestTangentIsTheDerivativeOfTheUpdate. At least 10⁴ states must be resolved that well, half of them with
// plastic flow, and a quarter of those with creep that matters.
func TestPlasticTangentIsTheDerivativeOfTheUpdate(t *testing.T) {
	const tolerance = 1e-8
	count := 11_000
	if *campaign {
		count = 300_000
	}
	s := newSource(71)
	laws := lawKinds()
	var worst, worstByT float64
	resolved, creeping, below := 0, 0, 0
	for i := range count {
		kind := laws[i%len(laws)]
		law, err := kind.draw(s)
		require.NoError(t, err)
		yield := s.decades(1, 3)
		p := integrate.Plasticity{Hardening: drawWarmHardening(t, s, i%5, yield), Memory: integrate.CreepMemory(i / 5 % 2)}
		m, free := warmPlastic(t, law, p)
		old := integrate.State{Creep: s.deviator().Scale(s.decades(-6, -3)), Equivalent: s.decades(-6, -1),
			Plastic: s.deviator().Scale(s.decades(-6, -3)), EquivalentPlastic: s.decades(-6, -1)}
		if i%3 == 0 {
			old = integrate.State{}
		}
		inc := integrate.Increment{
			Dt:          s.decades(-4, 3),
			Temperature: s.uniform(720, 1080), // clear of the tables' corners by more than the differences reach
		}
		now, _, _ := p.Hardening.YieldStress(old.EquivalentPlastic, inc.Temperature)
		elastic := s.deviator().Scale(now / (3 * shear) * s.decades(-0.3, 1))
		inc.Strain = old.Creep.Add(old.Plastic).Add(elastic).Add(tensor.Identity().Scale(free(inc.Temperature)))
		if nearCorner(t, m, &old, inc, elastic.EquivalentStrain(), p.Hardening) {
			continue
		}
		var out integrate.Result
		require.NoError(t, m.Step(&out, &old, inc), "%s", kind.name)
		byStrain, noise := tangentGap(t, m, &old, inc, &out, elastic.EquivalentStrain())
		byT := temperatureGap(t, m, &old, inc, &out)
		if noise < tolerance/10 {
			switch {
			case out.PlasticStep == 0:
				below++
			default:
				resolved++
				if out.CreepStep > 1e-3*elastic.EquivalentStrain() {
					creeping++
				}
			}
			worst, worstByT = math.Max(worst, byStrain), math.Max(worstByT, byT)
			noise = 0
		}
		require.LessOrEqual(t, byStrain, tolerance+noise, "%s (seed %d, case %d): ∂σ/∂ε at %+v from %+v, %+v", kind.name, seed, i,
			inc, old, p)
		require.LessOrEqual(t, byT, tolerance, "%s (seed %d, case %d): ∂σ/∂T at %+v from %+v, %+v", kind.name, seed, i, inc, old, p)
		require.Zero(t, out.Tangent.Asymmetry(), "%s: symmetric to the bit", kind.name)
	}
	t.Logf("%d steps with plastic flow (%d with creep that matters), %d without: worst relative error of ∂σ/∂ε %.1e, of ∂σ/∂T %.1e",
		resolved, creeping, below, worst, worstByT)
	require.GreaterOrEqual(t, resolved+below, 10_000)
	require.GreaterOrEqual(t, resolved, 5_000)
	require.GreaterOrEqual(t, creeping, resolved/4)
	require.GreaterOrEqual(t, below, 1_000)
}

// nearCorner reports whether a change of the data a little larger than that of the differences takes the end of the step across
// a corner: of yielding, or between two parts of a tabulated curve.
func nearCorner(t *testing.T, m *integrate.Material, old *integrate.State, inc integrate.Increment, size float64,
	h integrate.Hardening) bool {
	t.Helper()
	part := func(strain, temperature float64) (yields bool, slope float64) {
		moved := inc
		moved.Temperature += temperature
		// Longer or shorter along the trial deviator.
		trial := inc.Strain.Sub(old.Creep).Sub(old.Plastic).Deviator()
		moved.Strain = moved.Strain.Add(trial.Scale(strain * size / trial.EquivalentStrain()))
		var out integrate.Result
		require.NoError(t, m.Step(&out, old, moved))
		if _, tabulated := h.(integrate.TabulatedHardening); tabulated {
			_, slope, _ = h.YieldStress(out.State.EquivalentPlastic, inc.Temperature)
		}
		return out.PlasticStep > 0, slope
	}
	const strain, temperature = 0.01, 0.2
	yields, slope := part(0, 0)
	for _, d := range [][2]float64{{strain, 0}, {-strain, 0}, {0, temperature}, {0, -temperature}} {
		if y, s := part(d[0], d[1]); y != yields || s != slope {
			return true
		}
	}
	return false
}
