package creeplaw_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/bench/check"
	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/lawtest"
)

// Constants of copper from H. J. Frost, M. F. Ashby, Deformation-Mechanism Maps, 1982, table 4.1, from memory.
var (
	copperVolume   = 1.18e-29
	copperLattice  = creeplaw.Diffusivity{Prefactor: 2.0e-5, ActivationEnergy: 197e3}
	copperBoundary = creeplaw.Diffusivity{Prefactor: 5.0e-15, ActivationEnergy: 104e3}
)

func TestDiffusionalCreepOfCopper(t *testing.T) {
	law := must(creeplaw.NewDiffusional(copperVolume, 50e-6, copperLattice, copperBoundary))
	p := creeplaw.Point{Stress: 1e6, Temperature: 973}
	// The project's list of published values: Frost and Ashby's equation 2.29 with these constants, 10 digits printed to 7.
	check.Rel(t, "copper, 973 K, 50 µm, 1 MPa", law.Rate(p).Value, 6.650527e-9, 1e-7)
}

func TestDiffusionalIsNabarroHerringPlusCoble(t *testing.T) {
	const d = 20e-6
	both := must(creeplaw.NewDiffusional(copperVolume, d, copperLattice, copperBoundary))
	lattice := must(creeplaw.NewNabarroHerring(copperVolume, d, copperLattice))
	boundary := must(creeplaw.NewCoble(copperVolume, d, copperBoundary))
	for _, temperature := range []float64{300, 700, 1300} {
		p := creeplaw.Point{Stress: 2e6, Strain: 0.01, Temperature: temperature}
		kT := 1.380649e-23 * temperature
		rt := 8.314462618 * temperature
		byLattice := 14 * 2e6 * copperVolume / (kT * d * d) * 2.0e-5 * math.Exp(-197e3/rt)
		byBoundary := 14 * math.Pi * 2e6 * copperVolume / (kT * d * d * d) * 5.0e-15 * math.Exp(-104e3/rt)
		check.Rel(t, "Nabarro–Herring", lattice.Rate(p).Value, byLattice, plainTolerance)
		check.Rel(t, "Coble", boundary.Rate(p).Value, byBoundary, plainTolerance)
		check.Rel(t, "both", both.Rate(p).Value, byLattice+byBoundary, plainTolerance)
		check.Rel(t, "slope", both.Rate(p).ByStress, (byLattice+byBoundary)/2e6, plainTolerance)
	}
}

func TestDiffusionalIsLinearDownToZeroStress(t *testing.T) {
	for name, law := range map[string]creeplaw.Logarithmic{
		"Nabarro–Herring": must(creeplaw.NewNabarroHerring(copperVolume, 1e-5, copperLattice)),
		"Coble":           must(creeplaw.NewCoble(copperVolume, 1e-5, copperBoundary)),
		"both":            must(creeplaw.NewDiffusional(copperVolume, 1e-5, copperLattice, copperBoundary)),
	} {
		zero := law.Rate(creeplaw.Point{Temperature: 900})
		unit := law.Rate(creeplaw.Point{Stress: 1, Temperature: 900})
		assert.Zero(t, zero.Value, name)
		check.Rel(t, name+": slope", zero.ByStress, unit.Value, plainTolerance)
		assert.True(t, math.IsInf(law.LogRate(creeplaw.Point{Temperature: 900}).Value, -1), name)
		low := law.LogRate(creeplaw.Point{Stress: 1e-300, Temperature: 900})
		high := law.LogRate(creeplaw.Point{Stress: 1e300, Temperature: 900})
		check.Rel(t, name+": 600 decades", high.Value-low.Value, 600*math.Ln10, 1e-14)
	}
}

func TestDiffusionalConforms(t *testing.T) {
	box := lawtest.Box{Claims: lawtest.Logarithmic | lawtest.Explainer, Stress: lawtest.Range{1, 1e8},
		Strain: lawtest.Range{1e-8, 0.5}, Temperature: lawtest.Range{250, 1350}}
	lawtest.Run(t, must(creeplaw.NewDiffusional(copperVolume, 50e-6, copperLattice, copperBoundary)), box)
	lawtest.Run(t, must(creeplaw.NewNabarroHerring(copperVolume, 50e-6, copperLattice)), box)
	lawtest.Run(t, must(creeplaw.NewCoble(copperVolume, 50e-6, copperBoundary)), box)
}

func TestDiffusionalRefusesBadParameters(t *testing.T) {
	with := func(d0, q float64) creeplaw.Diffusivity {
		return creeplaw.Diffusivity{Prefactor: d0, ActivationEnergy: q}
	}
	good := with(1, 1)
	checkRefused(t, []refused{
		{"atomic volume", func(x float64) error { return last(creeplaw.NewDiffusional(x, 1, good, good)) }, notPositive},
		{"grain size", func(x float64) error { return last(creeplaw.NewDiffusional(1, x, good, good)) }, notPositive},
		{"lattice diffusivity", func(x float64) error { return last(creeplaw.NewDiffusional(1, 1, with(x, 1), good)) }, notPositive},
		{"lattice activation energy", func(x float64) error { return last(creeplaw.NewNabarroHerring(1, 1, with(1, x))) }, negative},
		{"boundary diffusivity", func(x float64) error { return last(creeplaw.NewDiffusional(1, 1, good, with(x, 1))) }, notPositive},
		{"boundary activation energy", func(x float64) error { return last(creeplaw.NewCoble(1, 1, with(1, x))) }, negative},
		{"grain size", func(x float64) error { return last(creeplaw.NewNabarroHerring(1, x, good)) }, notPositive},
		{"atomic volume", func(x float64) error { return last(creeplaw.NewCoble(x, 1, good)) }, notPositive},
	})
}

// Smaller grains creep faster by diffusion, along the boundaries with the third power (invented numbers).
func ExampleNewCoble() {
	boundary := creeplaw.Diffusivity{Prefactor: 5e-15, ActivationEnergy: 100e3}
	for _, grain := range []float64{10e-6, 20e-6} {
		law, err := creeplaw.NewCoble(1.2e-29, grain, boundary)
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf("%.0f µm: %.1e /s\n", grain*1e6, law.Rate(creeplaw.Point{Stress: 1e6, Temperature: 700}).Value)
	}
	// Output:
	// 10 µm: 9.4e-09 /s
	// 20 µm: 1.2e-09 /s
}
