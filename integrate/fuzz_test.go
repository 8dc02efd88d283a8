package integrate_test

import (
	"math"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// FuzzStep feeds the step anything. It must not panic; it must either return a code and leave the result alone, or return a
// finite stress that obeys the laws of mechanics. With the laws of this module the codes that mean "should never be seen" are
// failures.
func FuzzStep(f *testing.F) {
	f.Add(uint8(0), 5.0, 0.4, 1e-3, -2e-4, 0.0, 1e-4, 0.0, 3e-4, 100.0, 800.0, 1e-4)
	f.Add(uint8(1), 1.0, 1.0, 0.0, 0.0, 0.0, 0.0, 0.0, 1e-3, 1e12, 300.0, 0.0)
	f.Add(uint8(2), 50.0, 0.2, 1e-2, 0.0, -1e-2, 0.0, 1e-9, 0.0, 1e-9, 1500.0, 0.5)
	f.Add(uint8(3), 8.0, 0.5, 1e-3, 1e-3, 1e-3, 0.0, 0.0, 0.0, 0.0, 900.0, 0.0)
	f.Add(uint8(4), 3.0, 0.3, math.NaN(), 0.0, 0.0, 0.0, 0.0, 0.0, -1.0, 0.0, math.Inf(1))
	f.Fuzz(func(t *testing.T, kind uint8, n, m, xx, yy, zz, yz, xz, xy, dt, temperature, strain float64) {
		law := fuzzLaw(kind, n, m)
		if law == nil {
			return // the constructors have refused the exponents
		}
		mat, err := integrate.New(integrate.NewIsotropic(young, poisson), law, integrate.Options{})
		if err != nil {
			t.Fatal(err)
		}
		old := integrate.State{Equivalent: strain}
		inc := integrate.Increment{Dt: dt, Temperature: temperature, Strain: tensor.Sym{xx, yy, zz, yz, xz, xy}}
		out := integrate.Result{CreepStep: 42}
		switch err := mat.Step(&out, &old, inc); err {
		case nil:
			sound(t, &out, inc)
		case integrate.NoConvergence, integrate.LawUndefined, integrate.OutsideTable, integrate.BeyondRupture:
			t.Fatalf("%v with %+v from %+v with %+v", err, inc, old, law)
		default:
			if out != (integrate.Result{CreepStep: 42}) {
				t.Fatalf("%v has written %+v", err, out)
			}
		}
	})
}

func fuzzLaw(kind uint8, n, m float64) creeplaw.Law {
	if !(n >= 0.5 && n <= 60) { // no metal's exponent
		return nil
	}
	norton, err1 := creeplaw.NewNortonAt(1e-6, 100, n)
	garofalo, err2 := creeplaw.NewGarofalo(1e-9, 0.03, n)
	bailey, err3 := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, n, m)
	hardening, err4 := creeplaw.NewStrainHardeningAt(1e-6, 100, 1e-3, n, -m)
	if err1 != nil || err2 != nil || err3 != nil || err4 != nil || m < 0.05 {
		return nil
	}
	sum, err := creeplaw.NewSum(norton, garofalo, bailey)
	if err != nil {
		return nil
	}
	return []creeplaw.Law{norton, garofalo, bailey, hardening, sum}[kind%5]
}

// sound demands finite numbers, no overshoot and a stress that the trial stress bounds.
func sound(t *testing.T, out *integrate.Result, inc integrate.Increment) {
	t.Helper()
	elastic := inc.Strain.EquivalentStrain()
	bad := !out.Stress.IsFinite() || !out.State.Creep.IsFinite() || !(out.CreepStep >= 0) ||
		!(out.CreepStep <= elastic*(1+1e-12)) || !(out.Stress.Mises() <= 3*shear*elastic*(1+1e-9)+1e-9*largest(out.Stress))
	for i := range out.Tangent {
		for j := range out.Tangent[i] {
			bad = bad || math.IsNaN(out.Tangent[i][j]) || math.IsInf(out.Tangent[i][j], 0)
		}
	}
	if bad {
		t.Fatalf("unsound: %+v after %+v", out, inc)
	}
}
