package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

func TestNewControlRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	const relation = integrate.GivenRelation
	for _, c := range []struct {
		name      string
		condition integrate.Condition
		quantity  string
	}{
		{"both factors zero", integrate.Condition{By: relation}, "factor of the strain"},
		{"NaN factor of stress", integrate.Condition{By: relation, Stress: nan, Strain: 1}, "factor of the stress"},
		{"NaN factor of strain", integrate.Condition{By: relation, Stress: 1, Strain: nan}, "factor of the strain"},
		{"infinite factor of stress", integrate.Condition{By: relation, Stress: inf, Strain: 1}, "factor of the stress"},
		{"infinite factor of strain", integrate.Condition{By: relation, Stress: 1, Strain: -inf}, "factor of the strain"},
		{"opposite signs", integrate.Condition{By: relation, Stress: 1e-5, Strain: -1}, "factor of the stress over that of the strain"},
		{"ratio that overflows", integrate.Condition{By: relation, Stress: 1e200, Strain: 1e-200},
			"factor of the stress over that of the strain"},
		{"stress with a factor", integrate.Condition{By: integrate.GivenStress, Stress: 1}, "factor of the stress"},
		{"strain with a factor", integrate.Condition{By: integrate.GivenStrain, Strain: 1}, "factor of the strain"},
		{"unknown", integrate.Condition{By: 3}, "what is given"},
	} {
		for i, component := range []string{"xx", "yy", "zz", "yz", "xz", "xy"} {
			var conditions [6]integrate.Condition
			conditions[i] = c.condition
			control, err := integrate.NewControl(conditions)
			var e *integrate.ControlError
			require.ErrorAs(t, err, &e, c.name)
			require.Equal(t, component, e.Component, c.name)
			require.Equal(t, c.quantity, e.Quantity, c.name)
			require.Contains(t, err.Error(), component)
			require.Equal(t, integrate.Control{}, control)
		}
	}
	for _, c := range [][2]float64{{0, 2}, {-1, 2}, {nan, 2}, {inf, 2}, {2e5, 0.5}, {2e5, nan}, {2e5, inf}, {5e-324, 3}} {
		_, err := integrate.FollowUp(c[0], c[1])
		var e *integrate.ControlError
		require.ErrorAs(t, err, &e, "%v", c)
	}
}

// TestPresets: each preset is the control that NewControl makes of the same conditions.
func TestPresets(t *testing.T) {
	followUp, err := integrate.FollowUp(2e5, 3)
	require.NoError(t, err)
	stress := integrate.Condition{By: integrate.GivenStress}
	for _, c := range []struct {
		preset     integrate.Control
		conditions [6]integrate.Condition
		name       string
	}{
		{integrate.FullyConstrained(), [6]integrate.Condition{}, "strain xx yy zz yz xz xy"},
		{integrate.StressControl(), [6]integrate.Condition{stress, stress, stress, stress, stress, stress},
			"stress xx yy zz yz xz xy"},
		{integrate.UniaxialStress(), [6]integrate.Condition{{}, stress, stress, stress, stress, stress},
			"strain xx, stress yy zz yz xz xy"},
		{integrate.PlaneStress(), [6]integrate.Condition{{}, {}, stress, stress, stress, {}}, "strain xx yy xy, stress zz yz xz"},
		{integrate.BiaxialStress(), [6]integrate.Condition{{}, {}, stress, stress, stress, stress},
			"strain xx yy, stress zz yz xz xy"},
		{integrate.Torsion(), [6]integrate.Condition{stress, stress, stress, stress, stress, {}}, "strain xy, stress xx yy zz yz xz"},
		{integrate.ConfinedCompression(), [6]integrate.Condition{stress}, "strain yy zz yz xz xy, stress xx"},
		{followUp, [6]integrate.Condition{{By: integrate.GivenRelation, Stress: 1e-5, Strain: 1}, stress, stress, stress, stress, stress},
			"stress yy zz yz xz xy, relation xx"},
	} {
		made, err := integrate.NewControl(c.conditions)
		require.NoError(t, err)
		require.Equal(t, c.name, c.preset.String())
		require.Equal(t, c.name, made.String())
		inc := integrate.MixedIncrement{Control: c.preset, Dt: 10, Temperature: 800,
			Prescribed: tensor.Sym{1e-3, 2e-4, -1e-4, 0, 3e-4, 1e-4}}
		for i, condition := range c.conditions {
			if condition.By == integrate.GivenStress {
				inc.Prescribed[i] *= 1e5
			}
		}
		m := controlMaterial(t)
		var got, want integrate.MixedResult
		require.NoError(t, m.StepMixed(&got, &integrate.State{}, inc))
		inc.Control = made
		require.NoError(t, m.StepMixed(&want, &integrate.State{}, inc))
		require.Equal(t, want, got, c.name)
	}
}

// TestRelationsMayBeScaled: the factors of a relation count by their ratio, also where one of them is zero.
func TestRelationsMayBeScaled(t *testing.T) {
	m := controlMaterial(t)
	run := func(a, b, c float64) (out integrate.MixedResult) {
		conditions := [6]integrate.Condition{{By: integrate.GivenRelation, Stress: a, Strain: b}}
		control, err := integrate.NewControl(conditions)
		require.NoError(t, err)
		require.NoError(t, m.StepMixed(&out, &integrate.State{}, integrate.MixedIncrement{Control: control, Dt: 10,
			Prescribed: tensor.Sym{c, -2e-4}, Temperature: 800}))
		return out
	}
	for _, factor := range []float64{2, -1, -0.25, 0x1p40} { // powers of two keep the bits
		for _, r := range [][3]float64{{1e-5, 1, 2e-3}, {0, 1, 1e-3}, {1, 0, 120}} {
			want, got := run(r[0], r[1], r[2]), run(factor*r[0], factor*r[1], factor*r[2])
			require.Equal(t, want.Stress, got.Stress)
			require.Equal(t, want.State, got.State)
			require.Equal(t, want.StressBy[1][0], factor*got.StressBy[1][0], "derivatives are by the number prescribed")
		}
	}
}
