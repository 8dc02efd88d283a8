package audit_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/creeplaw/curve"
)

func run(t *testing.T, law creeplaw.Law, d audit.Domain, s audit.Settings) audit.Report {
	t.Helper()
	if s.Units == (creeplaw.Units{}) {
		s.Units = megapascalHour
	}
	report, err := audit.Run(law, d, s)
	require.NoError(t, err)
	return report
}

func number(t *testing.T, f audit.Finding, name string) float64 {
	t.Helper()
	v, ok := f.Number(name)
	require.True(t, ok, "%v has no figure %q among %v", f.Kind, name, f.Numbers)
	return v
}

const firstStep = "the same from virgin material at middle stress and temperature"

// walk is the tolerance on a largest step that was found by a walk in strides of 0.05 and a parabola through the highest three:
// its third-order error, 0.05³ over a few.
const walk = 1e-4

// TestLargestStepOfOmega: backward Euler on ṗ = ε̇₀ e^(Ωp) from p = 0 has Δt = p e^(-Ωp)/ε̇₀, greatest at p = 1/Ω, where it is
// 1/(e Ω ε̇₀); from p₀ the same with ε̇₀ e^(Ωp₀) (elementary). The law: Prager 1995.
func TestLargestStepOfOmega(t *testing.T) {
	const acceleration = 50
	report := run(t, rateOf(omega), domain, audit.Settings{})
	f, ok := report.Find(audit.Softening)
	require.True(t, ok)
	middle := creeplaw.Point{Stress: math.Sqrt(20 * 300), Temperature: math.Sqrt(773 * 923)}
	check.Rel(t, "from virgin material", number(t, f, firstStep), 1/(math.E*acceleration*sound(middle).Value), walk)
	worst := creeplaw.Point{Stress: 300, Temperature: 923}
	want := math.Exp(-acceleration*0.1) / (math.E * acceleration * sound(worst).Value)
	check.Rel(t, "least over the domain", number(t, f, "largest step at fixed stress"), want, walk)
	check.Rel(t, "as measured", report.Measures.LargestStep, want, walk)
	check.Rel(t, "as measured, virgin", report.Measures.LargestFirstStep, number(t, f, firstStep), 0)
	// (∂ṗ/∂p)/(∂ṗ/∂σ) = Ω σ/n, greatest at 300 MPa; read by differences of 1e-4, and lines have their last point there.
	check.Rel(t, "sufficient stiffness", number(t, f, "sufficient stiffness"), acceleration*300.0/5, 1e-4)
	require.True(t, math.IsNaN(report.Measures.LargestStepAtFixedStrain), "without a stiffness it is not known")
}

// TestLargestStepAtFixedStrain: with ṗ = A σ e^(Ωp) and σ = σ₀ - E p, Δt = p/(A (σ₀ - E p) e^(Ωp)) has its first maximum where
// E p² - σ₀ p + σ₀/Ω = 0, if σ₀ > 4E/Ω, and none otherwise (elementary).
func TestLargestStepAtFixedStrain(t *testing.T) {
	const a, accel, stress = 1e-8, 50.0, 100.0
	law := must(creeplaw.NewOmega(must(creeplaw.NewNorton(a, 1)), accel))
	d := audit.Domain{Stress: audit.Range{Low: stress, High: stress}, Strain: audit.Range{Low: 1e-6, High: 1e-5},
		Temperature: isothermalRange}
	soft := 1000.0
	report := run(t, law, d, audit.Settings{Stiffness: soft})
	p := (stress - math.Sqrt(stress*stress-4*soft*stress/accel)) / (2 * soft)
	want := p / (a * (stress - soft*p) * math.Exp(accel*p))
	// The start is 1e-5 of strain at the most, the walk takes the least over the starts: a part 1e-3 less.
	check.Rel(t, "soft surroundings", report.Measures.LargestStepAtFixedStrain, want, 2e-3)

	stiff := 1.01 * accel * stress / 4
	report = run(t, law, d, audit.Settings{Stiffness: stiff})
	require.True(t, math.IsInf(report.Measures.LargestStepAtFixedStrain, 1), "stiff surroundings: %v", report.Measures)
}

