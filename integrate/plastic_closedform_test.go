package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The closed forms of this file follow from Hooke's law, the yield stress and Norton's law by elementary steps, written out
// beside each: von Mises (1913) for the yield condition, Voce (1948) for the saturating curve, both from memory.

func plastic(t testing.TB, law creeplaw.Law, h integrate.Hardening, memory integrate.CreepMemory) *integrate.Material {
	t.Helper()
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), law,
		integrate.Options{Plasticity: integrate.Plasticity{Hardening: h, Memory: memory}})
	require.NoError(t, err)
	return m
}

func norton(t testing.TB, prefactor, exponent float64) creeplaw.Law {
	t.Helper()
	law, err := creeplaw.NewNorton(prefactor, exponent)
	require.NoError(t, err)
	return law
}

// curves are hardening curves with the yield stress written again.
type testCurve struct {
	name  string
	curve integrate.Hardening
	yield func(kappa float64) float64
}

func testCurves(t testing.TB) []testCurve {
	t.Helper()
	constant := integrate.Constant
	table, err := integrate.NewTabulatedHardening([]float64{0, 1e-3, 5e-3, 0.02},
		[]integrate.Table{constant(150), constant(180), constant(200), constant(230)})
	require.NoError(t, err)
	return []testCurve{
		{"perfect", integrate.LinearHardening{Yield: constant(150)}, func(float64) float64 { return 150 }},
		{"linear", integrate.LinearHardening{Yield: constant(150), Modulus: constant(4000)},
			func(k float64) float64 { return 150 + 4000*k }},
		{"Voce", integrate.VoceHardening{Yield: constant(150), Saturation: constant(90), Rate: constant(120)},
			func(k float64) float64 { return 150 + 90*(1-math.Exp(-120*k)) }},
		{"table", table, func(k float64) float64 {
			switch {
			case k < 1e-3:
				return 150 + 30*k/1e-3
			case k < 5e-3:
				return 180 + 20*(k-1e-3)/4e-3
			case k < 0.02:
				return 200 + 30*(k-5e-3)/0.015
			}
			return 230
		}},
	}
}

// bar is a host: a bar in tension along x whose lateral strains follow from zero lateral stress, by Newton on the tangent of
// the library. Either the axial strain is prescribed or the axial stress.
type bar struct {
	material    *integrate.Material
	state       integrate.State
	strain      tensor.Sym
	temperature float64
	out         integrate.Result
	iterations  int
}

func (b *bar) step(t *testing.T, dt float64, given float64, byStress bool) {
	t.Helper()
	trial := b.strain
	if !byStress {
		trial[0] = given
	}
	first := 1
	if byStress {
		first = 0
	}
	for b.iterations = 1; b.iterations <= 30; b.iterations++ {
		require.NoError(t, b.material.Step(&b.out, &b.state, integrate.Increment{Dt: dt, Strain: trial, Temperature: b.temperature}))
		residual := tensor.Sym{b.out.Stress[0] - given, b.out.Stress[1], b.out.Stress[2]}
		if math.Abs(residual[1])+math.Abs(residual[2])+float64(1-first)*math.Abs(residual[0]) < 1e-11*b.out.Stress.Mises() {
			b.strain, b.state = trial, b.out.State
			return
		}
		solveLeading(&b.out.Tangent, &residual, first)
		for i := first; i < 3; i++ {
			trial[i] -= residual[i]
		}
	}
	t.Fatalf("the bar did not converge: %+v", b.out)
}

// solveLeading solves the rows and columns first to 2 of c x = r in place, by elimination; they are positive definite.
func solveLeading(c *tensor.Tangent, r *tensor.Sym, first int) {
	a := *c
	for i := first; i < 3; i++ {
		for k := i + 1; k < 3; k++ {
			f := a[k][i] / a[i][i]
			for j := i; j < 3; j++ {
				a[k][j] -= f * a[i][j]
			}
			r[k] -= f * r[i]
		}
	}
	for i := 2; i >= first; i-- {
		for j := i + 1; j < 3; j++ {
			r[i] -= a[i][j] * r[j]
		}
		r[i] /= a[i][i]
	}
}

