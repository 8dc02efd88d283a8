package main

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/examples/newton"
)

func replaceFirst(text, old, new string) string { return strings.Replace(text, old, new, 1) }

// The built-in example, with one solve over thousands of hours in which a third of the load relaxes.
func TestGlobalNewtonIsQuadratic(t *testing.T) {
	j := mustJoint(t, string(defaultJoint))
	h := mustHistory(t, string(defaultHistory))
	for _, tolerance := range []float64{1e-3, 1e-4, 1e-6} {
		e := mustRun(t, j, h, settings{tolerance: tolerance, only: -1}).effort
		mean := float64(e.iterations) / float64(e.solves)
		assert.LessOrEqual(t, len(e.worst)-1, 4, "worst solve: %.2g", e.worst)
		assert.True(t, mean <= 2.2, "mean %v", mean)
		assert.Greater(t, e.solves, 300, "few solves: nothing was tested")
	}
	single := mustRun(t, j, h, settings{tolerance: 1e-4, only: -1}).single
	assert.True(t, single.to-single.from > 7000)
	assert.LessOrEqual(t, len(single.residuals)-1, 6)
	// Measured: order 1.98; below 1.8 something in the tangent is wrong.
	order, ok := newton.Order(single.residuals, 1e-13)
	require.True(t, ok, "too few residuals above rounding: %v", single.residuals)
	assert.True(t, order > 1.8, "residuals %.2g", single.residuals)
}

// One step from 200 MPa over times from which next to nothing to nearly everything relaxes, for every kind of law.
func TestGlobalNewtonAtAnyStep(t *testing.T) {
	laws := map[string]string{
		"norton":    `{"kind": "norton", "prefactor": 1e-16, "stress_exponent": 5}`,
		"garofalo":  `{"kind": "garofalo", "prefactor_per_h": 1e-9, "stress_coefficient_per_MPa": 0.05, "exponent": 1}`,
		"primary":   `{"kind": "bailey-norton", "prefactor": 1e-15, "stress_exponent": 5, "time_exponent": 0.4}`,
		"hardening": `{"kind": "strain-hardening", "rate_per_h": 1e-6, "stress_MPa": 100, "strain": 1e-3, "stress_exponent": 6, "strain_exponent": -1.5}`,
		"primary and secondary": `{"kind": "sum", "laws": [{"kind": "norton", "prefactor": 1e-16, "stress_exponent": 5},
			{"kind": "bailey-norton", "prefactor": 1e-15, "stress_exponent": 5, "time_exponent": 0.4}]}`,
		"arrhenius": `{"kind": "arrhenius", "activation_energy_J_per_mol": 3e5, "reference_temperature_K": 790,
			"law": {"kind": "norton", "prefactor": 1e-16, "stress_exponent": 5}}`,
	}
	for name, law := range laws {
		text := replaceFirst(followUpJoint, `{"kind": "norton", "prefactor": 1e-16, "stress_exponent": 5}`, law)
		text = replaceFirst(text, `[{"name": "bar", "length_mm": 200, "area_mm2": 1000}]`, `[
			{"name": "thin", "length_mm": 60, "area_mm2": 800}, {"name": "thick", "length_mm": 140, "area_mm2": 1200}]`)
		j := mustJoint(t, text)
		for hours := 1e-3; hours < 1e7; hours *= 10 {
			b := newBalance(j, 800)
			bare := condition{bolt: 800, flange: 800, points: make([]point, len(j.sections))}
			start, err := b.solve(&bare, &bare, demand{bolt: 800, flange: 800, tighten: true, load: b.force})
			require.NoError(t, err)
			b.effort = effort{}
			end, err := b.solve(&start, &start, demand{duration: hours, bolt: 800, flange: 800})
			require.NoError(t, err, "%s over %g h", name, hours)
			assert.True(t, end.load > 0 && end.load <= start.load, "%s over %g h: load %g", name, hours, end.load)
			// Measured: at most 5, where nearly all load goes in one step.
			assert.LessOrEqual(t, len(b.effort.worst)-1, 6, "%s over %g h: %.2g", name, hours, b.effort.worst)
		}
	}
}