// TestLargestStepOfDamage: backward Euler on ω̇ = B σ^χ/(1-ω)^φ from ω = 0 has Δt = ω (1-ω)^φ/(B σ^χ), greatest at
// ω = 1/(1+φ): (φ/(1+φ))^φ/((1+φ) B σ^χ) (elementary). The law: Kachanov 1958, Rabotnov 1969.
func TestLargestStepOfDamage(t *testing.T) {
	report := run(t, damaged(), domain, audit.Settings{})
	const phi = 6.0
	stress, temperature := math.Sqrt(20*300), math.Sqrt(773*923)
	rate := 1e-5 * math.Pow(stress/100, 4) * math.Exp(-activation*(1/temperature-1/reference))
	want := math.Pow(phi/(1+phi), phi) / ((1 + phi) * rate)
	// The branch is followed to a turning point bisected to 1e-9; near one, Newton's method stops at the root of rounding.
	check.Rel(t, "from virgin material", report.Measures.LargestFirstStep, want, 1e-6)
}

// TestMeasures reads exponents and activation energies off laws that have them in closed form.
func TestMeasures(t *testing.T) {
	factor := must(creeplaw.NewArrheniusAt(300e3, reference))
	// Bailey–Norton in strain-hardening form: exponents n/m of stress and (m-1)/m of strain (Finnie, Heller 1959). Slopes are
	// differences of logarithms over an interval of about 0.01: rounding 1e-13 at the most.
	const exact = 1e-11
	bailey := must(creeplaw.NewBaileyNortonAt(1e-3, 100, 1000, 4, 0.4))
	m := run(t, must(creeplaw.WithTemperature(bailey, factor)), domain, audit.Settings{}).Measures
	check.Rel(t, "stress exponent", m.StressExponent.Low, 10, exact)
	check.Rel(t, "stress exponent", m.StressExponent.High, 10, exact)
	check.Rel(t, "strain exponent", m.StrainExponent.Low, -1.5, exact)
	check.Rel(t, "activation energy", m.ActivationEnergy.Low, 300e3, 1e-9) // 1/T differs by 1e-6 over an interval
	check.Rel(t, "activation energy", m.ActivationEnergy.High, 300e3, 1e-9)
	require.True(t, math.IsInf(m.LargestStep, 1))
	require.Zero(t, m.ZeroStressRate)

	// Garofalo: n x coth x; read over the last two per cent, so at about 0.99 of the stress.
	garofalo := must(creeplaw.WithTemperature(must(creeplaw.NewGarofalo(1e-6, 0.02, 3)), factor))
	m = run(t, garofalo, domain, audit.Settings{}).Measures
	check.Rel(t, "exponent at 3000 MPa", m.TenfoldExponent, 3*0.99*60, 0.01)
	check.Rel(t, "exponent at 2 MPa", m.TenthExponent, 3*0.04/math.Tanh(0.04), 0.01)
	n := 3 * 6 / math.Tanh(6)
	excess := 3*(math.Log(math.Sinh(60))-math.Log(math.Sinh(6))) - n*math.Ln10
	check.Rel(t, "decades above the power law", m.TenfoldExcess, excess/math.Ln10, 0.01)
}

