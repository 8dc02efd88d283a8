package integrate_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// scaledGap is the largest difference of components relative to a size.
func scaledGap(got, want tensor.Sym, size float64) float64 { return largest(got.Sub(want)) / size }

// randomState is virgin material one time in three, and otherwise a state with creep strain in all components.
func (s source) state() integrate.State {
	if s.IntN(3) == 0 {
		return integrate.State{}
	}
	return integrate.State{Creep: s.deviator().Scale(s.decades(-6, -2)), Equivalent: s.decades(-8, -1)}
}

// agreement holds what two entry points made of the same step, in the sizes that rounding has: stress and its derivatives
// against the elastic stress of the trial, strain against creep strain and elastic strain.
//
// Tolerance 1e-12, the acceptance: the roots of two unlike scalar equations, each solved to about 2e-13 in ln Δp or better.
type agreement struct {
	stress, strain, state, tangent, byT float64
}

func (a *agreement) add(b agreement) {
	a.stress, a.strain, a.state = max(a.stress, b.stress), max(a.strain, b.strain), max(a.state, b.state)
	a.tangent, a.byT = max(a.tangent, b.tangent), max(a.byT, b.byT)
}

func (a *agreement) check(t *testing.T, label string, i int) bool {
	t.Helper()
	for _, v := range []float64{a.stress, a.strain, a.state, a.tangent, a.byT} {
		if !(v <= 1e-12) {
			t.Errorf("%s (seed %d, case %d): stress %.1e, strain %.1e, state %.1e, tangent %.1e, by temperature %.1e", label, seed,
				i, a.stress, a.strain, a.state, a.tangent, a.byT)
			return false
		}
	}
	return true
}

func stateGap(got, want *integrate.State, size float64) float64 {
	return max(scaledGap(got.Creep, want.Creep, size), math.Abs(got.Equivalent-want.Equivalent)/max(size, want.Equivalent))
}

// TestUniaxialAgreesWithMixed takes random steps of bars, strain and stress prescribed, through the light entry points and
// through StepMixed: the two share neither the scalar equation nor the way to the derivatives.
func TestUniaxialAgreesWithMixed(t *testing.T) {
	s := newSource(210)
	kinds := lawKinds()
	var strainDriven, stressDriven agreement
	for i := range 20_000 {
		kind := kinds[i%len(kinds)]
		law, err := kind.draw(s)
		require.NoError(t, err)
		m, free := warm(t, law)
		old := s.state()
		temperature, dt := s.uniform(720, 1080), s.decades(-10, 10)
		e := s.decades(-6, -2.5)
		if s.IntN(2) == 0 {
			e = -e
		}
		mixed := integrate.MixedIncrement{Control: integrate.UniaxialStress(), Dt: dt, Temperature: temperature}
		mixed.Prescribed[tensor.XX] = old.Creep[tensor.XX] + free(temperature) + e
		var bar integrate.UniaxialResult
		var full integrate.MixedResult
		require.NoError(t, m.StepUniaxial(&bar, &old, integrate.UniaxialIncrement{
			Dt: dt, Strain: mixed.Prescribed[tensor.XX], Temperature: temperature}), kind.name)
		require.NoError(t, m.StepMixed(&full, &old, mixed), kind.name)
		strainDriven.add(barAgreement(&bar, &full, math.Abs(e)))
		if !strainDriven.check(t, kind.name+", strain prescribed", i) {
			return
		}

		stress := e * young / 3 // keeps all creep strains finite
		mixed.Control, mixed.Prescribed = integrate.StressControl(), tensor.Sym{tensor.XX: stress}
		require.NoError(t, m.StepUniaxialStress(&bar, &old, integrate.UniaxialLoad{Dt: dt, Stress: stress,
			Temperature: temperature}), kind.name)
		require.NoError(t, m.StepMixed(&full, &old, mixed), kind.name)
		stressDriven.add(loadAgreement(&bar, &full, math.Abs(e)))
		if !stressDriven.check(t, kind.name+", stress prescribed", i) {
			return
		}
	}
	t.Logf("strain prescribed: %.0e; stress prescribed: %.0e", strainDriven, stressDriven)
}

func barAgreement(bar *integrate.UniaxialResult, full *integrate.MixedResult, e float64) agreement {
	size := e + bar.Strain.Norm() + bar.State.Creep.Norm()
	return agreement{
		stress:  scaledGap(tensor.Sym{bar.Stress}, full.Stress, young*e) / max(1, 1e-3*size/e), // rounding of e itself
		strain:  scaledGap(bar.Strain, full.Strain, size),
		state:   stateGap(&bar.State, &full.State, size),
		tangent: math.Abs(bar.Tangent-full.StressBy[tensor.XX][tensor.XX]) / young,
		byT:     math.Abs(bar.ByTemperature-full.StressByTemperature[tensor.XX]) / (young * (1e-5 + 10*e)),
	}
}