// TestMonotonicTension: a bar pulled into the plastic range, at once and in steps, has ε = σ/E + κ with σ = σy(κ); its lateral
// strain is -νσ/E - κ/2. Unloaded, it follows Hooke's law and keeps κ; pushed as far the other way it yields at -σy(κ).
//
// Tolerance 1e-9: the host solves to 1e-11 of the stress, and a strain of 0.03 that is all but a thousandth plastic has lost
// two digits of its elastic part.
func TestMonotonicTension(t *testing.T) {
	law := norton(t, 1e-16, 5)
	for _, c := range testCurves(t) {
		for _, steps := range []int{1, 7} {
			b := bar{material: plastic(t, law, c.curve, integrate.RemembersCreep), temperature: 800}
			for _, kappa := range []float64{4e-4, 3e-3, 0.012, 0.03} {
				stress := c.yield(kappa)
				from, to := b.strain[0], stress/young+kappa
				for i := range steps {
					b.step(t, 0, from+(to-from)*float64(i+1)/float64(steps), false)
				}
				check.Rel(t, c.name+": stress", b.out.Stress[0], stress, 1e-9)
				check.Rel(t, c.name+": plastic strain", b.state.EquivalentPlastic, kappa, 1e-9)
				check.Rel(t, c.name+": axial plastic strain", b.state.Plastic[0], kappa, 1e-9)
				check.Rel(t, c.name+": lateral strain", b.strain[1], -poisson*stress/young-kappa/2, 1e-9)
				require.Zero(t, b.state.Equivalent, "no time, no creep")
				require.LessOrEqual(t, b.iterations, 8)
			}
			kappa := b.state.EquivalentPlastic
			yield := c.yield(kappa)
			// To just short of yielding in compression, elastically; then 1e-3 further.
			b.step(t, 0, kappa-0.999*yield/young, false)
			check.Rel(t, c.name+": unloaded and reversed", b.out.Stress[0], -0.999*yield, 1e-9)
			require.Equal(t, kappa, b.state.EquivalentPlastic, "%s: elastic unloading", c.name)
			more := 1e-3
			reversed := c.yield(kappa + more)
			b.step(t, 0, kappa-more-reversed/young, false)
			check.Rel(t, c.name+": yielding in compression", b.out.Stress[0], -reversed, 1e-9)
			check.Rel(t, c.name+": axial plastic strain after reversal", b.state.Plastic[0], kappa-more, 1e-9)
			check.Rel(t, c.name+": κ after reversal", b.state.EquivalentPlastic, kappa+more, 1e-9)
		}
	}
}

// TestPureShear needs no host: with the tensor shear strain e the von Mises stress is √3 τ, and e·2/√3 = σ/3G + κ.
// Tolerance 1e-13: rounding.
func TestPureShear(t *testing.T) {
	law := norton(t, 1e-16, 5)
	for _, c := range testCurves(t) {
		m := plastic(t, law, c.curve, integrate.RemembersCreep)
		for _, kappa := range []float64{1e-5, 4e-4, 3e-3, 0.012, 0.03} {
			stress := c.yield(kappa)
			e := (stress/(3*shear) + kappa) * math.Sqrt(3) / 2
			var out integrate.Result
			require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Strain: tensor.Sym{3: e}, Temperature: 800}))
			check.Rel(t, c.name+": shear stress", out.Stress[3], stress/math.Sqrt(3), 1e-13)
			check.Rel(t, c.name+": κ", out.PlasticStep, kappa, 1e-11) // a difference of strains up to 100 times as large
			check.Rel(t, c.name+": plastic shear strain", out.State.Plastic[3], kappa*math.Sqrt(3)/2, 1e-11)
		}
	}
}

