package integrate_test

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// specimen is a material point under prescribed stress, carried by the public Step: the strain is found by Newton's iteration
// on its tangent, and the error of a step is controlled by extrapolation over 1, 2, … substeps, whose errors have an expansion
// in powers of their length.
type specimen struct {
	t         *testing.T
	m         *integrate.Material
	stress    tensor.Sym
	strain    tensor.Sym
	state     integrate.State
	time      float64
	newton    int // most iterations any substep took
	tolerance float64
}

const columns = 5 // of the extrapolation

// substep takes one implicit step under the stress; the strain at its end is predicted from the last rate of strain.
func (s *specimen) substep(strain *tensor.Sym, rate *tensor.Sym, state *integrate.State, dt float64) error {
	guess := strain.Add(rate.Scale(dt))
	var out integrate.Result
	for i := 1; i <= 30; i++ {
		if err := s.m.Step(&out, state, integrate.Increment{Dt: dt, Strain: guess, Temperature: 800}); err != nil {
			return err
		}
		gap := s.stress.Sub(out.Stress)
		if gap.Norm() <= 1e-13*s.stress.Norm() {
			s.newton = max(s.newton, i)
			*rate = guess.Sub(*strain).Scale(1 / dt)
			*strain, *state = guess, out.State
			return nil
		}
		guess = guess.Add(solveTangent(s.t, &out.Tangent, gap))
	}
	return errors.New("the strain under this stress is not found")
}

// solveTangent is the strain that a tangent wants for a stress.
func solveTangent(t *testing.T, c *tensor.Tangent, stress tensor.Sym) (strain tensor.Sym) {
	t.Helper()
	a := mat.NewDense(6, 6, nil)
	for i := range 6 {
		for j := range 6 {
			f := 1.0
			if j >= 3 {
				f = 2
			}
			a.Set(i, j, f*c[i][j])
		}
	}
	var x mat.VecDense
	require.NoError(t, x.SolveVec(a, mat.NewVecDense(6, stress[:])))
	copy(strain[:], x.RawVector().Data)
	return strain
}

// vector is what is extrapolated.
func vector(strain tensor.Sym, s integrate.State) []float64 {
	v := append(strain[:], s.Creep[:]...)
	return append(append(v, s.Equivalent), s.Internal[:]...)
}

// advance tries a step and returns the error of its best result over the tolerance, which must not exceed 1 for it to count.
func (s *specimen) advance(dt float64, rate tensor.Sym) (worst float64, newRate tensor.Sym) {
	var previous [][]float64
	for n := 1; n <= columns; n++ {
		strain, state, r := s.strain, s.state, rate
		for range n {
			if s.substep(&strain, &r, &state, dt/float64(n)) != nil {
				return math.Inf(1), rate
			}
		}
		row := [][]float64{vector(strain, state)}
		for k, before := range previous {
			next := make([]float64, len(before))
			ratio := float64(n) / float64(n-1-k)
			for i := range next {
				next[i] = row[k][i] + (row[k][i]-before[i])/(ratio-1)
			}
			row = append(row, next)
		}
		previous, newRate = row, r
	}
	best, other := previous[columns-1], previous[columns-2]
	var now integrate.State
	copy(now.Creep[:], best[6:12])
	now.Equivalent = best[12]
	copy(now.Internal[:], best[13:])
	// The error counts relative to the step; below that is the rounding of the total, which the extrapolation amplifies.
	allowed := func(before, after float64) float64 { return s.tolerance*math.Abs(after-before) + 1e-13*math.Abs(after) }
	worst = math.Abs(best[12]-other[12]) / allowed(s.state.Equivalent, now.Equivalent)
	for i, v := range s.m.Variables() {
		if now.Internal[i] != s.state.Internal[i] {
			worst = math.Max(worst, math.Abs(best[13+i]-other[13+i])/allowed(s.state.Internal[i], now.Internal[i]))
		}
		if now.Internal[i] >= v.Limit-v.Initial {
			return math.Inf(1), rate
		}
	}
	if worst <= 1 {
		copy(s.strain[:], best)
		s.state, s.time = now, s.time+dt
	}
	return worst, newRate
}

