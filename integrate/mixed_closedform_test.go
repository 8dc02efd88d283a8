package integrate_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The outside checks of this file are closed forms, with the author and year at each type of package bench, and worked
// instances of them to ten digits (derived and computed twice outside the project; which book prints which is from memory).
// Steps are of first order, so a problem is run in N, 2N, 4N, … steps and extrapolated; what the extrapolation leaves is
// held against the closed form.

func plain(t testing.TB, young, poisson float64, law creeplaw.Law) *integrate.Material {
	t.Helper()
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
	require.NoError(t, err)
	return m
}

// graded is the length of step i of N, i = 1 … N, over a time: t ∝ (i/N)³, short where a relaxation is fast.
func graded(time float64, i, steps int) float64 {
	n := float64(steps)
	return time * (math.Pow(float64(i)/n, 3) - math.Pow(float64(i-1)/n, 3))
}

// holdMixed holds the prescribed values after an elastic step, in graded steps, and returns what the last of them gave.
func holdMixed(m *integrate.Material, inc integrate.MixedIncrement, time float64, steps int) (out integrate.MixedResult, err error) {
	inc.Dt = 0
	if err = m.StepMixed(&out, &integrate.State{}, inc); err != nil {
		return out, err
	}
	for i := 1; i <= steps; i++ {
		inc.Dt = graded(time, i, steps)
		if err = m.StepMixed(&out, &out.State, inc); err != nil {
			return out, err
		}
	}
	return out, nil
}

// limit extrapolates a routine to vanishing steps and requires that it is near the exact values, relative to scale.
func limit(t *testing.T, name string, exact []float64, scale, tolerance float64, routine func(steps int) ([]float64, error)) {
	t.Helper()
	study, err := bench.Halve(exact, scale, 32, 6, routine)
	require.NoError(t, err, name)
	if e := study.ExtrapolatedError(); !(e <= tolerance) {
		t.Errorf("%s: %.1e from the closed form\n%v", name, e, study)
	}
	for _, order := range study.Orders()[3:] {
		if !(math.Abs(order-1) <= 0.15) {
			t.Errorf("%s: order %v, not 1\n%v", name, order, study)
		}
	}
}

// tenDigits compares with a printed value of ten significant digits.
func tenDigits(t *testing.T, label string, got, want float64) {
	t.Helper()
	check.Abs(t, label, got, want, 0.5*math.Pow(10, math.Floor(math.Log10(math.Abs(want)))-9)+1e-14*math.Abs(want))
}

// TestBarAndSolidRelaxation is the contrast of a bar held with free sides, which relaxes with E, and a solid held on all
// sides, which relaxes with 3G, from one stress.
func TestBarAndSolidRelaxation(t *testing.T) {
	const young, poisson, stress = 150e3, 0.3, 200.0
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := plain(t, young, poisson, law)
	norton := bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5}
	bar := bench.BarRelaxation{Young: young, Stress: stress, Law: norton}
	solid := bench.SolidRelaxation{Young: young, Poisson: poisson, Stress: tensor.Sym{stress}, Law: norton}
	for time, printed := range map[float64]float64{1: 195.4687596, 10: 169.0308509, 100: 110.8417897, 1000: 63.72899388} {
		exact := bar.StressAt(time)
		tenDigits(t, "closed form of the bar", exact, printed)
		limit(t, fmt.Sprintf("bar, light, %v h", time), []float64{exact, 0.5 * bar.CreepAt(time)}, stress, 1e-9,
			func(steps int) ([]float64, error) {
				var out integrate.UniaxialResult
				var err error
				for i := 1; i <= steps && err == nil; i++ {
					err = m.StepUniaxial(&out, &out.State, integrate.UniaxialIncrement{Dt: graded(time, i, steps),
						Strain: stress / young, Temperature: 800})
				}
				return []float64{out.Stress, -out.State.Creep[tensor.YY]}, err
			})
		inc := integrate.MixedIncrement{Control: integrate.UniaxialStress(), Prescribed: tensor.Sym{stress / young}, Temperature: 800}
		limit(t, fmt.Sprintf("bar, mixed, %v h", time), []float64{exact}, stress, 1e-9, func(steps int) ([]float64, error) {
			out, err := holdMixed(m, inc, time, steps)
			return []float64{out.Stress[tensor.XX]}, err
		})
		inc = integrate.MixedIncrement{Control: integrate.FullyConstrained(), Prescribed: solid.Strain(), Temperature: 800}
		limit(t, fmt.Sprintf("solid, %v h", time), []float64{solid.MisesAt(time)}, stress, 1e-9, func(steps int) ([]float64, error) {
			out, err := holdMixed(m, inc, time, steps)
			return []float64{out.Stress.Mises()}, err
		})
	}
	tenDigits(t, "closed form of the solid", solid.MisesAt(100), 107.2854731)
	tenDigits(t, "closed form of the solid", solid.MisesAt(1000), 61.51052449)
}