// TestCreepAtConstantStressAfterYield: a bar is loaded beyond yield and held at that stress. It creeps by A σⁿ t, and yields no
// more; with a law that hardens, ṗ = A σⁿ s^-m, the strain s that it remembers obeys s^(1+m) = s₀^(1+m) + (1+m) A σⁿ t, with
// s₀ = 0 or the plastic strain.
//
// Tolerances: with Norton backward Euler is exact at constant stress, so that of the host. With hardening it is first order;
// two extrapolations of 100, 200 and 400 graded steps leave 1e-5.
func TestCreepAtConstantStressAfterYield(t *testing.T) {
	const stress, a, n, hours, m = 185.0, 1e-17, 6, 500.0, 0.8
	for _, c := range testCurves(t)[1:] {
		b := bar{material: plastic(t, norton(t, a, n), c.curve, integrate.RemembersCreep), temperature: 800}
		b.step(t, 0, stress, true)
		kappa := b.state.EquivalentPlastic
		check.Rel(t, c.name+": plastic prestrain", c.yield(kappa), stress, 1e-10)
		total := b.strain[0]
		for _, dt := range []float64{1, 9, 90, 400} {
			b.step(t, dt, stress, true)
		}
		creep := a * math.Pow(stress, n) * hours
		check.Rel(t, c.name+": creep strain", b.state.Equivalent, creep, 1e-8)
		check.Rel(t, c.name+": axial creep strain", b.state.Creep[0], creep, 1e-8)
		check.Rel(t, c.name+": total strain", b.strain[0]-total, creep, 1e-8)
		check.Rel(t, c.name+": κ unchanged", b.state.EquivalentPlastic, kappa, 1e-8)
	}

	curve := testCurves(t)[1]
	kappa := (stress - 150) / 4000
	law, err := creeplaw.NewStrainHardening(a*1e-3, n, -m)
	require.NoError(t, err)
	for memory, s0 := range map[integrate.CreepMemory]float64{integrate.RemembersCreep: 0, integrate.RemembersInelastic: kappa} {
		want := math.Pow(math.Pow(s0, 1+m)+(1+m)*a*1e-3*math.Pow(stress, n)*hours, 1/(1+m)) - s0
		run := func(steps int) float64 {
			b := bar{material: plastic(t, law, curve.curve, memory), temperature: 800}
			b.step(t, 0, stress, true)
			before := 0.0
			for i := range steps { // graded so that the strain, not the time, grows evenly from zero
				time := hours * math.Pow(float64(i+1)/float64(steps), 2)
				b.step(t, time-before, stress, true)
				before = time
			}
			return b.state.Equivalent
		}
		x, y, z := run(100), run(200), run(400)
		once, again := 2*y-x, 2*z-y
		extrapolated := (4*again - once) / 3
		t.Logf("memory %d: creep strain %.5e, extrapolated %.5e, exact %.5e", memory, z, extrapolated, want)
		check.Rel(t, "hardened creep", extrapolated, want, 1e-5)
		require.Less(t, math.Abs(z-want), math.Abs(y-want))
	}
}

// TestRelaxationFromBeyondYield: strained beyond yield in no time and held, a point starts at the yield stress on the hardening
// curve and relaxes by Norton's closed form σ^(1-n) = σ₀^(1-n) + (n-1) 3G A t (published-values 1.5, with 3G for E); plastic flow
// stops. The walk of Follow keeps its tolerance, with and without RemembersInelastic; single steps converge to it.
func TestRelaxationFromBeyondYield(t *testing.T) {
	const a, n, hours, prestrain = 1e-16, 5, 1000.0, 0.004
	for _, c := range testCurves(t) {
		yield := c.yield(prestrain)
		m := plastic(t, norton(t, a, n), c.curve, integrate.RemembersInelastic)
		strain := shearOf(1)
		strain = strain.Scale((yield/(3*shear) + prestrain) / strain.EquivalentStrain())
		start := integrate.Conditions{Strain: strain, Temperature: 800}
		var loaded integrate.Result
		require.NoError(t, m.Step(&loaded, &integrate.State{}, integrate.Increment{Strain: strain, Temperature: 800}))
		check.Rel(t, c.name+": yield stress", loaded.Stress.Mises(), yield, 1e-12)
		exact := held(yield, a, n, hours)
		for _, tolerance := range []float64{1e-3, 1e-5, 1e-7, 1e-9} {
			var out integrate.Result
			course, err := m.Follow(&out, &loaded.State, start, integrate.Increment{Dt: hours, Strain: strain, Temperature: 800},
				integrate.Tolerance{Relative: tolerance}, 0)
			require.NoError(t, err)
			achieved := math.Abs(out.Stress.Mises()/exact - 1)
			t.Logf("%-8s tolerance %.0e: error %.1e of the stress, %3d steps, %2d rejected, %5d solves", c.name, tolerance, achieved,
				course.Steps, course.Rejected, course.Solves)
			require.LessOrEqual(t, achieved, 3*tolerance, c.name)
			require.Equal(t, loaded.State.EquivalentPlastic, out.State.EquivalentPlastic, c.name)
			check.Rel(t, c.name+": creep strain", out.State.Equivalent, (yield-exact)/(3*shear), 10*tolerance)
		}
		previous := math.Inf(1)
		for _, steps := range []int{64, 128, 256, 512} {
			out := loaded
			for range steps {
				require.NoError(t, m.Step(&out, &out.State, integrate.Increment{Dt: hours / float64(steps), Strain: strain, Temperature: 800}))
			}
			off := math.Abs(out.Stress.Mises()/exact - 1)
			require.Less(t, off, 0.6*previous, "%s: first order", c.name)
			previous = off
		}
	}
}

