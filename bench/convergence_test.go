package bench_test

import (
	"fmt"
	"testing"

	"example.com/holdtime/bench"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// The studies hold the library against the closed forms of this package: backward Euler must be of first order, 1.00 ± 0.02
// over four halvings, and the extrapolated result of the finest steps must meet the closed form to 1e-10 of the stress at the
// start. Run with -v to see the tables.

// orders is the first-order requirement on smooth solutions, from the step size where it starts to show.
const (
	orders = 0.02
	limit  = 1e-10
)

func stressOnly(out integrate.Result, _ tensor.Sym) []float64 { return slice(out.Stress) }

// TestSolidRelaxationConverges holds fixed 3-D strain states, the full stress tensor compared.
func TestSolidRelaxationConverges(t *testing.T) {
	const young, poisson, hours = 150e3, 0.3, 100
	for _, c := range []struct {
		name   string
		stress tensor.Sym
	}{
		{"uniaxial stress at the start", tensor.Sym{tensor.XX: 200}},
		{"shear", tensor.Sym{tensor.XY: 110}},
		{"equal biaxial", tensor.Sym{tensor.XX: 200, tensor.YY: 200}},
		{"opposite biaxial", tensor.Sym{tensor.YY: 110, tensor.ZZ: -110}},
		{"general", generalStress},
	} {
		t.Run(c.name, func(t *testing.T) {
			p := valid(t, bench.SolidRelaxation{Young: young, Poisson: poisson, Stress: c.stress, Law: norton(1e-16, 5)})
			h := &host{material: nortonMaterial(t, young, poisson, 1e-16, 5), load: fixed(loading{strain: p.Strain()})}
			want := expectation{slice(p.StressAt(hours)), c.stress.Mises(), 128, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return uniform(hours, n) }, stressOnly)
		})
	}
}

// TestSolidRelaxationConvergesForEveryExponent is the general state with other stress exponents.
func TestSolidRelaxationConvergesForEveryExponent(t *testing.T) {
	const young, poisson, hours = 150e3, 0.3, 100
	for _, c := range []struct {
		exponent float64
		first    int // a greater exponent relaxes faster at first and shows its order later
	}{{1, 128}, {3, 128}, {12, 128}, {50, 256}} {
		t.Run(fmt.Sprintf("n = %g", c.exponent), func(t *testing.T) {
			p := valid(t, bench.SolidRelaxation{Young: young, Poisson: poisson, Stress: generalStress,
				Law: bench.Norton{Rate: 1e-5, Stress: 190, Exponent: c.exponent}})
			law, err := creeplaw.NewNortonAt(1e-5, 190, c.exponent)
			h := &host{material: material(t, young, poisson, law, err), load: fixed(loading{strain: p.Strain()})}
			want := expectation{slice(p.StressAt(hours)), generalStress.Mises(), c.first, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return uniform(hours, n) }, stressOnly)
		})
	}
}

var sides = []int{tensor.YY, tensor.ZZ} // of a bar along x, free of stress

// TestBarRelaxationConverges holds a bar at fixed length, its lateral strains found by the host: it relaxes with E where the
// fully held point relaxes with 3G. n = 1 is Maxwell's bar; the hyperbolic sine has a closed form for its own exponent 1.
func TestBarRelaxationConverges(t *testing.T) {
	const young, stress, hours = 150e3, 200.0, 100
	held := loading{strain: tensor.Sym{tensor.XX: stress / young}}
	sinh, err := creeplaw.NewGarofalo(1e-9, 0.05, 1)
	for _, c := range []struct {
		name     string
		material *integrate.Material
		exact    float64
	}{
		{"Norton", nortonMaterial(t, young, 0.3, 1e-16, 5),
			bench.BarRelaxation{Young: young, Stress: stress, Law: norton(1e-16, 5)}.StressAt(hours)},
		{"Maxwell", nortonMaterial(t, young, 0.3, 1e-7, 1),
			bench.BarRelaxation{Young: young, Stress: stress, Law: norton(1e-7, 1)}.StressAt(hours)},
		{"hyperbolic sine", material(t, young, 0.3, sinh, err),
			bench.SinhRelaxation{Young: young, Stress: stress, Prefactor: 1e-9, Coefficient: 0.05}.StressAt(hours)},
	} {
		t.Run(c.name, func(t *testing.T) {
			h := &host{material: c.material, free: sides, load: fixed(held)}
			want := expectation{[]float64{c.exact, 0, 0, 0, 0, 0}, stress, 128, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return uniform(hours, n) }, stressOnly)
		})
	}
}