// TestSheetRelaxation is the class "biaxial fixed displacement": equal tension in both directions, and tension and
// compression, thickness free.
func TestSheetRelaxation(t *testing.T) {
	const young, poisson, stress = 200e3, 0.3, 200.0
	law, err := creeplaw.NewNorton(3.125e-14, 5)
	require.NoError(t, err)
	m := plain(t, young, poisson, law)
	norton := bench.Norton{Rate: 3.125e-14, Stress: 1, Exponent: 5}
	equal := bench.EqualBiaxialRelaxation{Young: young, Poisson: poisson, Stress: stress, Law: norton}
	opposite := bench.OppositeBiaxialRelaxation{Young: young, Poisson: poisson, Stress: stress, Law: norton}
	tenDigits(t, "equal", equal.StressAt(1), 85.76536087)
	tenDigits(t, "opposite", opposite.StressAt(1), 44.27477134)
	for _, time := range []float64{0.01, 0.1, 1} {
		sheet := func(xx, yy float64) func(int) ([]float64, error) {
			return func(steps int) ([]float64, error) {
				var out integrate.PlaneStressResult
				var err error
				for i := 1; i <= steps && err == nil; i++ {
					err = m.StepPlaneStress(&out, &out.State, integrate.PlaneStressIncrement{Dt: graded(time, i, steps),
						Strain: tensor.Sym{xx, yy}, Temperature: 800})
				}
				return []float64{out.Stress[tensor.XX], out.Stress[tensor.YY], young * out.Strain[tensor.ZZ]}, err
			}
		}
		mixed := func(xx, yy float64) func(int) ([]float64, error) {
			return func(steps int) ([]float64, error) {
				out, err := holdMixed(m, integrate.MixedIncrement{Control: integrate.PlaneStress(), Prescribed: tensor.Sym{xx, yy},
					Temperature: 800}, time, steps)
				return []float64{out.Stress[tensor.XX], out.Stress[tensor.YY], young * out.Strain[tensor.ZZ]}, err
			}
		}
		s, e := equal.StressAt(time), equal.Strain()
		exact := []float64{s, s, young * equal.ThicknessStrainAt(time)}
		limit(t, fmt.Sprintf("equal, light, %v h", time), exact, stress, 1e-9, sheet(e, e))
		limit(t, fmt.Sprintf("equal, mixed, %v h", time), exact, stress, 1e-9, mixed(e, e))
		s, e = opposite.StressAt(time), opposite.Strain()
		exact = []float64{s, -s, 0}
		limit(t, fmt.Sprintf("opposite, light, %v h", time), exact, stress, 1e-9, sheet(e, -e))
		limit(t, fmt.Sprintf("opposite, mixed, %v h", time), exact, stress, 1e-9, mixed(e, -e))
	}
}