// TestThermalYielding: a bar between rigid ends heats. Its axial strain stays 0 = σ/E - κ + α ΔT, so that with linear hardening
// |σ| = (σ₀(T) + H α ΔT)/(1 + H/E); and a point held at a fixed strain yields as σ₀(T) falls: κ = (q - σ₀(T))/(3G + H).
//
// Tolerance: that of the host, 1e-9, and rounding.
func TestThermalYielding(t *testing.T) {
	const h, alpha = 3000.0, 14e-6
	yield, err := integrate.NewTable([]float64{300, 900}, []float64{240, 120})
	require.NoError(t, err)
	at := func(temperature float64) float64 { return 240 - 0.2*(temperature-300) }
	m, err := integrate.New(integrate.NewIsotropic(young, poisson), norton(t, 1e-16, 5), integrate.Options{
		Expansion:  integrate.Expansion{Mean: integrate.Constant(alpha), Reference: 300},
		Plasticity: integrate.Plasticity{Hardening: integrate.LinearHardening{Yield: yield, Modulus: integrate.Constant(h)}},
	})
	require.NoError(t, err)
	b := bar{material: m}
	for _, temperature := range []float64{350, 400, 500, 700, 900} {
		b.temperature = temperature
		b.step(t, 0, 0, false)
		want := math.Min(young*alpha*(temperature-300), (at(temperature)+h*alpha*(temperature-300))/(1+h/young))
		check.Rel(t, "restrained bar", b.out.Stress[0], -want, 1e-9)
	}
	require.Positive(t, b.state.EquivalentPlastic)

	free := func(temperature float64) tensor.Sym { return tensor.Identity().Scale(alpha * (temperature - 300)) }
	const q = 200.0
	var out integrate.Result
	for _, temperature := range []float64{400, 500, 501, 700, 850} {
		require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Temperature: temperature,
			Strain: shearOf(q).Add(free(temperature))}))
		kappa := math.Max(0, (q-at(temperature))/(3*shear+h))
		check.Scaled(t, "κ", out.PlasticStep, kappa, q/(3*shear), 1e-13)
		check.Rel(t, "stress", out.Stress.Mises(), math.Min(q, at(temperature)+h*kappa), 1e-12)
	}
}

// TestBothFlowsInOneStep: with n = 1 and linear hardening the step itself is linear. With d = 3G A Δt,
//
//	κ = (q - σ₀ (1+d))/(3G + H (1+d)) if positive,   σ = (q - 3Gκ)/(1+d),   p = A Δt σ.
//
// Tolerance 1e-12: the solve leaves 2e-13 in ln Δp.
func TestBothFlowsInOneStep(t *testing.T) {
	s := newSource(61)
	yielded := 0
	for range 2000 {
		a, h, yield := s.decades(-12, -3), young*s.decades(-5, 1), s.decades(1, 3)
		if s.IntN(4) == 0 {
			h = 0
		}
		m := plastic(t, norton(t, a, 1), integrate.LinearHardening{Yield: integrate.Constant(yield), Modulus: integrate.Constant(h)},
			integrate.CreepMemory(s.IntN(2)))
		q, dt := yield*s.decades(-0.5, 2), s.decades(-3, 3)
		var out integrate.Result
		require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Dt: dt, Temperature: 800,
			Strain: s.deviator().Scale(q / (3 * shear))}))
		d := 3 * shear * a * dt
		kappa := math.Max(0, (q-yield*(1+d))/(3*shear+h*(1+d)))
		stress := (q - 3*shear*kappa) / (1 + d)
		if kappa > 0 {
			yielded++
		}
		check.Rel(t, "stress", out.Stress.Mises(), stress, 1e-12)
		check.Rel(t, "p", out.CreepStep, a*dt*stress, 1e-12)
		check.Scaled(t, "κ", out.PlasticStep, kappa, q/(3*shear), 1e-12)
	}
	require.Greater(t, yielded, 500)
}

