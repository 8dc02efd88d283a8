package main

import (
	"math"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/examples/newton"
	"example.com/holdtime/tensor"
)

// builtIn is the report that the program makes without flags, made once for all tests.
var builtIn = sync.OnceValues(func() (*report, error) { return newReport(settings{exponent: 5, distortion: 1, steps: 16}) })

func mustReport(t *testing.T) *report {
	t.Helper()
	r, err := builtIn()
	require.NoError(t, err)
	return r
}

// The figures of the issue, with limits of their own: uniformity at rounding, the size of the residual that ends the
// iteration (1e-13) times a small number.
func TestUniformity(t *testing.T) {
	r := mustReport(t)
	for i, name := range []string{"one brick", "seven bricks"} {
		require.Len(t, r.tension[i].rows, 6)
		for _, row := range r.tension[i].rows {
			check.Abs(t, name+", "+row.name+": stress", row.spread, 0, 2e-12)
			check.Abs(t, name+", "+row.name+": creep tensor", row.side, 0, 1e-13)
			if row.load > 0 {
				assert.GreaterOrEqual(t, row.iterations, 1, "%s, %s: nothing was solved", name, row.name)
			}
		}
	}
	require.Len(t, r.strainedRows, 6)
	for _, row := range r.strainedRows {
		check.Abs(t, "patch, "+row.name+": stress", row.spread, 0, 2e-12)
		check.Abs(t, "patch, "+row.name+": inner nodes", row.inner, 0, 2e-12)
		assert.GreaterOrEqual(t, row.iterations, 1, "patch, %s: nothing was solved", row.name)
	}
	check.Abs(t, "between plates", r.barSpread, 0, 2e-12)
	check.Abs(t, "supports of the brick pulled askew", r.imbalance, 0, 2e-12)
}

// Norton's creep under constant stress, by hand: 1e-6·1000 h under 100 MPa; 1e-6·0.6⁵·f·1000 h, hot, under 60 MPa.
func TestCreepStrainUnderTractions(t *testing.T) {
	rows := mustReport(t).tension[0].rows
	check.Rel(t, "first hold", rows[1].creep, 1e-3, 1e-12)
	hot := math.Exp(350e3 / 8.314462618 * (1/823.15 - 1/853.15))
	check.Rel(t, "second hold", rows[4].creep-rows[3].creep, 1e-3*math.Pow(0.6, 5)*hot, 1e-11)
	assert.Equal(t, rows[4].creep, rows[5].creep, "unloading is elastic")
}

// The closed forms at the ends of the holds, by extrapolation over three or four halvings; the order that backward
// Euler must show.
func TestHoldsConverge(t *testing.T) {
	r := mustReport(t)
	// Published-value list of the project: E = 150000, A = 1e-16, n = 5, 200 MPa, 100 h; derived there from F. H. Norton's
	// relaxation and checked in 30 digits.
	check.Rel(t, "bar", r.relaxation.Extrapolated()[0], 110.8417897, 1e-7) // measured 4e-8
	check.Abs(t, "bar, extrapolated", r.relaxation.ExtrapolatedError(), 0, 1e-7)
	check.Abs(t, "patch, extrapolated", r.hold.ExtrapolatedError(), 0, 1e-7)
	check.Abs(t, "heating, extrapolated", r.heating.ExtrapolatedError(), 0, 1e-10)
	for name, s := range map[string]interface{ Orders() []float64 }{"bar": r.relaxation, "patch": r.hold, "heating": r.heating} {
		orders := s.Orders()
		check.Abs(t, name+": order", orders[len(orders)-1], 1, 0.01) // measured 0.997, 0.997, 1.002
	}
}

// A Newton iteration with the right tangent is of order two; the sequences must be long enough to say so.
func TestGlobalNewtonIsQuadratic(t *testing.T) {
	r := mustReport(t)
	seen := 0
	for _, residuals := range append(r.askew, r.strainedWorst, r.tension[0].worst) {
		assert.LessOrEqual(t, len(residuals)-1, 8, "%.1e", residuals)
		if o, ok := newton.Order(residuals, solved); ok {
			seen++
			assert.True(t, o > 1.9, "order %v of %.1e", o, residuals) // measured 1.96 to 2.03
		}
	}
	assert.GreaterOrEqual(t, seen, 4, "sequences long enough")
	assert.True(t, r.constant() < 20, "r(k+1)/r(k)² is %v", r.constant()) // measured 8
}