// TestFollowUp relaxes a bar whose elastic surroundings follow up: it relaxes as if its modulus were E/Z.
func TestFollowUp(t *testing.T) {
	const young, stress = 150e3, 200.0
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := plain(t, young, 0.3, law)
	for _, row := range []struct{ factor, time, printed float64 }{
		{3, 100, 139.7068411}, {3, 1000, 83.44522897}, {1.25, 1000, 67.34185827}, {2, 1000, 75.59289460},
	} {
		p := bench.FollowUpRelaxation{Young: young, Stress: stress, FollowUp: row.factor,
			Law: bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5}}
		tenDigits(t, "closed form", p.StressAt(row.time), row.printed)
		control, err := integrate.FollowUp(young, row.factor)
		require.NoError(t, err)
		inc := integrate.MixedIncrement{Control: control, Prescribed: tensor.Sym{row.factor * stress / young}, Temperature: 800}
		exact := []float64{p.StressAt(row.time), young * p.StrainAt(row.time)}
		limit(t, fmt.Sprintf("Z = %v", row.factor), exact, stress, 1e-9, func(steps int) ([]float64, error) {
			out, err := holdMixed(m, inc, row.time, steps)
			return []float64{out.Stress[tensor.XX], young * out.Strain[tensor.XX]}, err
		})
	}
}

// TestTorsion relaxes a tube held in twist, whose axial stress is zero.
func TestTorsion(t *testing.T) {
	p := bench.ShearRelaxation{Shear: shear, Stress: 100, Law: bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5}}
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m := material(t, law)
	inc := integrate.MixedIncrement{Control: integrate.Torsion(), Prescribed: tensor.Sym{tensor.XY: p.Strain() / 2}, Temperature: 800}
	limit(t, "torsion", []float64{p.StressAt(1000), 0}, 100, 1e-9, func(steps int) ([]float64, error) {
		out, err := holdMixed(m, inc, 1000, steps)
		return []float64{out.Stress[tensor.XY], young * out.Strain[tensor.XX]}, err
	})
}

// TestConstantRate pulls a bar at a constant strain rate from zero stress.
func TestConstantRate(t *testing.T) {
	const young, rate = 150e3, 1e-6
	for _, row := range []struct{ n, prefactor, time, printed float64 }{
		{1, 1e-8, 500, 52.76334473}, {2, 1e-10, 100, 14.88850336}, {2, 1e-10, 500, 63.51489524}, {2, 1e-10, 1000, 90.51482536},
		{5, 1e-15, 500, 59.788647687960815}, // printed 59.7886477, of which the last digits are not all right
	} {
		law, err := creeplaw.NewNorton(row.prefactor, row.n)
		require.NoError(t, err)
		m := plain(t, young, 0.3, law)
		limit(t, fmt.Sprintf("n = %v", row.n), []float64{row.printed}, row.printed, 2e-10, func(steps int) ([]float64, error) {
			var out integrate.UniaxialResult
			var err error
			dt := row.time / float64(steps)
			for i := 1; i <= steps && err == nil; i++ {
				err = m.StepUniaxial(&out, &out.State, integrate.UniaxialIncrement{Dt: dt, Strain: rate * dt * float64(i),
					Temperature: 800})
			}
			return []float64{out.Stress}, err
		})
	}
}

// TestSteppedStress is primary creep by strain hardening under a stress that jumps. The start from zero strain is singular, so
// the steps are graded, t ∝ (i/N)^(1/m), to which the curve is straight.
func TestSteppedStress(t *testing.T) {
	const m = 0.4
	law, err := creeplaw.NewBaileyNorton(1e-12, 4, m)
	require.NoError(t, err)
	mat := material(t, law)
	for _, row := range []struct{ first, second, printed float64 }{{100, 150, 4.229380980e-3}, {150, 100, 3.238082964e-3}} {
		p := bench.TwoStepCreep{First: row.first, Change: 100, Second: row.second,
			Curve: bench.BaileyNorton{Strain: 1e-12, Stress: 1, Time: 1, StressExponent: 4, TimeExponent: m}}
		exact := p.StrainHardeningAt(300)
		tenDigits(t, "closed form", exact, row.printed)
		limit(t, fmt.Sprintf("%v then %v", row.first, row.second), []float64{exact}, exact, 2e-9, func(steps int) ([]float64, error) {
			var out integrate.UniaxialResult
			for _, part := range []struct{ stress, time float64 }{{row.first, 100}, {row.second, 200}} {
				for i := range steps {
					n := float64(steps)
					dt := part.time * (math.Pow(float64(i+1)/n, 1/m) - math.Pow(float64(i)/n, 1/m))
					load := integrate.UniaxialLoad{Dt: dt, Stress: part.stress, Temperature: 800}
					if err := mat.StepUniaxialStress(&out, &out.State, load); err != nil {
						return nil, err
					}
				}
			}
			return []float64{out.State.Creep[tensor.XX]}, nil
		})
	}
}