// loadAgreement compares the derivatives of the strain, ∂ε/∂σ = 1/Tangent and ∂ε/∂T = -ByTemperature/Tangent.
func loadAgreement(bar *integrate.UniaxialResult, full *integrate.MixedResult, e float64) agreement {
	size := e + bar.Strain.Norm() + bar.State.Creep.Norm()
	strainBy, byT := full.StrainBy[tensor.XX][tensor.XX], full.StrainByTemperature[tensor.XX]
	return agreement{
		stress:  scaledGap(tensor.Sym{bar.Stress}, full.Stress, young*e),
		strain:  scaledGap(bar.Strain, full.Strain, size),
		state:   stateGap(&bar.State, &full.State, size),
		tangent: math.Abs(1/bar.Tangent-strainBy) / strainBy,
		byT:     math.Abs(-bar.ByTemperature/bar.Tangent-byT) / (math.Abs(byT) + size),
	}
}

// TestPlaneStressAgreesWithMixed does the same for sheets, strains in all components of the plane.
func TestPlaneStressAgreesWithMixed(t *testing.T) {
	s := newSource(211)
	kinds := lawKinds()
	plane := [3]int{tensor.XX, tensor.YY, tensor.XY}
	var all agreement
	for i := range 20_000 {
		kind := kinds[i%len(kinds)]
		law, err := kind.draw(s)
		require.NoError(t, err)
		m, free := warm(t, law)
		old := s.state()
		temperature, dt := s.uniform(720, 1080), s.decades(-10, 10)
		e := s.decades(-6, -2.5)
		strain := old.Creep.Add(tensor.Identity().Scale(free(temperature))).Add(tensor.Sym{s.NormFloat64(), s.NormFloat64(), tensor.XY: s.NormFloat64()}.Scale(e))
		var prescribed tensor.Sym
		for _, j := range plane {
			prescribed[j] = strain[j]
		}
		var sheet integrate.PlaneStressResult
		var full integrate.MixedResult
		require.NoError(t, m.StepPlaneStress(&sheet, &old, integrate.PlaneStressIncrement{
			Dt: dt, Strain: strain, Temperature: temperature}), kind.name)
		require.NoError(t, m.StepMixed(&full, &old, integrate.MixedIncrement{
			Control: integrate.PlaneStress(), Dt: dt, Prescribed: prescribed, Temperature: temperature}), kind.name)
		size := e + sheet.Strain.Norm() + sheet.State.Creep.Norm()
		gap := agreement{
			stress: scaledGap(sheet.Stress, full.Stress, young*e) / max(1, 1e-3*size/e),
			strain: scaledGap(sheet.Strain, full.Strain, size),
			state:  stateGap(&sheet.State, &full.State, size),
			byT:    scaledGap(sheet.ByTemperature, full.StressByTemperature, young*(1e-5+10*e)),
		}
		for j, row := range plane {
			for k, column := range plane {
				engineering := 1.0 // the mixed derivative by xy is by the tensor shear
				if column == tensor.XY {
					engineering = 0.5
				}
				gap.tangent = max(gap.tangent, math.Abs(sheet.Tangent[j][k]-engineering*full.StressBy[row][column])/young)
				require.Equal(t, sheet.Tangent[j][k], sheet.Tangent[k][j], "symmetric to the bit")
			}
		}
		all.add(gap)
		if !all.check(t, kind.name, i) {
			return
		}
	}
	t.Logf("plane stress: %.0e", all)
}

// TestMixedWithAllStrainsIsStep holds StepMixed under the zero Control against Step.
func TestMixedWithAllStrainsIsStep(t *testing.T) {
	s := newSource(212)
	kinds := lawKinds()
	var all agreement
	for i := range 20_000 {
		kind := kinds[i%len(kinds)]
		law, err := kind.draw(s)
		require.NoError(t, err)
		m, free := warm(t, law)
		old := s.state()
		temperature, dt := s.uniform(720, 1080), s.decades(-10, 10)
		e := s.decades(-6, -2.5)
		normal := free(temperature) + e*s.NormFloat64()
		strain := old.Creep.Add(tensor.Identity().Scale(normal)).Add(s.deviator().Scale(e))
		var step integrate.Result
		var full integrate.MixedResult
		require.NoError(t, m.Step(&step, &old, integrate.Increment{Dt: dt, Strain: strain, Temperature: temperature}), kind.name)
		require.NoError(t, m.StepMixed(&full, &old, integrate.MixedIncrement{Dt: dt, Prescribed: strain,
			Temperature: temperature}), kind.name)
		size := e + strain.Norm() + step.State.Creep.Norm()
		gap := agreement{
			stress: scaledGap(step.Stress, full.Stress, 3*young*(e+math.Abs(normal))) / max(1, 1e-3*size/e),
			strain: scaledGap(strain, full.Strain, size),
			state:  stateGap(&step.State, &full.State, size),
			byT:    scaledGap(step.ByTemperature, full.StressByTemperature, young*(1e-5+10*e)),
		}
		for j := range 6 {
			unit := tensor.Sym{}
			unit[j] = 1
			column := step.Tangent.Contract(unit)
			for k := range 6 {
				gap.tangent = max(gap.tangent, math.Abs(column[k]-full.StressBy[k][j])/young)
			}
		}
		all.add(gap)
		if !all.check(t, kind.name, i) {
			return
		}
	}
	t.Logf("all strains: %.0e", all)
}