// run goes to an end time, or until done says so, in steps as long as the tolerance allows.
func (s *specimen) run(end float64, dt float64, done func() bool) (steps int) {
	var rate tensor.Sym
	for s.time < end && !done() {
		left := end - s.time
		try := math.Min(dt, left)
		worst, next := s.advance(try, rate)
		factor := 0.3
		if worst < math.Inf(1) {
			factor = math.Min(2, math.Max(0.3, 0.8*math.Pow(worst, -1.0/columns)))
		}
		if worst <= 1 {
			steps++
			rate = next
			if try == left {
				s.time = end
			}
		}
		dt = try * factor
		require.Positive(s.t, dt)
		require.Less(s.t, steps, 5000)
	}
	return steps
}

// load makes the elastic strain of the stress.
func newSpecimen(t *testing.T, law creeplaw.Law, stress tensor.Sym) *specimen {
	t.Helper()
	s := &specimen{t: t, m: material(t, law), stress: stress, tolerance: 1e-8}
	var c tensor.Tangent
	c.SetIsotropic(young/(3*(1-2*poisson)), shear)
	s.strain = solveTangent(t, &c, stress)
	return s
}

func tension(stress float64) tensor.Sym { return tensor.Sym{tensor.XX: stress} }

// textbookDamage is the set of published-values 1.15: A = 1e-15, n = 5, B = 1e-13, χ = 4.5, φ = 6 in MPa and h.
func textbookDamage(t testing.TB) creeplaw.KachanovRabotnov {
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-13, DamageStressExponent: 4.5, DamageExponent: 6})
	require.NoError(t, err)
	return law
}

// TestRuptureAtConstantStress: time and strain at rupture against the closed forms of Kachanov (1958) and Rabotnov (1969),
// t_r = 1/[(1+φ) B σ^χ] and ε_r = A σⁿ t_r (1+φ)/(1+φ-n).
//
// Tolerance 1e-8. The run ends at ω = 1 - 1e-5, where (1-ω)^(1+φ) = 1e-35 of the life and (1-ω)^(1+φ-n) = 1e-10 of the strain
// are left; the error of each step is below 1e-8 of what the step adds.
func TestRuptureAtConstantStress(t *testing.T) {
	const a, n, b, chi, phi = 1e-15, 5, 1e-13, 4.5, 6
	for _, stress := range []float64{100, 120, 60} {
		s := newSpecimen(t, textbookDamage(t), tension(stress))
		life := 1 / ((1 + phi) * b * math.Pow(stress, chi))
		strain := a * math.Pow(stress, n) * life * (1 + phi) / (1 + phi - n)
		steps := s.run(math.Inf(1), life/1000, func() bool { return s.state.Internal[0] > 1-1e-5 })
		check.Rel(t, "life", s.time, life, 1e-8)
		check.Rel(t, "strain at rupture", s.state.Creep[tensor.XX], strain, 1e-8)
		t.Logf("σ %g: life %.10g (off by %.1e), strain %.10g (off by %.1e), %d steps, at most %d iterations on the tangent", stress,
			s.time, s.time/life-1, s.state.Creep[tensor.XX], s.state.Creep[tensor.XX]/strain-1, steps, s.newton)
	}
}

// TestDamageOnTheWay: ω, ε and the creep rate at fractions of the life, published-values 1.15 (derived and checked there).
func TestDamageOnTheWay(t *testing.T) {
	const life = 10000. / 7
	law := textbookDamage(t)
	for part, want := range map[float64][3]float64{
		0.1:  {0.01493879456, 0.001482721077, 1.078161754e-5},
		0.5:  {0.09427633574, 0.008983232200, 1.640670712e-5},
		0.9:  {0.2803143270, 0.02410262660, 5.179474679e-5},
		0.99: {0.4820525321, 0.03658652102, 2.682695795e-4},
	} {
		s := newSpecimen(t, law, tension(100))
		s.run(part*life, life/1000, func() bool { return false })
		check.Rel(t, "damage", s.state.Internal[0], want[0], 1e-8)
		check.Rel(t, "strain", s.state.Creep[tensor.XX], want[1], 1e-8)
		e := law.Evolve(creeplaw.InTension(creeplaw.Point{Stress: 100, Temperature: 800}, s.state.Internal))
		check.Rel(t, "rate", math.Exp(e.LogRate), want[2], 1e-7) // n/(1-ω) times the error of ω
	}
}

