package curve_test

import (
	"testing"

	"example.com/holdtime/creeplaw/curve"
	"example.com/holdtime/creeplaw/lawtest"
)

// TestLawsConform holds the law made from every curve of the catalogue to the rules of the conformance kit: in a box of
// service conditions, and near zero strain. The logarithms range over nine decades of stress.
func TestLawsConform(t *testing.T) {
	points := 90
	if *campaign {
		points = 1000
	}
	for _, e := range catalogue() {
		t.Run(e.name, func(t *testing.T) {
			law := must(curve.NewStrainHardened(e.curve))
			for _, strain := range []lawtest.Range{{1e-7, 0.05}, {1e-25, 1e-7}} {
				results := lawtest.Run(t, law, lawtest.Box{
					Claims:             lawtest.Logarithmic | lawtest.Explainer,
					Stress:             lawtest.Range{40, 400},
					Strain:             strain,
					Temperature:        lawtest.Range{750, 950},
					LogStress:          lawtest.Range{1e-5, 1e4},
					CreepsAtZeroStress: e.creepsAtZeroStress,
					Points:             points,
				})
				for _, r := range results {
					t.Logf("%-30s %6d checks, worst %.2g of the allowed", r.Rule, r.Checks, r.Worst)
				}
			}
		})
	}
}
