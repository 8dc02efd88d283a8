package bench_test

import (
	"math"
	"testing"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
)

// TestSteadyFlowPublished holds the creep rates of a point under given principal stresses.
func TestSteadyFlowPublished(t *testing.T) {
	slow, fast := norton(1e-15, 5), norton(3.125e-14, 5)
	for _, row := range []struct {
		law             bench.Norton
		stress          tensor.Sym
		mises           float64
		one, two, three float64
		equivalent      float64 // 0 where none is printed
	}{
		{slow, tensor.Sym{300, 200, 100}, 173.2050808, 1.35e-4, 0, -1.35e-4, 1.558845727e-4},
		{slow, tensor.Sym{250, -50, 80}, 260.5762844, 1.083446350e-3, -9.9123815e-4, -9.22082e-5, 1.201363507e-3},
		{slow, tensor.Sym{100, 100, 0}, 100, 5e-6, 5e-6, -1e-5, 1e-5},
		{slow, tensor.Sym{100, -100, 0}, 173.2050808, 1.35e-4, -1.35e-4, 0, 1.558845727e-4},
		{slow, tensor.Sym{100, 50, 0}, 86.60254038, 4.21875e-6, 0, -4.21875e-6, 4.871392896e-6},
		{fast, tensor.Sym{200, 0, 0}, 200, 0.01, -0.005, -0.005, 0},
		{fast, tensor.Sym{200, 200, 0}, 200, 0.005, 0.005, -0.01, 0},
		{fast, tensor.Sym{200, -200, 0}, 346.4101615, 0.135, -0.135, 0, 0},
		{fast, tensor.Sym{200, 100, 0}, 173.2050808, 0.00421875, 0, -0.00421875, 0},
		{fast, tensor.Sym{300, 200, 100}, 173.2050808, 0.00421875, 0, -0.00421875, 0},
	} {
		flow := valid(t, bench.SteadyFlow{Stress: row.stress, Law: row.law})
		published(t, "σe", flow.Stress.Mises(), row.mises)
		publishedTensor(t, "rates", flow.Rate(), tensor.Sym{row.one, row.two, row.three})
		if row.equivalent != 0 {
			published(t, "equivalent rate", flow.EquivalentRate(), row.equivalent)
		}
	}

	shear := bench.SteadyFlow{Stress: tensor.Sym{tensor.XY: 100}, Law: slow}
	published(t, "engineering shear rate", 2*shear.Rate()[tensor.XY], 2.7e-4)
	planeStrain := bench.SteadyFlow{Stress: tensor.Sym{100, 0, 50}, Law: slow} // the third stress that stops the third rate
	published(t, "plane-strain tension", planeStrain.Rate()[tensor.XX], 4.21875e-6)
	publishedZero(t, "plane-strain tension, out of plane", planeStrain.Rate()[tensor.ZZ], 4.2e-6)
}

func TestConstantStressPublished(t *testing.T) {
	primary := valid(t, bench.BaileyNortonCreep{Stress: 200, Curve: bailey(1.5625e-14, 5, 0.5)})
	published(t, "primary, 100 h", primary.CreepAt(100), 0.05)
	published(t, "primary, 1000 h", primary.CreepAt(1000), 0.1581138830)
	published(t, "primary, time", primary.TimeTo(0.05), 100)

	both := valid(t, bench.PrimarySecondaryCreep{Stress: 200, Primary: primary.Curve, Secondary: norton(3.125e-16, 5)})
	published(t, "primary and secondary", both.CreepAt(1000), 0.2581138830)

	steady := valid(t, bench.NortonCreep{Stress: 200, Law: norton(3.125e-14, 5)})
	published(t, "secondary", steady.CreepAt(1), 0.01)

	// Type 304 at 593 °C, the steady term 6.73e-9 sinh³(0.1479 σ) per hour with σ in ksi (J. M. Corum and others 1974; digits
	// from memory, high): its value at 15 ksi is arithmetic.
	sinh := valid(t, bench.GarofaloCreep{Stress: 15, Law: bench.Garofalo{Prefactor: 6.73e-9, Coefficient: 0.1479, Exponent: 3}})
	check.Rel(t, "hyperbolic sine", sinh.CreepAt(1), 6.3076150e-7, 1e-8) // eight printed digits
}

