package bench_test

import (
	"errors"
	"math"
	"reflect"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/tensor"
)

// everyProblem is one valid value of each type of the package.
func everyProblem() []problem {
	law, curve := norton(1e-16, 5), bailey(1e-15, 5, 0.4)
	return []problem{
		bench.BarRelaxation{Young: 1, Stress: 1, Law: law},
		bench.FollowUpRelaxation{Young: 1, Stress: 1, FollowUp: 1, Law: law},
		bench.SinhRelaxation{Young: 1, Stress: 1, Prefactor: 1, Coefficient: 1},
		bench.SolidRelaxation{Young: 1, Poisson: 0.3, Stress: tensor.Sym{}, Law: law},
		bench.ShearRelaxation{Shear: 1, Stress: 1, Law: law},
		bench.EqualBiaxialRelaxation{Young: 1, Poisson: 0.3, Stress: 1, Law: law},
		bench.OppositeBiaxialRelaxation{Young: 1, Poisson: 0.3, Stress: 1, Law: law},
		bench.StrainHardeningRelaxation{Young: 1, Stress: 1, Curve: curve},
		bench.TimeHardeningRelaxation{Young: 1, Stress: 1, Curve: curve},
		bench.ConstantRateTension{Young: 1, StrainRate: 1, Law: law},
		bench.NortonCreep{Stress: 1, Law: law},
		bench.GarofaloCreep{Stress: 1, Law: bench.Garofalo{Prefactor: 1, Coefficient: 1, Exponent: 1}},
		bench.BaileyNortonCreep{Stress: 1, Curve: curve},
		bench.StrainHardeningCreep{Stress: 1, Law: bench.StrainHardening{Rate: 1, Stress: 1, Strain: 1, StressExponent: 1}},
		bench.PrimarySecondaryCreep{Stress: 1, Primary: curve, Secondary: law},
		bench.ParallelCreep{Stress: 1, Primary: curve, Secondary: law},
		bench.SteadyFlow{Law: law},
		bench.TwoStepCreep{First: 1, Change: 1, Second: 1, Curve: curve},
		bench.ThickCylinder{Inner: 1, Outer: 2, Pressure: 1, Law: law},
		bench.ThickSphere{Inner: 1, Outer: 2, Pressure: 1, Law: law},
		bench.RectangularBeam{Width: 1, HalfDepth: 1, Moment: 1, Law: law},
		bench.Cantilever{Width: 1, HalfDepth: 1, Length: 1, Load: 1, Law: law},
		bench.TorsionBar{Radius: 1, Torque: 1, Law: law},
		bench.TwoBars{Length1: 1, Length2: 1, Area1: 1, Area2: 1, Load: 1, Law: law},
		bench.ThreeBarTruss{Angle: 1, Length: 1, Area: 1, Load: 1, Law: law},
	}
}

// number is one float64 of a problem, reached through its fields.
type number struct {
	name  string // as ParameterError names it
	value reflect.Value
}

func numbers(prefix string, v reflect.Value) (all []number) {
	switch v.Kind() {
	case reflect.Float64:
		return []number{{prefix, v}}
	case reflect.Array: // a tensor
		for i := range v.Len() {
			all = append(all, number{prefix + " " + [6]string{"xx", "yy", "zz", "yz", "xz", "xy"}[i], v.Index(i)})
		}
	case reflect.Struct:
		for i := range v.NumField() {
			name := v.Type().Field(i).Name
			if prefix != "" {
				name = prefix + "." + name
			}
			all = append(all, numbers(name, v.Field(i))...)
		}
	default:
		panic("a problem has a field of kind " + v.Kind().String())
	}
	return all
}

// TestEveryParameterIsChecked sets each number of each problem to each value it cannot have.
func TestEveryParameterIsChecked(t *testing.T) {
	checked := 0
	for _, p := range everyProblem() {
		require.NoError(t, p.Check())
		kind := reflect.TypeOf(p)
		for i := range numbers("", reflect.ValueOf(p)) {
			fresh := reflect.New(kind).Elem()
			fresh.Set(reflect.ValueOf(p))
			field := numbers("", fresh)[i]
			for _, bad := range badValues(field.name) {
				field.value.SetFloat(bad)
				err := fresh.Interface().(problem).Check()
				var fault *bench.ParameterError
				if !errors.As(err, &fault) {
					t.Errorf("%s: %s = %v gives %v", kind.Name(), field.name, bad, err)
					continue
				}
				assert.Equal(t, kind.Name(), fault.Problem)
				assert.Equal(t, field.name, fault.Parameter, "%s: %v", kind.Name(), bad)
				assert.Contains(t, err.Error(), strconv.FormatFloat(bad, 'g', -1, 64))
				checked++
			}
		}
	}
	require.Greater(t, checked, 700, "the table shrank") // 25 problems of 3 to 11 numbers, 3 to 6 bad values each
}

func badValues(name string) []float64 {
	nan, inf := math.NaN(), math.Inf(1)
	switch {
	case len(name) > 7 && name[:7] == "Stress ": // a component
		return []float64{nan, inf, -inf}
	case name == "Poisson":
		return []float64{nan, inf, -inf, -1, 0.5}
	case name == "FollowUp":
		return []float64{nan, inf, -inf, 0, -1, 0.999}
	case name == "Angle":
		return []float64{nan, inf, -inf, 0, math.Pi / 2}
	case name == "Outer":
		return []float64{nan, inf, -inf, 0, -1, 0.5}
	case name == "Law.StrainExponent":
		return []float64{nan, inf, -inf, 0.1}
	case name == "Curve.TimeExponent" || name == "Primary.TimeExponent":
		return []float64{nan, inf, -inf, 0, -1, 1.01}
	}
	return []float64{nan, inf, -inf, 0, -1}
}

func TestHardeningExponentsMustFit(t *testing.T) {
	err := bench.StrainHardeningRelaxation{Young: 1, Stress: 1, Curve: bailey(1, 0.3, 0.4)}.Check()
	var fault *bench.ParameterError
	require.ErrorAs(t, err, &fault)
	assert.Equal(t, "Curve.StressExponent", fault.Parameter)
}
