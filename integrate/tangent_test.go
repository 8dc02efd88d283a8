package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// warm is a material with everything that depends on temperature: E(T), ν(T), α(T) and the law.
// It also returns the free thermal strain.
func warm(t testing.TB, law creeplaw.Law) (m *integrate.Material, free func(temperature float64) float64) {
	t.Helper()
	table := func(values ...float64) integrate.Table {
		made, err := integrate.NewTable([]float64{300, 700, 1100}, values)
		require.NoError(t, err)
		return made
	}
	mean := table(11e-6, 13e-6, 14.5e-6)
	const reference = 293
	m, err := integrate.New(
		integrate.Isotropic{Young: table(200e3, 165e3, 110e3), Poisson: table(0.28, 0.3, 0.33)}, law,
		integrate.Options{Expansion: integrate.Expansion{Mean: mean, Reference: reference}})
	require.NoError(t, err)
	return m, func(temperature float64) float64 {
		alpha, _ := mean.At(temperature)
		return alpha * (temperature - reference)
	}
}

// sixth is the sixth-order central difference of a tensor-valued function at 0, with the step h.
func sixth(f func(x float64) tensor.Sym, h float64) tensor.Sym {
	weights := [3]float64{45.0 / 60, -9.0 / 60, 1.0 / 60}
	var d tensor.Sym
	for k, w := range weights {
		x := float64(k+1) * h
		d = d.Add(f(x).Sub(f(-x)).Scale(w))
	}
	return d.Scale(1 / h)
}

// gap compares a derivative with sixth-order differences of f over several steps h·scale and returns the smallest deviation:
// large steps serve mild functions, small ones steep functions. noise is the rounding of f at the step that was best.
func gap(f func(x float64) tensor.Sym, scale float64, got tensor.Sym) (deviation, noise float64) {
	deviation = math.Inf(1)
	rounding := 4 * 0x1p-52 * largest(f(0))
	for _, h := range []float64{0x1p-6, 0x1p-8, 0x1p-9, 0x1p-10, 0x1p-11, 0x1p-13} {
		d := largest(got.Sub(sixth(f, h*scale)))
		if !(d >= deviation) {
			deviation, noise = d, rounding/(h*scale)
		}
	}
	return deviation, noise
}

func largest(a tensor.Sym) float64 {
	m := 0.0
	for _, v := range a {
		if !(math.Abs(v) <= m) {
			m = math.Abs(v)
		}
	}
	return m
}

// TestTangentIsTheDerivativeOfTheUpdate compares ∂σ/∂ε and ∂σ/∂T with sixth-order differences of Step itself over random
// laws, states and increments, mild to stiff, with E, ν, α and the law depending on temperature.
//
// Tolerance: 1e-8 of the tangent's own deviatoric size, wherever the rounding of the differenced stress stays a tenth of
// that; where it does not (hardly any stress left), the rounding is granted. At least 10⁴ states must be of the first kind.
func TestTangentIsTheDerivativeOfTheUpdate(t *testing.T) {
	const tolerance = 1e-8
	count := 11_000
	if *campaign {
		count = 300_000
	}
	s := newSource(7)
	kinds := lawKinds()
	var worst, worstByT float64
	resolved := 0
	for i := range count {
		kind := kinds[i%len(kinds)]
		law, err := kind.draw(s)
		require.NoError(t, err)
		m, free := warm(t, law)
		old := integrate.State{Creep: s.deviator().Scale(s.decades(-6, -3)), Equivalent: s.decades(-6, -1)}
		if i%3 == 0 {
			old = integrate.State{}
		}
		elastic := s.deviator().Scale(s.decades(-5, -2.5))
		inc := integrate.Increment{
			Dt:          s.decades(-4, 6),
			Temperature: s.uniform(720, 1080), // clear of the tables' corners by more than the differences reach
		}
		inc.Strain = old.Creep.Add(elastic).Add(tensor.Identity().Scale(free(inc.Temperature)))
		var out integrate.Result
		require.NoError(t, m.Step(&out, &old, inc), "%s", kind.name)

		byStrain, noise := tangentGap(t, m, &old, inc, &out, elastic.EquivalentStrain())
		byT := temperatureGap(t, m, &old, inc, &out)
		if noise < tolerance/10 {
			resolved++
			worst, worstByT = math.Max(worst, byStrain), math.Max(worstByT, byT)
			noise = 0
		}
		require.LessOrEqual(t, byStrain, tolerance+noise, "%s (seed %d, case %d): ∂σ/∂ε at %+v from %+v", kind.name, seed, i,
			inc, old)
		require.LessOrEqual(t, byT, tolerance, "%s (seed %d, case %d): ∂σ/∂T at %+v from %+v", kind.name, seed, i, inc, old)
		require.Zero(t, out.Tangent.Asymmetry(), "%s: symmetric to the bit", kind.name)
	}
	t.Logf("%d states, %d resolved: worst relative error of ∂σ/∂ε %.1e, of ∂σ/∂T %.1e", count, resolved, worst, worstByT)
	require.GreaterOrEqual(t, resolved, 10_000)
}

// tangentGap is the largest deviation of the tangent from differences, and the rounding in it, both relative to the size of
// the deviatoric part. The volumetric part is linear and would hide a soft deviatoric part behind its rounding.
func tangentGap(t *testing.T, m *integrate.Material, old *integrate.State, inc integrate.Increment, out *integrate.Result,
	size float64) (deviation, noise float64) {
	t.Helper()
	scale := 0.0
	for j := range 6 {
		var unit tensor.Sym
		unit[j] = 1
		f := func(x float64) tensor.Sym {
			moved := inc
			moved.Strain[j] += x
			return stepStress(t, m, old, moved).Deviator()
		}
		column := out.Tangent.Contract(unit).Deviator()
		d, n := gap(f, size, column)
		deviation, noise = math.Max(deviation, d), math.Max(noise, n)
		scale = math.Max(scale, largest(column))
	}
	// Stress and tangent were rounded before their volumetric parts were taken off.
	noise += 4*0x1p-52*largest(out.Stress)/(0x1p-8*size) + 4*0x1p-52*math.Abs(out.Tangent[0][0])
	return deviation / scale, noise / scale
}

// temperatureGap is the same for ∂σ/∂T, relative to the larger of itself and stress per kelvin of temperature.
func temperatureGap(t *testing.T, m *integrate.Material, old *integrate.State, inc integrate.Increment,
	out *integrate.Result) float64 {
	t.Helper()
	f := func(x float64) tensor.Sym {
		moved := inc
		moved.Temperature += x
		return stepStress(t, m, old, moved)
	}
	deviation, _ := gap(f, 64, out.ByTemperature) // steps of 1/64 K to 1 K
	return deviation / math.Max(largest(out.ByTemperature), largest(out.Stress)/inc.Temperature)
}

func stepStress(t *testing.T, m *integrate.Material, old *integrate.State, inc integrate.Increment) tensor.Sym {
	t.Helper()
	var out integrate.Result
	require.NoError(t, m.Step(&out, old, inc))
	return out.Stress
}
