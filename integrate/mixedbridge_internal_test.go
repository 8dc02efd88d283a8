package integrate

import (
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/tensor"
)

// TestBridgeAgreesWithScalarEquation takes steps of plain laws through the search that laws with internal variables use, which
// knows the law through Step alone, and holds them against the direct solution. The two share the linear system, not the
// scalar equation, its derivatives, or the way to the derivatives of the result.
//
// Tolerances: Step solves ln Δp to 2e-13, and the bridge loses digits of it where little of the trial stress is left.
func TestBridgeAgreesWithScalarEquation(t *testing.T) {
	const seed = 20261201
	r := rand.New(rand.NewPCG(seed, 220))
	decades := func(low, high float64) float64 { return math.Pow(10, low+(high-low)*r.Float64()) }
	worst, tangent, steps := 0.0, 0.0, 0
	for i := range 4000 {
		n := decades(0, 1.3)
		law, err := creeplaw.NewBaileyNortonAt(1e-3, 100, 100, n, 1-0.6*float64(i%2))
		if err != nil {
			t.Fatal(err)
		}
		m, err := New(NewIsotropic(160e3, 0.3), law, Options{})
		if err != nil {
			t.Fatal(err)
		}
		var control Control
		for j := range control.component {
			switch r.IntN(3) {
			case 0:
				control.component[j].stress = true
			case 1:
				control.component[j].compliance = decades(-2, 2) / 160e3
			}
		}
		old := State{Equivalent: decades(-8, -2)}
		inc := MixedIncrement{Control: control, Temperature: 800}
		size := decades(0, 2.5)
		var stress tensor.Sym
		for j := range stress {
			stress[j] = size * r.NormFloat64()
		}
		strain := stress.Scale(1.3 / 160e3).Sub(tensor.Identity().Scale(0.3 / 160e3 * stress.Trace()))
		for j, k := range control.component {
			inc.Prescribed[j] = strain[j] + k.compliance*stress[j]
			if k.stress {
				inc.Prescribed[j] = stress[j]
			}
		}
		inc.Dt = decades(-3, 3) * strain.EquivalentStrain() / law.Rate(creeplaw.Point{Stress: stress.Mises(),
			Strain: old.Equivalent + strain.EquivalentStrain(), Temperature: 800}).Value
		var direct, bridged MixedResult
		if code := m.stepMixed(&direct, &old, &inc, false); code != 0 {
			t.Fatalf("seed %d, case %d: direct: %v", seed, i, code)
		}
		if code := m.stepMixed(&bridged, &old, &inc, true); code != 0 {
			t.Fatalf("seed %d, case %d: bridge: %v for %+v from %+v", seed, i, code, inc, old)
		}
		steps = max(steps, bridged.Iterations)
		gap := direct.Stress.Sub(bridged.Stress).Norm()/stress.Norm() +
			direct.State.Creep.Sub(bridged.State.Creep).Norm()/(strain.Norm()+direct.State.Creep.Norm())
		worst = max(worst, gap)
		if !(gap <= 1e-11) {
			t.Fatalf("seed %d, case %d: %v apart: %+v, want %+v for %+v", seed, i, gap, bridged, direct, inc)
		}
		gap = derivativeGap(&direct, &bridged)
		tangent = max(tangent, gap)
		if !(gap <= 1e-10) {
			t.Fatalf("seed %d, case %d: derivatives %v apart: %+v, want %+v for %+v", seed, i, gap, bridged, direct, inc)
		}
	}
	t.Logf("largest gap %.4e, of derivatives %.4e; at most %d steps", worst, tangent, steps)
}

// derivativeGap is the largest difference of the derivatives by any prescribed value, relative to the largest of them.
func derivativeGap(want, got *MixedResult) float64 {
	worst := 0.0
	for j := range 6 {
		var size, gap, sizeStrain, gapStrain float64
		for i := range 6 {
			size = max(size, math.Abs(want.StressBy[i][j]))
			gap = max(gap, math.Abs(want.StressBy[i][j]-got.StressBy[i][j]))
			sizeStrain = max(sizeStrain, math.Abs(want.StrainBy[i][j]))
			gapStrain = max(gapStrain, math.Abs(want.StrainBy[i][j]-got.StrainBy[i][j]))
		}
		worst = max(worst, gap/size, gapStrain/sizeStrain)
	}
	return worst
}