// TestLoadClasses holds the creep rates under given stresses, which one step of any length gives exactly because the law does
// not harden.
func TestLoadClasses(t *testing.T) {
	law, err := creeplaw.NewNorton(3.125e-14, 5)
	require.NoError(t, err)
	m := plain(t, 200e3, 0.3, law)
	for _, row := range []struct{ stress, printed tensor.Sym }{
		{tensor.Sym{200}, tensor.Sym{0.01, -0.005, -0.005}},
		{tensor.Sym{200, 200}, tensor.Sym{0.005, 0.005, -0.01}},
		{tensor.Sym{200, -200}, tensor.Sym{0.135, -0.135, 0}},
		{tensor.Sym{200, 100}, tensor.Sym{0.00421875, 0, -0.00421875}},
		{tensor.Sym{300, 200, 100}, tensor.Sym{0.00421875, 0, -0.00421875}},
	} {
		for _, dt := range []float64{1e-6, 1, 1e6} {
			var out integrate.MixedResult
			require.NoError(t, m.StepMixed(&out, &integrate.State{}, integrate.MixedIncrement{Control: integrate.StressControl(), Dt: dt,
				Prescribed: row.stress, Temperature: 800}))
			rate := out.State.Creep.Scale(1 / dt)
			check.Slice(t, fmt.Sprintf("rates under %v in %v h", row.stress, dt), rate[:], row.printed[:], rate.Norm(), 1e-13)
			require.Equal(t, row.stress, out.Stress)
		}
	}
}

// TestPlaneStrainClass is the class "plane strain, unequal biaxial displacement", printed to ten digits.
func TestPlaneStrainClass(t *testing.T) {
	law, err := creeplaw.NewNorton(3.125e-14, 5)
	require.NoError(t, err)
	m := plain(t, 200e3, 0.3, law)
	inc := integrate.MixedIncrement{Prescribed: tensor.Sym{1e-3, -5e-4}, Temperature: 800}
	exact := []float64{131.4289766, 44.85681873, 73.71420468}
	limit(t, "plane strain", exact, 200, 1e-9, func(steps int) ([]float64, error) {
		out, err := holdMixed(m, inc, 1, steps)
		return out.Stress[:3], err
	})
}

