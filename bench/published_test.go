package bench_test

import (
	"math"
	"testing"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
)

// The values in the published_*_test.go files are worked instances of the formulas, printed to 10 significant digits with
// trailing zeros left out. Status of all of them: DERIVED+CHECKED, that is, each formula was re-derived and each instance
// computed at 30 digits and by an unlike route (ODE integration or quadrature) outside this project's code; which book
// prints which formula is from memory. Sources are named at the types of package bench.

// published compares with a value of 10 printed digits: half a unit of the tenth, and the rounding of got.
func published(t *testing.T, label string, got, want float64) {
	t.Helper()
	unit := math.Pow(10, math.Floor(math.Log10(math.Abs(want)))-9)
	check.Abs(t, label, got, want, 0.5*unit+1e-14*math.Abs(want))
}

// Three printed values do not have ten correctly rounded digits; a computation at 40 digits (mpmath) says what they should
// be, and the tests compare with that as well as with what is printed, to its last digit.
const (
	strainHardening1000 = 115.15194855730415 // printed 115.1519485
	generalXX1000       = 86.591529245584407 // printed 86.59152924
	constantRate500     = 59.788647687960815 // printed 59.7886477
)

// publishedZero compares with a printed zero, on the scale of the problem.
func publishedZero(t *testing.T, label string, got, scale float64) {
	t.Helper()
	check.Abs(t, label, got, 0, 1e-14*scale)
}

// publishedOf is published for values that may be zero.
func publishedOf(t *testing.T, label string, got, want, scale float64) {
	t.Helper()
	if want == 0 {
		publishedZero(t, label, got, scale)
		return
	}
	published(t, label, got, want)
}

// problem is what every problem of the package can do.
type problem interface{ Check() error }

func valid[P problem](t *testing.T, p P) P {
	t.Helper()
	if err := p.Check(); err != nil {
		t.Fatal(err)
	}
	return p
}

func norton(prefactor, exponent float64) bench.Norton {
	return bench.Norton{Rate: prefactor, Stress: 1, Exponent: exponent}
}

func bailey(prefactor, n, m float64) bench.BaileyNorton {
	return bench.BaileyNorton{Strain: prefactor, Stress: 1, Time: 1, StressExponent: n, TimeExponent: m}
}

type at struct{ time, value float64 }

func TestBarRelaxationPublished(t *testing.T) {
	b := valid(t, bench.BarRelaxation{Young: 150e3, Stress: 200, Law: norton(1e-16, 5)})
	for _, row := range []at{{1, 195.4687596}, {10, 169.0308509}, {100, 110.8417897}, {1000, 63.72899388}, {10000, 35.92106041}} {
		published(t, "n = 5", b.StressAt(row.time), row.value)
		published(t, "n = 5, time", b.StressAt(b.TimeTo(row.value)), row.value)
	}
	check.Rel(t, "half-life", b.HalfLife(), 156.25, 1e-14) // exact

	maxwell := valid(t, bench.BarRelaxation{Young: 150e3, Stress: 200, Law: norton(1e-8, 1)})
	published(t, "Maxwell", maxwell.StressAt(500), 94.47331055)

	uniaxial := valid(t, bench.BarRelaxation{Young: 200e3, Stress: 200, Law: norton(3.125e-14, 5)})
	for _, row := range []at{{0.01, 183.8645430}, {0.1, 133.7480610}, {1, 79.03765226}, {10, 44.69345229}, {100, 25.14709705},
		{1000, 14.14204724}} {
		published(t, "uniaxial displacement", uniaxial.StressAt(row.time), row.value)
	}
}

func TestSinhRelaxationPublished(t *testing.T) {
	b := valid(t, bench.SinhRelaxation{Young: 150e3, Stress: 200, Prefactor: 1e-9, Coefficient: 0.05})
	for _, row := range []at{{10, 187.9575269}, {100, 155.4860829}, {1000, 111.4794058}} {
		published(t, "sinh", b.StressAt(row.time), row.value)
		published(t, "sinh, time", b.StressAt(b.TimeTo(row.value)), row.value)
	}
}