// TestLifeFractionsAddUp: 100 MPa for 0.4 of its life, then 120 MPa. The law obeys the life-fraction sum of Robinson (1938)
// exactly; published-values 1.15 gives 948.7727055 h in all (derived and checked there).
func TestLifeFractionsAddUp(t *testing.T) {
	s := newSpecimen(t, textbookDamage(t), tension(100))
	const life = 10000. / 7
	s.run(0.4*life, life/1000, func() bool { return false })
	high := newSpecimen(t, textbookDamage(t), tension(120))
	s.stress = high.stress
	s.strain = high.strain.Add(s.state.Creep)
	s.run(math.Inf(1), life/1000, func() bool { return s.state.Internal[0] > 1-1e-5 })
	check.Rel(t, "life", s.time, 948.7727055, 1e-9) // its ten digits
}

// TestLiuMurakamiDamage: ω(t) at constant stress, published-values 1.15 (derived and checked): M = 1e-12, χ = 4.5, q = 7,
// 100 MPa, a life of 1000 h.
func TestLiuMurakamiDamage(t *testing.T) {
	law, err := creeplaw.NewLiuMurakami(creeplaw.LiuMurakamiParameters{Prefactor: 1e-15, StressExponent: 5, DamagePrefactor: 1e-12,
		DamageStressExponent: 4.5, DamageExponent: 7})
	require.NoError(t, err)
	for time, want := range map[float64]float64{100: 0.01503702865, 500: 0.09889081630, 900: 0.3277730927} {
		s := newSpecimen(t, law, tension(100))
		s.run(time, 1, func() bool { return false })
		check.Rel(t, "damage", s.state.Internal[0], want, 1e-9)
	}
	s := newSpecimen(t, law, tension(100))
	s.run(math.Inf(1), 1, func() bool { return s.state.Internal[0] > 1-1e-5 })
	left := (math.Exp(-7*s.state.Internal[0]) - math.Exp(-7)) / -math.Expm1(-7) // of the life, by the closed form
	check.Rel(t, "life", s.time+left*1000, 1000, 1e-8)
}

// TestOmegaAtConstantStress: strain and life of the Omega method (Prager 1995), published-values 1.20: ε̇₀ = 1e-6, Ω = 50.
func TestOmegaAtConstantStress(t *testing.T) {
	initial, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	law, err := creeplaw.NewOmega(initial, 50)
	require.NoError(t, err)
	for part, want := range map[float64]float64{0.5: 0.01386294361, 0.9: 0.04605170186} {
		s := newSpecimen(t, law, tension(100))
		s.run(part*20000, 20, func() bool { return false })
		check.Rel(t, "strain", s.state.Creep[tensor.XX], want, 1e-9)
	}
	// The rate grows as 1/(life left): at Ω p = 23 a part of e^-23 = 1e-10 of the life is left.
	s := newSpecimen(t, law, tension(100))
	s.run(math.Inf(1), 20, func() bool { return 50*s.state.Equivalent > 23 })
	check.Rel(t, "life", s.time, 20000, 1e-8)
}

// TestDamageConvergesAtFirstOrder: plain steps, without extrapolation, up to half the life: the error halves with the step.
func TestDamageConvergesAtFirstOrder(t *testing.T) {
	const life = 10000. / 7
	want := 1 - math.Pow(0.5, 1./7)
	last := 0.0
	for k := range 6 {
		n := 64 << k
		s := newSpecimen(t, textbookDamage(t), tension(100))
		var rate tensor.Sym
		for range n {
			require.NoError(t, s.substep(&s.strain, &rate, &s.state, 0.5*life/float64(n)))
		}
		e := math.Abs(s.state.Internal[0] - want)
		if k > 1 {
			order := math.Log2(last / e)
			check.Abs(t, "observed order", order, 1, 0.02)
		}
		last = e
	}
}

