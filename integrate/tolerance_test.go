package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// achieved follows a reference history with one tolerance and returns the largest error of stress and creep strain at its
// outputs, over the history's own scales, and the scalar problems solved.
func (h *referenceHistory) achieved(m *integrate.Material, relative float64) (worst float64, solves int, err error) {
	tolerance := integrate.Tolerance{Relative: relative, Stress: h.StressScale, Creep: h.StrainScale}
	at := func(knot []float64) integrate.Conditions {
		return integrate.Conditions{Strain: tensor.Sym(knot[1:7]), Temperature: knot[7]}
	}
	var state integrate.State
	var stress tensor.Sym
	result := 0
	for k := 1; k < len(h.Knots); k++ {
		from, to := h.Knots[k-1], h.Knots[k]
		end := at(to)
		course, err := m.FollowStress(&stress, &state, &state, at(from),
			integrate.Increment{Dt: to[0] - from[0], Strain: end.Strain, Temperature: end.Temperature}, tolerance, 0)
		if err != nil {
			return 0, solves, err
		}
		solves += course.Solves
		if result < len(h.Results) && h.Results[result].Knot == k {
			want := &h.Results[result]
			worst = math.Max(worst, largest(stress.Sub(want.Stress))/h.StressScale)
			creep := math.Max(h.StrainScale, want.Equivalent)
			worst = math.Max(worst, largest(state.Creep.Sub(want.Creep))/creep)
			worst = math.Max(worst, math.Abs(state.Equivalent-want.Equivalent)/creep)
			result++
		}
	}
	return worst, solves, nil
}

// TestFollowKeepsItsToleranceOnReferences follows the reference histories (testdata/histories: turning paths, reversals,
// ramps of temperature with E(T), from virgin material, by SciPy at tolerances of 1e-13) at tolerances from 1e-3 to 1e-9. The
// tolerance is that of one step, on the scale of the history; errors of many steps may add up. Issue: within a factor 3 of
// the tolerance in at least 95 of 100 cases, within 10 in all. Together with the closed forms of package program these are
// more than 60 histories.
func TestFollowKeepsItsToleranceOnReferences(t *testing.T) {
	histories := readReference(t)
	cases, within := 0, 0
	for _, relative := range []float64{1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9} {
		worstRatio, sum, name := 0.0, 0, ""
		for i := range histories {
			h := &histories[i]
			m, err := h.material()
			require.NoError(t, err, h.Name)
			achieved, solves, err := h.achieved(m, relative)
			require.NoError(t, err, "%s at %v", h.Name, relative)
			ratio := achieved / relative
			cases++
			if ratio <= 3 {
				within++
			}
			require.LessOrEqual(t, ratio, 10.0, "%s at %v", h.Name, relative)
			if sum += solves; ratio > worstRatio {
				worstRatio, name = ratio, h.Name
			}
		}
		t.Logf("tolerance %.0e: worst error %.2f tolerances (%s), %.0f scalar problems per history in the mean", relative,
			worstRatio, name, float64(sum)/float64(len(histories)))
	}
	t.Logf("%d of %d cases within 3 tolerances, all within 10", within, cases)
	require.GreaterOrEqual(t, float64(within), 0.95*float64(cases))
}