// TestUnloadedBench is the fact of the trade that under time hardening a part left unloaded on the bench creeps differently
// afterwards, and under strain hardening it does not (common practice; Finnie, Heller 1959). One curve, ε = A σⁿ tᵐ, both ways.
func TestUnloadedBench(t *testing.T) {
	const a, n, m = 1e-14, 5.0, 0.4
	c := must(curve.NewBaileyNorton(a, n, m))
	d := domain
	d.Temperature = isothermalRange
	d.Time = audit.Range{Low: 1, High: 1e4}

	report, err := audit.RunClocked(must(curve.NewTimeHardened(c)), d, audit.Settings{Units: megapascalHour})
	require.NoError(t, err)
	f, ok := report.Find(audit.ClockDependence)
	require.True(t, ok)
	require.Equal(t, audit.Fault, f.Severity)
	require.Equal(t, 1, report.Count(audit.Fault), "%s", listed(report.Findings))
	hold, wait := 100.0, 1e4
	stress := math.Sqrt(20 * 300)
	strain := func(from, to float64) float64 { return a * math.Pow(stress, n) * (math.Pow(to, m) - math.Pow(from, m)) }
	const rounding = 1e-12 // of the mean rate of the curve
	check.Rel(t, "second hold", number(t, f, "creep strain of the second hold"), strain(hold, 2*hold), rounding)
	check.Rel(t, "second hold after the wait", number(t, f, "the same after an unloaded wait"), strain(hold+wait, 2*hold+wait),
		rounding)

	report = run(t, must(curve.NewStrainHardened(c)), d, audit.Settings{})
	_, ok = report.Find(audit.ClockDependence)
	require.False(t, ok, "%s", listed(report.Findings))
	require.True(t, examined(report, "unloaded wait"))
}

func examined(r audit.Report, name string) bool {
	for _, c := range r.Checks {
		if c.Name == name {
			return c.Examined
		}
	}
	return false
}

// TestZeroStressByForm is the fact of the trade that a hyperbolic sine vanishes at zero stress, and so does Soderberg's form,
// while an exponential of stress, and a saturating-plus-steady curve with exponential stress functions, do not (common
// practice).
func TestZeroStressByForm(t *testing.T) {
	factor := must(creeplaw.NewArrheniusAt(300e3, reference))
	hot := func(law creeplaw.Law) creeplaw.Law { return must(creeplaw.WithTemperature(law, factor)) }
	for name, l := range map[string]struct {
		law    creeplaw.Law
		creeps bool
	}{
		"hyperbolic sine":          {hot(must(creeplaw.NewGarofalo(1e-6, 0.02, 1))), false},
		"Soderberg":                {hot(must(creeplaw.NewSoderberg(1e-9, 40))), false},
		"exponential":              {rawExponential(), true},
		"saturating, exponentials": {saturatingExponential(), true},
	} {
		report := run(t, l.law, domain, audit.Settings{})
		f, found := report.Find(audit.CreepAtZeroStress)
		require.Equal(t, l.creeps, found, name)
		if name == "exponential" {
			// A exp(0) at the highest temperature, the worst.
			check.Rel(t, name, number(t, f, "rate"), 1e-9*math.Exp(-activation*(1/923.0-1/reference)), 1e-12)
		}
	}
}

// TestJumpOfTwoRegimes: a curve of two regimes whose rates do not match jumps at the strain c t_fpᵐ, which moves with stress.
func TestJumpOfTwoRegimes(t *testing.T) {
	const m = 0.45
	c := must(curve.NewTwoRegime(curve.Power{Prefactor: 1e-11, Exponent: 4}, m, curve.InversePower{Prefactor: 1e9, Exponent: 3},
		curve.Power{Prefactor: 1e-21, Exponent: 7}))
	d := domain
	d.Temperature = isothermalRange
	report := run(t, must(curve.NewStrainHardened(c)), d, audit.Settings{})
	found := 0
	for _, f := range report.Findings {
		if f.Kind != audit.RateJump {
			continue
		}
		found++
		require.Equal(t, audit.Fault, f.Severity)
		s := f.At.Stress
		end := 1e9 * math.Pow(s, -3)
		check.Rel(t, "strain of the jump", f.At.Strain, 1e-11*math.Pow(s, 4)*math.Pow(end, m), 1e-9) // neighbouring numbers
		jump := 1e-21 * math.Pow(s, 7) / (m * 1e-11 * math.Pow(s, 4) * math.Pow(end, m-1))
		if f.By == audit.Stress {
			jump = 1 / jump // rising stress takes the point back to primary creep
		}
		check.Rel(t, "factor", number(t, f, "factor"), jump, 1e-6) // the least jump told from a slope
	}
	require.Positive(t, found, "%s", listed(report.Findings))
}