// TestMaxwell takes single steps with n = 1, which have a closed form: backward Euler turns σ̇ = -E A σ into
// σ = E ε/(1 + E A Δt), for a bar with follow-up E/Z, and creep under a stress is A σ Δt.
func TestMaxwell(t *testing.T) {
	const prefactor, strain = 1e-8, 1e-3
	law, err := creeplaw.NewNorton(prefactor, 1)
	require.NoError(t, err)
	m := material(t, law)
	for _, dt := range []float64{1e-3, 1, 1e3, 1e6, 1e9} {
		slow := 1 + young*prefactor*dt
		var bar integrate.UniaxialResult
		require.NoError(t, m.StepUniaxial(&bar, &integrate.State{}, integrate.UniaxialIncrement{Dt: dt, Strain: strain,
			Temperature: 800}))
		check.Rel(t, "stress", bar.Stress, young*strain/slow, 1e-12) // ln Δp is solved to 2e-13
		check.Rel(t, "tangent", bar.Tangent, young/slow, 1e-12)
		check.Rel(t, "lateral strain", bar.Strain[tensor.YY], -(poisson*bar.Stress/young + 0.5*(strain-bar.Stress/young)), 1e-12)
		require.NoError(t, m.StepUniaxialStress(&bar, &integrate.State{}, integrate.UniaxialLoad{Dt: dt, Stress: -100,
			Temperature: 800}))
		check.Rel(t, "strain under load", bar.Strain[tensor.XX], -100*(1/young+prefactor*dt), 1e-12)
		check.Rel(t, "tangent under load", bar.Tangent, 1/(1/young+prefactor*dt), 1e-12)

		const factor = 2.5
		control, err := integrate.FollowUp(young, factor)
		require.NoError(t, err)
		var out integrate.MixedResult
		require.NoError(t, m.StepMixed(&out, &integrate.State{}, integrate.MixedIncrement{Control: control, Dt: dt,
			Prescribed: tensor.Sym{strain}, Temperature: 800}))
		check.Rel(t, "follow-up", out.Stress[tensor.XX], young/factor*strain/(1+young/factor*prefactor*dt), 1e-12)
		check.Rel(t, "follow-up derivative", out.StressBy[0][0], young/factor/(1+young/factor*prefactor*dt), 1e-12)

		// Confined compression: σ_xx prescribed, the sides rigid. In one step the shear modulus is G/(1 + 3G A Δt).
		require.NoError(t, m.StepMixed(&out, &integrate.State{}, integrate.MixedIncrement{Control: integrate.ConfinedCompression(),
			Dt: dt, Prescribed: tensor.Sym{-100}, Temperature: 800}))
		bulk, soft := young/(3*(1-2*poisson)), shear/(1+3*shear*prefactor*dt)
		check.Rel(t, "confined strain", out.Strain[0], -100/(bulk+4*soft/3), 1e-12)
		check.Rel(t, "confined side stress", out.Stress[1], -100*(bulk-2*soft/3)/(bulk+4*soft/3), 1e-12)
	}
}

// TestRigidEnds heats a bar between rigid ends, σ = -E α ΔT, and lets it relax; walls on all sides make the pressure
// E α ΔT/(1-2ν), which does not creep. (Textbook thermoelasticity: S. Timoshenko, J. N. Goodier, Theory of Elasticity.)
func TestRigidEnds(t *testing.T) {
	const alpha, cold, hot = 12e-6, 300.0, 420.0
	law, err := creeplaw.NewNorton(1e-16, 5)
	require.NoError(t, err)
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law,
		integrate.Options{Expansion: integrate.Expansion{Mean: integrate.Constant(alpha), Reference: cold}})
	require.NoError(t, err)
	const stress = young * alpha * (hot - cold)
	heat := integrate.MixedIncrement{Control: integrate.UniaxialStress(), Temperature: hot}
	var out integrate.MixedResult
	require.NoError(t, m.StepMixed(&out, &integrate.State{}, heat))
	check.Rel(t, "bar", out.Stress[0], -stress, 1e-14)
	check.Rel(t, "its derivative by temperature", out.StressByTemperature[0], -young*alpha, 1e-14)
	check.Rel(t, "its sides", out.Strain[1], (1+poisson)*alpha*(hot-cold), 1e-14)
	p := bench.BarRelaxation{Young: young, Stress: stress, Law: bench.Norton{Rate: 1e-16, Stress: 1, Exponent: 5}}
	limit(t, "hold", []float64{-p.StressAt(500)}, stress, 1e-9, func(steps int) ([]float64, error) {
		out, err := holdMixed(m, heat, 500, steps)
		return []float64{out.Stress[0]}, err
	})
	var bar integrate.UniaxialResult
	require.NoError(t, m.StepUniaxial(&bar, &integrate.State{}, integrate.UniaxialIncrement{Temperature: hot}))
	check.Rel(t, "bar, light", bar.Stress, -stress, 1e-14)

	heat.Control, heat.Dt = integrate.FullyConstrained(), 1e6
	require.NoError(t, m.StepMixed(&out, &integrate.State{}, heat))
	for i := range 3 {
		check.Rel(t, "walls", out.Stress[i], -stress/(1-2*poisson), 1e-14)
	}
	require.Zero(t, out.CreepStep)
}
