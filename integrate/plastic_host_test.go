package integrate_test

import (
	"fmt"
	"log"
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// TestGlobalNewtonWithYielding loads the small structure of TestGlobalNewtonIsQuadratic beyond yield, some of its points perfectly
// plastic, at once and with creep. The first correction of a step may cross the corner of yielding; from there the residuals
// must fall quadratically.
func TestGlobalNewtonWithYielding(t *testing.T) {
	creep := norton(t, 1e-15, 5)
	primary, err := creeplaw.NewBaileyNorton(1e-14, 5, 0.4)
	require.NoError(t, err)
	curves := testCurves(t)
	cells := []cell{
		{material: plastic(t, creep, curves[0].curve, integrate.RemembersCreep), from: 0, to: 1},
		{material: plastic(t, primary, curves[1].curve, integrate.RemembersInelastic), from: 0, to: 1},
		{material: plastic(t, creep, curves[2].curve, integrate.RemembersCreep), from: 1, to: 2},
		{material: plastic(t, primary, curves[3].curve, integrate.RemembersCreep), from: 2, to: 3},
		{material: material(t, creep), from: 2, to: 3},
		{material: plastic(t, creep, curves[1].curve, integrate.RemembersCreep), from: 0, to: 3},
	}
	a := assembly{nodes: 3, cells: cells}
	x := make([]float64, a.unknowns())
	for _, step := range []struct{ dt, load float64 }{{0, 200}, {0, 360}, {1, 370}, {30, 380}, {300, 380}, {0, 340}, {0, 300}, {0, 400}} {
		a.load = step.load
		residuals := a.solve(t, x, step.dt)
		yielding := 0
		for i := range a.cells {
			if a.cells[i].result.PlasticStep > 0 {
				yielding++
			}
			a.cells[i].state = a.cells[i].result.State
		}
		t.Logf("Δt = %3g h, load %g: %d points yield, residuals %.1e", step.dt, step.load, yielding, residuals)
		require.Less(t, residuals[len(residuals)-1], 1e-12, "converged")
		require.LessOrEqual(t, len(residuals), 12)
		quadratic(t, residuals)
	}
	flowed := 0
	for i := range a.cells {
		if a.cells[i].state.EquivalentPlastic > 1e-5 {
			flowed++
		}
	}
	require.GreaterOrEqual(t, flowed, 2)
}

// TestSofteningBesidePlasticityNeverFails takes random steps with a law that softens with strain, hardened first or not, on every
// hardening. A step ends on the solution connected to Δt = 0 or beyond rupture, never otherwise; which of them is judged by the
// equations: a step that is refused must have no solution that shorter steps lead up to.
func TestSofteningBesidePlasticityNeverFails(t *testing.T) {
	count := 10_000
	if *campaign {
		count = 500_000
	}
	s := newSource(81)
	kinds := hardeningKinds()
	var sum yieldTally
	ruptured := 0
	for i := range count {
		base, err := creeplaw.NewNortonAt(1e-6, 100, s.decades(0, 1.3))
		require.NoError(t, err)
		law, err := creeplaw.NewOmega(base, s.decades(0, 4))
		require.NoError(t, err)
		d := drawYielding(s, law, kinds[i%len(kinds)])
		d.old.Equivalent, d.old.EquivalentPlastic = math.Min(d.old.Equivalent, 1e-2), math.Min(d.old.EquivalentPlastic, 1e-2)
		d.inc.Dt = s.decades(-4, 8)
		d.inc.Strain = d.inc.Strain.Scale(math.Min(1, 0.3/d.inc.Strain.EquivalentStrain()))
		m, err := integrate.New(integrate.NewIsotropic(young, poisson), d.law,
			integrate.Options{Plasticity: integrate.Plasticity{Hardening: d.hardening, Memory: d.memory}})
		require.NoError(t, err)
		switch err := m.Step(&d.out, &d.old, d.inc); {
		case err == nil:
			if !d.take(t, "Omega, "+kinds[i%len(kinds)].name, &sum) {
				return
			}
		case err == integrate.BeyondRupture:
			ruptured++
			// Shorter steps exist, up to a longest one, and their creep strains are below those of their neighbours that are longer.
			short, before := d.inc, 0.0
			for short.Dt *= 1e-6; m.Step(&d.out, &d.old, short) == nil; short.Dt *= 1.5 {
				require.GreaterOrEqual(t, d.out.CreepStep, before, "seed %d, case %d", seed, i)
				before = d.out.CreepStep
			}
			require.Less(t, short.Dt, d.inc.Dt*1.5, "seed %d, case %d: refused though longer steps are not: %+v", seed, i, d.inc)
		default:
			t.Fatalf("seed %d, case %d: %v at %+v from %+v with %+v, %+v", seed, i, err, d.inc, d.old, d.law, d.hardening)
		}
	}
	sum.log(t, "softening")
	t.Logf("%d beyond rupture", ruptured)
	require.Greater(t, ruptured, count/20)
	require.Greater(t, sum.yielded, count/5)
}

// TestEstimateWithPlasticity: beside perfect plasticity the stress is known exactly and strain can only be taken from creep for
// plastic strain. The estimate of that must be right, to a tenth, where the exact creep strain is known: with strain hardening
// ṗ = A σⁿ p^-m at σy, p^(1+m) = p₀^(1+m) + (1+m) A σyⁿ Δt.
func TestEstimateWithPlasticity(t *testing.T) {
	const yield, a, n, m, p0, dt = 150.0, 1e-19, 5, 0.8, 1e-3, 30.0
	law, err := creeplaw.NewStrainHardening(a, n, -m)
	require.NoError(t, err)
	mat := plastic(t, law, integrate.LinearHardening{Yield: integrate.Constant(yield)}, integrate.RemembersCreep)
	direction := shearOf(1)
	direction = direction.Scale(1 / direction.EquivalentStrain())
	old := integrate.State{Creep: direction.Scale(p0), Equivalent: p0}
	strain := func(e float64) tensor.Sym { return direction.Scale(p0 + yield/(3*shear) + e) }
	var out integrate.Result
	e, err := mat.EstimateStep(&out, &old, integrate.Conditions{Strain: strain(0), Temperature: 800},
		integrate.Increment{Dt: dt, Strain: strain(2e-3), Temperature: 800}, 1e-3)
	require.NoError(t, err)
	exact := math.Pow(math.Pow(p0, 1+m)+(1+m)*a*math.Pow(yield, n)*dt, 1/(1+m)) - p0
	off := math.Abs(out.CreepStep - exact)
	t.Logf("creep strain %.4e, exact %.4e, error %.1e, thought %.1e", out.CreepStep, exact, off, e.Creep)
	require.LessOrEqual(t, math.Abs(e.Creep-off), 0.1*off)
	require.GreaterOrEqual(t, e.Relative, e.Creep*3*shear/(yield+3*shear*2e-3)*(1-1e-12))
	require.LessOrEqual(t, e.Stress.Mises(), 1e-12*yield)
}

// A point is loaded beyond yield at once and held: plastic strain and creep strain are kept apart.
func ExamplePlasticity() {
	law, err := creeplaw.NewNorton(1e-16, 5) // MPa, h; invented
	if err != nil {
		log.Fatal(err)
	}
	mat, err := integrate.New(integrate.NewIsotropic(160e3, 0.3), law, integrate.Options{
		Plasticity: integrate.Plasticity{Hardening: integrate.LinearHardening{
			Yield: integrate.Constant(150), Modulus: integrate.Constant(4000)}},
	})
	if err != nil {
		log.Fatal(err)
	}
	strain := tensor.Sym{2e-3, -1e-3, -1e-3}
	var out integrate.Result
	for _, dt := range []float64{0, 10, 90} {
		if err := mat.Step(&out, &out.State, integrate.Increment{Dt: dt, Strain: strain, Temperature: 823}); err != nil {
			log.Fatal(err)
		}
		fmt.Printf("after %2.0f h more: %.0f MPa, plastic strain %.2f %%, creep strain %.2f %%\n", dt, out.Stress.Mises(),
			100*out.State.EquivalentPlastic, 100*out.State.Equivalent)
	}
	// Output:
	// after  0 h more: 155 MPa, plastic strain 0.12 %, creep strain 0.00 %
	// after 10 h more: 143 MPa, plastic strain 0.12 %, creep strain 0.01 %
	// after 90 h more: 113 MPa, plastic strain 0.12 %, creep strain 0.02 %
}

// A yield stress measured at two temperatures, given at a few plastic strains.
func ExampleNewTabulatedHardening() {
	var yields []integrate.Table
	for _, row := range [][]float64{{180, 120}, {210, 140}, {240, 150}} { // MPa at 700 K and 900 K; invented
		yield, err := integrate.NewTable([]float64{700, 900}, row)
		if err != nil {
			log.Fatal(err)
		}
		yields = append(yields, yield)
	}
	curve, err := integrate.NewTabulatedHardening([]float64{0, 0.005, 0.02}, yields)
	if err != nil {
		log.Fatal(err)
	}
	yield, slope, byTemperature := curve.YieldStress(0.01, 800)
	fmt.Printf("%.1f MPa, rising by %.0f MPa and falling by %.2f MPa/K\n", yield, slope, -byTemperature)

	yields[2] = integrate.Constant(139)
	_, err = integrate.NewTabulatedHardening([]float64{0, 0.005, 0.02}, yields)
	fmt.Println(err)
	// Output:
	// 181.7 MPa, rising by 1333 MPa and falling by 0.38 MPa/K
	// integrate: yield stress at plastic strain 0.02 is 139 at 700 K, must be at least that at the strain before, 210: softening has no unique solution
}
