package audit_test

import (
	"errors"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// TestLargestStepIsTheStepsOwn: where the audit says the largest step at fixed strain is, the implicit step of package integrate,
// which finds its solution in another way, still has one a thousandth below and none a thousandth above.
func TestLargestStepIsTheStepsOwn(t *testing.T) {
	const shear, stress = 1000.0 / 3, 100.0 // soft: 3G = 1000 MPa
	law := must(creeplaw.NewOmega(must(creeplaw.NewNortonAt(1e-6, stress, 3)), 200))
	d := audit.Domain{Stress: audit.Range{Low: stress, High: stress}, Strain: audit.Range{Low: 1e-9, High: 1e-8},
		Temperature: isothermalRange}
	report := run(t, law, d, audit.Settings{Stiffness: 3 * shear})
	limit := report.Measures.LargestStepAtFixedStrain
	require.True(t, limit > 0 && limit < 1e300, "%v", report.Measures)

	const poisson = 0.3
	material := must(integrate.New(integrate.NewIsotropic(2*shear*(1+poisson), poisson), law, integrate.Options{}))
	strain := tensor.Sym{}
	strain[tensor.XX] = stress / (3 * shear) // of a deviator: q = 3G·√(⅔ e:e)
	strain[tensor.YY], strain[tensor.ZZ] = -strain[tensor.XX]/2, -strain[tensor.XX]/2
	var out integrate.Result
	var virgin integrate.State
	at := func(dt float64) error {
		return material.Step(&out, &virgin, integrate.Increment{Dt: dt, Strain: strain, Temperature: reference})
	}
	require.NoError(t, at(limit*0.999))
	require.True(t, errors.Is(at(limit*1.001), integrate.BeyondRupture), "%v", at(limit*1.001))
}