func TestHardeningRelaxationPublished(t *testing.T) {
	strain := valid(t, bench.StrainHardeningRelaxation{Young: 150e3, Stress: 200, Curve: bailey(1e-15, 5, 0.4)})
	clock := valid(t, bench.TimeHardeningRelaxation(strain))
	for _, row := range []struct{ time, clock, strain float64 }{{1, 169.0308509, 172.3586887}, {100, 122.7077620, 134.7553414},
		{1000, 99.66689468, strainHardening1000}} {
		published(t, "time hardening", clock.StressAt(row.time), row.clock)
		published(t, "strain hardening", strain.StressAt(row.time), row.strain)
		published(t, "strain hardening, time", strain.StressAt(strain.TimeTo(row.strain)), row.strain)
	}
	check.Abs(t, "strain hardening as printed", strain.StressAt(1000), 115.1519485, 1e-7)

	strain = valid(t, bench.StrainHardeningRelaxation{Young: 200e3, Stress: 200, Curve: bailey(1.5625e-14, 5, 0.5)})
	clock = bench.TimeHardeningRelaxation(strain)
	for _, row := range []struct{ time, clock, strain float64 }{{1, 93.42759555, 106.8633108}, {10, 70.64301516, 85.21658560},
		{100, 53.11668724, 67.29006893}, {1000, 39.86584394, 52.81765309}} {
		published(t, "primary displacement, time hardening", clock.StressAt(row.time), row.clock)
		published(t, "primary displacement, strain hardening", strain.StressAt(row.time), row.strain)
	}
}

func TestFollowUpPublished(t *testing.T) {
	law := norton(1e-16, 5)
	z3 := valid(t, bench.FollowUpRelaxation{Young: 150e3, Stress: 200, FollowUp: 3, Law: law})
	published(t, "Z = 3, 100 h", z3.StressAt(100), 139.7068411)
	published(t, "Z = 3, 1000 h", z3.StressAt(1000), 83.44522897)

	bolt := valid(t, bench.FollowUpRelaxation{Young: 150e3, Stress: 200, FollowUp: bench.SeriesFollowUp(0.25, 1), Law: law})
	check.Rel(t, "Z in series", bolt.FollowUp, 1.25, 0)
	published(t, "bolt and joint", bolt.StressAt(1000), 67.34185827)

	beside := valid(t, bench.FollowUpRelaxation{Young: 150e3, Stress: 200, FollowUp: bench.ParallelFollowUp(1, 1), Law: law})
	check.Rel(t, "Z in parallel", beside.FollowUp, 2, 0)
	published(t, "bar beside an elastic bar", beside.StressAt(1000), 75.59289460)
}

func TestSolidRelaxationPublished(t *testing.T) {
	law := norton(1e-16, 5)
	tension := valid(t, bench.SolidRelaxation{Young: 150e3, Poisson: 0.3, Stress: tensor.Sym{tensor.XX: 200}, Law: law})
	published(t, "σe(100)", tension.MisesAt(100), 107.2854731)
	published(t, "σe(1000)", tension.MisesAt(1000), 61.51052449)

	general := valid(t, bench.SolidRelaxation{Young: 150e3, Poisson: 0.3, Stress: generalStress, Law: law})
	published(t, "p", general.Stress.Mean(), 56.66666667)
	published(t, "σe(0)", general.MisesAt(0), 191.7680891)
	published(t, "σe(1000)", general.MisesAt(1000), 61.48536122)
	publishedTensor(t, "σ(1000)", general.StressAt(1000), tensor.Sym{tensor.XX: generalXX1000, tensor.YY: 32.08552955,
		tensor.ZZ: 51.32294121, tensor.XY: 19.23741166, tensor.YZ: 11.22182347})
	check.Abs(t, "σxx(1000) as printed", general.StressAt(1000)[tensor.XX], 86.59152924, 1e-8)
}

// generalStress is the start of the full-tensor instance: xx 150, yy -20, zz 40, xy 60, yz 35, xz 0.
var generalStress = tensor.Sym{tensor.XX: 150, tensor.YY: -20, tensor.ZZ: 40, tensor.XY: 60, tensor.YZ: 35}