// The stiffness against central differences of the internal forces, in a step with creep in which no two points are alike.
func TestStiffnessIsTheDerivative(t *testing.T) {
	material, err := newMaterial(5)
	require.NoError(t, err)
	b, err := sevenBricks(material, 1, stressAt)
	require.NoError(t, err)
	n := b.unknowns()
	moved := b.field(tensor.Sym{5e-4, -2e-4, 3e-4, 1e-4, 2e-4, -3e-4})
	for i := range moved { // so that the strain differs from place to place
		moved[i] *= 1 + 0.3*math.Sin(float64(3*i))
	}
	from, end := b.virgin(reference), b.virgin(reference)
	d := demand{duration: 50, temperature: reference + 20}
	forces := func(displacement []float64) *system {
		s := newSystem(n)
		copy(end.displacement, displacement)
		require.NoError(t, b.assemble(s, end, from, d))
		return s
	}
	s := forces(moved)
	scale := 0.0
	for i := range n {
		scale = math.Max(scale, s.stiffness.At(i, i))
	}
	const h = 1e-7 // mm, 1e-5 of the largest displacement: truncation 1e-9, rounding 1e-9
	for j := range n {
		up, down := append([]float64(nil), moved...), append([]float64(nil), moved...)
		up[j] += h
		down[j] -= h
		above, below := forces(up), forces(down)
		for i := range n {
			check.Scaled(t, "stiffness", s.stiffness.At(i, j), (above.internal[i]-below.internal[i])/(2*h), scale, 1e-7)
		}
	}
}

// The kinematics by hand: a displacement u_x = γ y is the engineering shear γ.
func TestStrainMatrix(t *testing.T) {
	material, err := newMaterial(5)
	require.NoError(t, err)
	b, err := oneBrick(material, 1, stressAt)
	require.NoError(t, err)
	slopes := [3]vector{{1e-3, 2e-3, 3e-3}, {4e-3, 5e-3, 6e-3}, {7e-3, 8e-3, 9e-3}} // ∂u_i/∂x_j
	moved := b.none()
	for a, x := range b.nodes {
		for i := range 3 {
			moved[3*a+i] = dot(slopes[i], x)
		}
	}
	var matrix [6][24]float64
	var strain [6]float64
	for j := range b.bricks[0].points {
		b.bricks[0].points[j].strainMatrix(&matrix)
		b.strain(&strain, &matrix, &b.bricks[0], moved)
		check.Slice(t, "host strain", strain[:], []float64{1e-3, 5e-3, 9e-3, 6e-3, 14e-3, 10e-3}, 1e-2, 1e-14)
		got := b.layout.StrainIn(strain[:])
		check.Slice(t, "tensor", got[:], []float64{1e-3, 5e-3, 9e-3, 7e-3, 5e-3, 3e-3}, 1e-2, 1e-14)
	}
}

// Volumes: the cube's is known, and seven bricks fill the one they were cut from.
func TestVolumes(t *testing.T) {
	material, err := newMaterial(5)
	require.NoError(t, err)
	straight, err := sevenBricks(material, 0, stressAt)
	require.NoError(t, err)
	check.Rel(t, "cube", straight.volume(), 1000, 1e-14)
	one, err := oneBrick(material, 1, stressAt)
	require.NoError(t, err)
	seven, err := sevenBricks(material, 1, stressAt)
	require.NoError(t, err)
	check.Rel(t, "distorted", seven.volume(), one.volume(), 1e-14)
	assert.Len(t, seven.surface(), 6)
	total := 0.0
	for i, f := range seven.tractions(tensor.Sym{tensor.XX: 1}) {
		if i%3 == 0 {
			total += f
		} else {
			assert.Zero(t, f, "no stress across")
		}
	}
	check.Abs(t, "tractions of a uniform stress balance", total, 0, 1e-12)
	_, err = newBody(distorted(0), [][8]int{{4, 5, 6, 7, 0, 1, 2, 3}}, material, 1)
	require.ErrorContains(t, err, "turned inside out")
}

// The checks can fail: a host that takes its engineering shear for tensor shear is found out, although it converges.
func TestWrongShearConventionIsSeen(t *testing.T) {
	material, err := newMaterial(5)
	require.NoError(t, err)
	b, err := sevenBricks(material, 1, generalStress.Mises())
	require.NoError(t, err)
	b.layout, err = tensor.NewLayout(hostOrder, tensor.TensorShear)
	require.NoError(t, err)
	rows, _, err := strained(b, 5, strainProgram(8))
	require.NoError(t, err)
	assert.True(t, rows[0].spread > 0.1, "spread %v", rows[0].spread)
}

// Other exponents and distortions keep every limit.
func TestOtherSettings(t *testing.T) {
	for _, s := range []settings{{1, 1, 8}, {3, 0, 8}, {8, 0.5, 8}} {
		r, err := newReport(s)
		require.NoError(t, err)
		assert.True(t, r.checks.Passed(), "%+v: %+v", s, r.checks)
	}
}