// TestHayhurstStressDrivesDamage: the life under torsion, tension and equal biaxial tension with σr = α σ1 + 3β σm + (1-α-β) σ.
// By hand, with α = 0.3, β = 0.1 and stresses of 100: torsion σ = 100√3, σ1 = 100, σm = 0: σr = 30 + 60√3; tension: 100; equal
// biaxial tension: σ = 100, σ1 = 100, σm = 200/3: σr = 110.
func TestHayhurstStressDrivesDamage(t *testing.T) {
	law, err := creeplaw.NewKachanovRabotnov(creeplaw.KachanovRabotnovParameters{Prefactor: 1e-15, StressExponent: 5,
		DamagePrefactor: 1e-12, DamageStressExponent: 4.5, DamageExponent: 6,
		RuptureStress: creeplaw.RuptureStress{Principal: 0.3, Mean: 0.1}})
	require.NoError(t, err)
	for name, c := range map[string]struct {
		stress  tensor.Sym
		rupture float64
	}{
		"torsion":       {tensor.Sym{tensor.XY: 100}, 30 + 60*math.Sqrt(3)},
		"tension":       {tension(100), 100},
		"equal biaxial": {tensor.Sym{tensor.XX: 100, tensor.ZZ: 100}, 110},
	} {
		s := newSpecimen(t, law, c.stress)
		life := 1 / (7 * 1e-12 * math.Pow(c.rupture, 4.5))
		s.run(math.Inf(1), life/1000, func() bool { return s.state.Internal[0] > 1-1e-4 })
		check.Rel(t, name, s.time, life, 1e-8)
	}
}

// TestAnandSaturates: under a constant strain rate of 1e-3 /s at 298.15 K the stress goes to σ* = (ŝ/ξ) Zⁿ asinh(Z^m), computed
// for the sets of published-values 3.3 (from memory; the arithmetic checked there to the digits printed).
func TestAnandSaturates(t *testing.T) {
	for name, c := range map[string]struct {
		p    creeplaw.AnandParameters
		want float64
	}{
		"62Sn36Pb2Ag, Wang": {creeplaw.AnandParameters{InitialResistance: 42.32, ActivationEnergy: 11262, Prefactor: 2.30e7, StressMultiplier: 11,
			RateSensitivity: 0.303, Hardening: 4121.31, SaturationCoefficient: 80.79, SaturationExponent: 0.0212, HardeningExponent: 1.38}, 48.426568},
		"60Sn40Pb, Wang": {creeplaw.AnandParameters{InitialResistance: 56.33, ActivationEnergy: 10830, Prefactor: 1.49e7, StressMultiplier: 11,
			RateSensitivity: 0.303, Hardening: 2640.75, SaturationCoefficient: 80.42, SaturationExponent: 0.0231, HardeningExponent: 1.34}, 45.321491},
		"62Sn36Pb2Ag, Darveaux": {creeplaw.AnandParameters{InitialResistance: 12.41, ActivationEnergy: 9400, Prefactor: 4e6, StressMultiplier: 1.5,
			RateSensitivity: 0.303, Hardening: 1378.95, SaturationCoefficient: 13.79, SaturationExponent: 0.07, HardeningExponent: 1.3}, 63.057605},
		"Sn3Ag0.5Cu, Reinikainen": {creeplaw.AnandParameters{InitialResistance: 1.3, ActivationEnergy: 9000, Prefactor: 500, StressMultiplier: 7.1,
			RateSensitivity: 0.3, Hardening: 5900, SaturationCoefficient: 39.4, SaturationExponent: 0.03, HardeningExponent: 1.4}, 53.815389},
	} {
		c.p.ActivationEnergy *= creeplaw.GasConstant
		law, err := creeplaw.NewAnand(c.p)
		require.NoError(t, err)
		m, err := integrate.New(integrate.NewIsotropic(30e3, 0.35), law, integrate.Options{})
		require.NoError(t, err)
		direction := tensor.Sym{1, -0.5, -0.5}
		var out integrate.Result
		// Saturation is reached as a power of the strain, -1/(a-1): sets with a > 1.5 never come near, package creeplaw tests them.
		for i := range 60_000 {
			inc := integrate.Increment{Dt: 1, Strain: direction.Scale(1e-3 * float64(i+1)), Temperature: 298.15}
			require.NoError(t, m.Step(&out, &out.State, inc), name)
		}
		check.Rel(t, name, out.Stress.Mises(), c.want, 1e-7) // its eight digits
	}
}