func TestTwoStepPublished(t *testing.T) {
	for _, row := range []struct {
		problem                           bench.TwoStepCreep
		until                             float64
		change, clock, strain, equivalent float64
	}{
		{bench.TwoStepCreep{First: 100, Change: 100, Second: 150, Curve: bailey(1e-12, 4, 0.4)}, 300,
			6.309573445e-4, 2.393674373e-3, 4.229380980e-3, 1.734152992},
		{bench.TwoStepCreep{First: 150, Change: 100, Second: 100, Curve: bailey(1e-12, 4, 0.4)}, 300,
			3.194221556e-3, 3.542412574e-3, 3.238082964e-3, 5766.503906},
		{bench.TwoStepCreep{First: 200, Change: 100, Second: 250, Curve: bailey(1.5625e-14, 5, 0.5)}, 200,
			0.05, 0.1132039738, 0.1605710571, 10.73741824},
	} {
		p := valid(t, row.problem)
		published(t, "at the change, strain hardening", p.StrainHardeningAt(p.Change), row.change)
		published(t, "at the change, time hardening", p.TimeHardeningAt(p.Change), row.change)
		published(t, "time hardening", p.TimeHardeningAt(row.until), row.clock)
		published(t, "strain hardening", p.StrainHardeningAt(row.until), row.strain)
		published(t, "equivalent time", p.EquivalentTime(), row.equivalent)
	}
}

func TestThickCylinderPublished(t *testing.T) {
	for _, row := range []struct{ n, pressure, r, radial, hoop, axial, mises float64 }{
		{1, 50, 100, -50, 83.33333333, 16.66666667, 115.4700538},
		{1, 50, 150, -12.96296296, 46.29629630, 16.66666667, 51.32002393},
		{1, 50, 200, 0, 33.33333333, 16.66666667, 28.86751346},
		{3, 50, 100, -50, 40.08047946, -4.959760268, 78.01198360},
		{3, 50, 150, -17.99568862, 50.74858326, 16.37644732, 59.53428581},
		{3, 50, 200, 0, 56.74714613, 28.37357307, 49.14447014},
		{5, 50, 100, -50, 32.59625920, -8.701870399, 71.53045873},
		{5, 50, 150, -19.08483974, 51.14535536, 16.03025781, 60.82113307},
		{5, 50, 200, 0, 62.59625920, 31.29812960, 54.20995065},
		{8, 50, 100, -50, 28.56516885, -10.71741558, 68.03943208},
		{8, 50, 150, -19.70590055, 51.28574344, 15.78992144, 61.48056715},
		{8, 50, 200, 0, 66.06516885, 33.03258442, 57.21411453},
		{5, 200, 100, -200, 130.3850368, -34.80748159, 286.1218349},
		{5, 200, 150, -76.33935895, 204.5814214, 64.12103124, 243.2845323},
		{5, 200, 200, 0, 250.3850368, 125.1925184, 216.8398026},
	} {
		v := valid(t, bench.ThickCylinder{Inner: 100, Outer: 200, Pressure: row.pressure, Law: norton(1e-15, row.n)})
		publishedOf(t, "radial", v.RadialAt(row.r), row.radial, row.pressure)
		published(t, "hoop", v.HoopAt(row.r), row.hoop)
		published(t, "axial", v.AxialAt(row.r), row.axial)
		published(t, "Mises", v.MisesAt(row.r), row.mises)
	}
	v := bench.ThickCylinder{Inner: 100, Outer: 200, Pressure: 50, Law: norton(1e-15, 5)}
	published(t, "C", v.VelocityAt(150)*150, 0.01621756632)
	published(t, "bore velocity", v.VelocityAt(100), 1.621756632e-4)
	published(t, "rim velocity", v.VelocityAt(200), 8.108783161e-5)
	published(t, "bore hoop rate", v.VelocityAt(100)/100, 1.621756632e-6)
}