func publishedTensor(t *testing.T, label string, got, want tensor.Sym) {
	t.Helper()
	for i := range want {
		publishedOf(t, label+" "+[6]string{"xx", "yy", "zz", "yz", "xz", "xy"}[i], got[i], want[i], want.Norm())
	}
}

// TestDisplacementClasses holds the two-dimensional and triaxial hold problems.
func TestDisplacementClasses(t *testing.T) {
	law := norton(3.125e-14, 5)
	equal := valid(t, bench.EqualBiaxialRelaxation{Young: 200e3, Poisson: 0.3, Stress: 200, Law: law})
	for _, row := range []at{{1, 85.76536087}, {100, 27.35325490}, {1000, 15.38307675}} {
		published(t, "equal biaxial", equal.StressAt(row.time), row.value)
	}
	opposite := valid(t, bench.OppositeBiaxialRelaxation{Young: 200e3, Poisson: 0.3, Stress: 200, Law: law})
	shear := valid(t, bench.ShearRelaxation{Shear: 200e3 / 2.6, Stress: 200, Law: law})
	for _, row := range []at{{1, 44.27477134}, {100, 14.00924660}, {1000, 7.878020968}} {
		published(t, "equal and opposite", opposite.StressAt(row.time), row.value)
		published(t, "the same as shear", shear.StressAt(row.time), row.value)
	}

	start := stressOf(200e3, 0.3, tensor.Sym{1e-3, -5e-4})
	planeStrain := valid(t, bench.SolidRelaxation{Young: 200e3, Poisson: 0.3, Stress: start, Law: law})
	published(t, "plane strain σe(0)", planeStrain.MisesAt(0), 203.5193316)
	published(t, "plane strain p", start.Mean(), 83.33333333)
	triaxial := valid(t, bench.SolidRelaxation{Young: 200e3, Poisson: 0.3, Stress: tensor.Sym{300, 200, 100}, Law: law})
	check.Slice(t, "triaxial strain", slice(triaxial.Strain()), []float64{1.05e-3, 4e-4, -2.5e-4, 0, 0, 0}, 1e-3, 1e-14)
	for _, row := range []struct {
		hold    bench.SolidRelaxation
		time    float64
		x, y, z float64
	}{
		{planeStrain, 0, 211.5384615, -19.23076923, 57.69230769},
		{planeStrain, 1, 131.4289766, 44.85681873, 73.71420468},
		{planeStrain, 100, 98.61799445, 71.10560444, 80.27640111},
		{planeStrain, 1000, 91.92892066, 76.45686347, 81.61421587},
		{triaxial, 1, 243.8847706, 200, 156.1152294},
		{triaxial, 100, 214.0079822, 200, 185.9920178},
		{triaxial, 1000, 207.8779498, 200, 192.1220502},
	} {
		publishedTensor(t, "3-D hold", row.hold.StressAt(row.time), tensor.Sym{row.x, row.y, row.z})
	}
}

// stressOf is Hooke's law.
func stressOf(young, poisson float64, strain tensor.Sym) tensor.Sym {
	var c tensor.Tangent
	c.SetIsotropic(young/(3*(1-2*poisson)), young/(2*(1+poisson)))
	return c.Contract(strain)
}

func slice(a tensor.Sym) []float64 { return a[:] }

func TestConstantRatePublished(t *testing.T) {
	linear := valid(t, bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: norton(1e-8, 1)})
	published(t, "n = 1", linear.StressAt(500), 52.76334473)
	square := valid(t, bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: norton(1e-10, 2)})
	for _, row := range []at{{100, 14.88850336}, {500, 63.51489524}, {1000, 90.51482536}} {
		published(t, "n = 2", square.StressAt(row.time), row.value)
		published(t, "n = 2, time", square.StressAt(square.TimeTo(row.value)), row.value)
	}
	fifth := valid(t, bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: norton(1e-15, 5)})
	published(t, "n = 5", fifth.StressAt(500), constantRate500)
	check.Abs(t, "n = 5 as printed", fifth.StressAt(500), 59.7886477, 5e-8)
	published(t, "n = 5, limit", fifth.Saturation(), 63.09573445)
}
