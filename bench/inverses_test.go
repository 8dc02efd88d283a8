package bench_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
	"example.com/holdtime/tensor"
)

// TestTimesComeBack: the time at which a stress is reached must be the time it was reached at. The time of a power law is
// n-1 times as sensitive as the stress.
func TestTimesComeBack(t *testing.T) {
	law := norton(1e-16, 5)
	follow := bench.FollowUpRelaxation{Young: 150e3, Stress: 200, FollowUp: 3, Law: law}
	shear := bench.ShearRelaxation{Shear: 60e3, Stress: 100, Law: law}
	equal := bench.EqualBiaxialRelaxation{Young: 150e3, Poisson: 0.3, Stress: 200, Law: law}
	opposite := bench.OppositeBiaxialRelaxation{Young: 150e3, Poisson: 0.3, Stress: 100, Law: law}
	sinh := bench.SinhRelaxation{Young: 150e3, Stress: 200, Prefactor: 1e-9, Coefficient: 0.05}
	for _, time := range []float64{1, 50, 1e4} {
		for _, p := range []struct {
			name string
			at   func(float64) float64
			to   func(float64) float64
		}{
			{"follow-up", follow.StressAt, follow.TimeTo},
			{"shear", shear.StressAt, shear.TimeTo},
			{"equal biaxial", equal.StressAt, equal.TimeTo},
			{"opposite biaxial", opposite.StressAt, opposite.TimeTo},
			{"hyperbolic sine", sinh.StressAt, sinh.TimeTo},
		} {
			check.Rel(t, p.name, p.to(p.at(time)), time, 1e-12)
		}
	}
	require.True(t, math.IsNaN(sinh.TimeTo(-1)) && math.IsNaN(sinh.TimeTo(201)))

	draw := bench.ConstantRateTension{Young: 150e3, StrainRate: 1e-6, Law: law}
	require.Zero(t, draw.TimeTo(0))
	require.True(t, math.IsInf(draw.TimeTo(draw.Saturation()), 1) && math.IsNaN(draw.TimeTo(-1)) &&
		math.IsNaN(draw.TimeTo(2*draw.Saturation())))

	// The held strain is that of Hooke's law in shear, and shear is the solid state it is a case of.
	check.Rel(t, "engineering shear strain", shear.Strain(), 100./60e3, 1e-15)
	solid := bench.SolidRelaxation{Young: 150e3, Poisson: 0.25, Stress: tensor.Sym{tensor.XZ: 100}, Law: law} // G = 60e3
	check.Rel(t, "shear as a solid", solid.StressAt(70)[tensor.XZ], shear.StressAt(70), 1e-13)
	check.Rel(t, "shear strain as a solid", 2*solid.Strain()[tensor.XZ], shear.Strain(), 1e-15)
}

// TestOutsideTheBody: a place that is not in the part has no stress.
func TestOutsideTheBody(t *testing.T) {
	law := norton(1e-15, 5)
	cylinder := bench.ThickCylinder{Inner: 100, Outer: 200, Pressure: 50, Law: law}
	sphere := bench.ThickSphere{Inner: 100, Outer: 200, Pressure: 50, Law: law}
	beam := bench.RectangularBeam{Width: 20, HalfDepth: 20, Moment: 1e6, Law: law}
	bar := bench.TorsionBar{Radius: 20, Torque: 1e6, Law: law}
	for _, got := range []float64{
		cylinder.RadialAt(99), cylinder.HoopAt(201), cylinder.AxialAt(-1), cylinder.MisesAt(math.NaN()), cylinder.VelocityAt(0),
		sphere.RadialAt(99), sphere.HoopAt(201), sphere.MisesAt(math.Inf(1)), sphere.VelocityAt(math.NaN()),
		beam.StressAt(20.1), beam.StressAt(-20.1), beam.StressAt(math.NaN()),
		bar.StressAt(-1), bar.StressAt(20.1), bar.StressAt(math.NaN()),
	} {
		require.True(t, math.IsNaN(got), "%v", got)
	}
	require.Zero(t, beam.StressAt(0), "neutral axis")
	require.Zero(t, bar.StressAt(0), "axis")
}

// TestSteadyFlowCreep: the creep strain of a point is its rate times the time, none under a mean stress.
func TestSteadyFlowCreep(t *testing.T) {
	flow := bench.SteadyFlow{Stress: tensor.Sym{200, 200, 0}, Law: norton(3.125e-14, 5)}
	check.Slice(t, "creep strain", slice(flow.CreepAt(3)), []float64{0.015, 0.015, -0.03, 0, 0, 0}, 0.03, 1e-14)
	flow.Stress = tensor.Identity()
	require.Equal(t, tensor.Sym{}, flow.Rate())
}