func TestThickSpherePublished(t *testing.T) {
	for _, row := range []struct{ n, r, radial, hoop, mises float64 }{
		{1, 100, -50, 35.71428571, 85.71428571},
		{1, 150, -9.788359788, 15.60846561, 25.39682540},
		{1, 200, 0, 10.71428571, 10.71428571},
		{3, 100, -50, 0, 50},
		{3, 150, -16.66666667, 16.66666667, 33.33333333},
		{3, 200, 0, 25, 25},
		{5, 100, -50, -5.914256058, 44.08574394},
		{5, 150, -18.26600607, 16.29953970, 34.56554576},
		{5, 200, 0, 29.08574394, 29.08574394},
	} {
		v := valid(t, bench.ThickSphere{Inner: 100, Outer: 200, Pressure: 50, Law: norton(1e-15, row.n)})
		publishedOf(t, "radial", v.RadialAt(row.r), row.radial, 50)
		publishedOf(t, "hoop", v.HoopAt(row.r), row.hoop, 50)
		published(t, "Mises", v.MisesAt(row.r), row.mises)
	}
	v := bench.ThickSphere{Inner: 100, Outer: 200, Pressure: 50, Law: norton(1e-15, 5)}
	published(t, "bore velocity", v.VelocityAt(100), 8.326469079e-6)
	published(t, "u' r² is constant", v.VelocityAt(200)*4, 8.326469079e-6)
}

func TestBeamsPublished(t *testing.T) {
	b := valid(t, bench.RectangularBeam{Width: 20, HalfDepth: 20, Moment: 1e6, Law: norton(1e-15, 5)})
	published(t, "I_n", b.CreepInertia(), 13240.46693)
	published(t, "σmax", b.MaxStress(), 137.5)
	published(t, "elastic σmax", b.ElasticMaxStress(), 187.5)
	published(t, "ratio", b.MaxStress()/b.ElasticMaxStress(), 0.7333333333)
	published(t, "σ(10)", b.StressAt(10), 119.7007025)
	published(t, "σ(-10)", b.StressAt(-10), -119.7007025)
	published(t, "curvature rate", b.CurvatureRate(), 2.457443237e-6)
	published(t, "skeletal stress", b.StressAt(b.SkeletalPoint()*b.HalfDepth), 127.2412874)
	for _, row := range []struct{ n, skeletal float64 }{{1, 0.7165313106}, {2, 0.6944444444}, {3, 0.6859355251},
		{5, 0.6786201997}, {10, 0.6728011283}, {100, 0.6672951718}} {
		b.Law.Exponent = row.n
		published(t, "skeletal point", b.SkeletalPoint(), row.skeletal)
	}
	c := valid(t, bench.Cantilever{Width: 20, HalfDepth: 20, Length: 500, Load: 1000, Law: norton(1e-15, 5)})
	published(t, "tip velocity", c.TipVelocity(), 2.742682184e-3)

	s := valid(t, bench.TorsionBar{Radius: 20, Torque: 1e6, Law: norton(1e-15, 5)})
	published(t, "J_n", s.CreepInertia(), 28597.35563)
	published(t, "τmax", s.MaxStress(), 63.66197724)
	published(t, "elastic τmax", s.ElasticMaxStress(), 79.57747155)
	published(t, "ratio", s.MaxStress()/s.ElasticMaxStress(), 0.8)
	published(t, "τ(10)", s.StressAt(10), 55.42097014)
	published(t, "twist rate", s.TwistRate(), 1.411673894e-6)
	published(t, "skeletal point", s.SkeletalPoint(), 0.7565932872)
}

func TestStructuresPublished(t *testing.T) {
	b := valid(t, bench.TwoBars{Length1: 1, Length2: 2, Area1: 1, Area2: 1, Load: 200, Law: norton(1e-15, 5)})
	one, two := b.SteadyStresses()
	published(t, "two bars σ1", one, 106.9203923)
	published(t, "two bars σ2", two, 93.07960772)
	one, two = b.ElasticStresses()
	published(t, "two bars elastic σ1", one, 133.3333333)
	published(t, "two bars elastic σ2", two, 66.66666667)
	published(t, "two bars elongation rate", b.ElongationRate()/b.Length1, 1.397342014e-5)

	truss := valid(t, bench.ThreeBarTruss{Angle: math.Pi / 4, Length: 1000, Area: 1, Load: 300, Law: norton(1e-15, 5)})
	one, two = truss.SteadyStresses()
	published(t, "truss 45° σ1", one, 134.4601444)
	published(t, "truss 45° σ2", two, 117.0543545)
	one, two = truss.ElasticStresses()
	published(t, "truss 45° elastic σ1", one, 175.7359313)
	published(t, "truss 45° elastic σ2", two, 87.86796564)
	published(t, "truss 45° rate", truss.DeflectionRate()/truss.Length, 4.39509095e-5)
	truss.Angle = math.Pi / 6
	one, two = truss.SteadyStresses()
	published(t, "truss 30° σ1", one, 113.8430260)
	published(t, "truss 30° σ2", two, 107.4777791)
}
