package creeplaw

import "math"

var (
	_ Parametric = BaileyNorton{}
	_ Parametric = StrainHardening{}
)

// timeExponentNumber is a time exponent of primary creep, above 0 and at most 1.
func timeExponentNumber() Parameter { return Parameter{Name: "time exponent", High: 1} }

// strainExponentNumber is a strain exponent of hardening, at most 0.
func strainExponentNumber() Parameter { return Parameter{Name: "strain exponent", Low: math.Inf(-1)} }

func baileyForm(v []float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", Dimension{Stress: -v[1], Time: -v[2]}),
			positiveNumber("stress exponent", dimensionless), timeExponentNumber()},
		func(v []float64) (Law, error) { return NewBaileyNorton(v[0], v[1], v[2]) },
	}
}

func baileyAtForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("strain", dimensionless), positiveNumber("stress", inStress),
			positiveNumber("time", Dimension{Time: 1}), positiveNumber("stress exponent", dimensionless),
			timeExponentNumber()},
		func(v []float64) (Law, error) { return NewBaileyNortonAt(v[0], v[1], v[2], v[3], v[4]) },
	}
}

func hardeningForm(v []float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("prefactor", perPower(v[1])), positiveNumber("stress exponent", dimensionless),
			strainExponentNumber()},
		func(v []float64) (Law, error) { return NewStrainHardening(v[0], v[1], v[2]) },
	}
}

func hardeningAtForm([]float64) form[Law] {
	return form[Law]{
		[]Parameter{positiveNumber("rate", perTime), positiveNumber("stress", inStress),
			positiveNumber("strain", dimensionless), positiveNumber("stress exponent", dimensionless),
			strainExponentNumber()},
		func(v []float64) (Law, error) { return NewStrainHardeningAt(v[0], v[1], v[2], v[3], v[4]) },
	}
}