// TestPerfectPlasticityAtConstantStrainRate: sheared on at a constant rate a perfectly plastic point stays at σy. From then on it
// creeps by A σyⁿ t, and what is left of the strain rate is plastic. Backward Euler is exact there, whatever the steps.
func TestPerfectPlasticityAtConstantStrainRate(t *testing.T) {
	const yield, a, n, rate = 150.0, 1e-16, 5, 1e-5 // per hour
	m := plastic(t, norton(t, a, n), integrate.LinearHardening{Yield: integrate.Constant(yield)}, integrate.RemembersCreep)
	direction := shearOf(1)
	direction = direction.Scale(1 / direction.EquivalentStrain())
	var out integrate.Result
	require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Temperature: 800,
		Strain: direction.Scale(yield / (3 * shear))}))
	time := 0.0
	for _, dt := range []float64{1, 5, 0.1, 200, 33} {
		time += dt
		require.NoError(t, m.Step(&out, &out.State, integrate.Increment{Dt: dt, Temperature: 800,
			Strain: direction.Scale(yield/(3*shear) + rate*time)}))
		creep := a * math.Pow(yield, n) * time
		check.Rel(t, "stress", out.Stress.Mises(), yield, 1e-12)
		check.Rel(t, "creep strain", out.State.Equivalent, creep, 1e-12)
		// The strains are small differences of the total.
		check.Scaled(t, "plastic strain", out.State.EquivalentPlastic, rate*time-creep, yield/(3*shear)+rate*time, 1e-13)
	}
}

// TestSofteningBesidePlasticFlow: a law that softens, ṗ = A σⁿ exp(Ωp), on a perfectly plastic yield surface: with x = ΩΔp the
// step is x e^-x = c, c = Ω Δt A σyⁿ, which has a solution connected to Δt = 0, the one below 1, up to c = 1/e; beyond is rupture.
//
// Tolerance: 1e-12 over the slope 1-x, which vanishes at rupture.
func TestSofteningBesidePlasticFlow(t *testing.T) {
	const yield, a, n, omega = 150.0, 1e-16, 5, 50.0
	law, err := creeplaw.NewOmega(norton(t, a, n), omega)
	require.NoError(t, err)
	m := plastic(t, law, integrate.LinearHardening{Yield: integrate.Constant(yield)}, integrate.RemembersCreep)
	strain := shearOf(1)
	strain = strain.Scale(0.05 / strain.EquivalentStrain())
	for _, x := range []float64{1e-9, 1e-3, 0.1, 0.5, 0.9, 0.99} {
		dt := x * math.Exp(-x) / (omega * a * math.Pow(yield, n))
		var out integrate.Result
		require.NoError(t, m.Step(&out, &integrate.State{}, integrate.Increment{Dt: dt, Strain: strain, Temperature: 800}), "%v", x)
		check.Rel(t, "ΩΔp", omega*out.CreepStep, x, 1e-12/(1-x))
		check.Rel(t, "stress", out.Stress.Mises(), yield, 1e-12)
	}
	beyond := 1.001 * math.Exp(-1) / (omega * a * math.Pow(yield, n))
	inc := integrate.Increment{Dt: beyond, Strain: strain, Temperature: 800}
	require.Equal(t, integrate.BeyondRupture, m.Step(&integrate.Result{}, &integrate.State{}, inc))
}