// TestFollowUpConverges puts the bar in series with an elastic joint of a third of its stiffness, Z = 4.
func TestFollowUpConverges(t *testing.T) {
	const young, stress, hours = 150e3, 200.0, 1000
	const joint = young / 3
	p := valid(t, bench.FollowUpRelaxation{Young: young, Stress: stress, FollowUp: bench.SeriesFollowUp(young, joint),
		Law: norton(1e-16, 5)})
	h := &host{
		material: nortonMaterial(t, young, 0.3, 1e-16, 5),
		free:     []int{tensor.XX, tensor.YY, tensor.ZZ},
		spring:   tensor.Sym{tensor.XX: joint},
		load:     fixed(loading{anchor: tensor.Sym{tensor.XX: stress/young + stress/joint}}),
	}
	// The strain of the bar, which grows, is compared as the stress it would be without creep.
	want := expectation{[]float64{p.StressAt(hours), young * p.StrainAt(hours)}, stress, 256, 4, orders, limit}
	study(t, h, want, func(n int) []float64 { return uniform(hours, n) },
		func(out integrate.Result, strain tensor.Sym) []float64 {
			return []float64{out.Stress[tensor.XX], young * strain[tensor.XX]}
		})
}

// TestPlaneStressConverges holds the in-plane strains of a sheet; the host finds the thickness.
func TestPlaneStressConverges(t *testing.T) {
	const young, poisson, hours = 200e3, 0.3, 1
	law := norton(3.125e-14, 5)
	equal := valid(t, bench.EqualBiaxialRelaxation{Young: young, Poisson: poisson, Stress: 200, Law: law})
	opposite := valid(t, bench.OppositeBiaxialRelaxation{Young: young, Poisson: poisson, Stress: 100, Law: law})
	e, o := equal.StressAt(hours), opposite.StressAt(hours)
	for _, c := range []struct {
		name  string
		hold  tensor.Sym
		exact tensor.Sym
		scale float64
	}{
		{"equal", tensor.Sym{equal.Strain(), equal.Strain()}, tensor.Sym{e, e}, 200},
		{"opposite", tensor.Sym{opposite.Strain(), -opposite.Strain()}, tensor.Sym{o, -o}, 100},
	} {
		t.Run(c.name, func(t *testing.T) {
			h := &host{material: nortonMaterial(t, young, poisson, 3.125e-14, 5), free: []int{tensor.ZZ},
				load: fixed(loading{strain: c.hold})}
			want := expectation{slice(c.exact), c.scale, 512, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return uniform(hours, n) }, stressOnly)
		})
	}
}

// TestConstantRateConverges draws a bar at constant strain rate from zero stress.
func TestConstantRateConverges(t *testing.T) {
	const young, rate, hours = 150e3, 1e-6, 500
	for _, c := range []struct{ prefactor, exponent float64 }{{1e-8, 1}, {1e-10, 2}, {1e-15, 5}} {
		t.Run(fmt.Sprintf("n = %g", c.exponent), func(t *testing.T) {
			p := valid(t, bench.ConstantRateTension{Young: young, StrainRate: rate, Law: norton(c.prefactor, c.exponent)})
			h := &host{material: nortonMaterial(t, young, 0.3, c.prefactor, c.exponent), free: sides,
				load: func(t float64) loading { return loading{strain: tensor.Sym{tensor.XX: rate * t}} }}
			want := expectation{[]float64{p.StressAt(hours), 0, 0, 0, 0, 0}, p.Saturation(), 128, 4, orders, limit}
			study(t, h, want, func(n int) []float64 { return uniform(hours, n) }, stressOnly)
		})
	}
}
