package creeplaw

import "fmt"

var (
	_ Parametric = Omega{}
	_ UnitBound  = Omega{}
)

// InitialRate returns the law of the initial rate; nil for one given by polynomials.
func (o Omega) InitialRate() Law { return partOf(o.initial) }

// OwnUnits returns ksi and h for a law given by polynomials; the zero Units, for none, otherwise.
func (o Omega) OwnUnits() Units {
	if o.poly == nil {
		return Units{}
	}
	return Units{KilopoundPerSquareInch, Hour}
}

const acceleration = "coefficient of acceleration"

// Parameters returns Ω and those of the initial rate, "initial rate: …"; or the coefficients A0 … A4 and B0 … B4 of the
// polynomials and their ranges.
func (o Omega) Parameters() []Parameter {
	switch {
	case o.poly != nil:
		return o.poly.given.parameters()
	case o.initial == nil:
		return nil
	}
	all := partly{parameters: []Parameter{positiveNumber(acceleration, dimensionless).of(o.omega)}}
	all.law("initial rate", o.InitialRate())
	return all.list()
}

// WithParameters rebuilds the law.
func (o Omega) WithParameters(values []float64) (Law, error) {
	r := rebuilding{name: omegaName, rest: values}
	if o.poly != nil {
		p := polynomialsFrom(&r)
		if err := r.done(); err != nil {
			return nil, err
		}
		return orNil(NewOmegaFromPolynomials(p))
	}
	omega := r.one()
	initial := r.law("initial rate", o.InitialRate())
	if err := r.done(); err != nil {
		return nil, err
	}
	return orNil(NewOmega(initial, omega))
}

func (p *OmegaPolynomials) parameters() []Parameter {
	var all []Parameter
	for i, c := range p.Rate {
		all = append(all, anyNumber(fmt.Sprintf("A%d", i), dimensionless).of(c))
	}
	for i, c := range p.Acceleration {
		all = append(all, anyNumber(fmt.Sprintf("B%d", i), dimensionless).of(c))
	}
	all = fixed(append(all, positiveNumber("lowest stress", dimensionless).of(p.Stress[0]),
		positiveNumber("highest stress", dimensionless).of(p.Stress[1]))...)
	return append(all, temperatureNumber("lowest temperature").of(p.Temperature[0]),
		temperatureNumber("highest temperature").of(p.Temperature[1]))
}

// polynomialsFrom names a coefficient that is not finite, which the constructor does not.
func polynomialsFrom(r *rebuilding) (p OmegaPolynomials) {
	for i := range p.Rate {
		p.Rate[i] = r.finite(fmt.Sprintf("A%d", i))
	}
	for i := range p.Acceleration {
		p.Acceleration[i] = r.finite(fmt.Sprintf("B%d", i))
	}
	p.Stress = [2]float64{r.one(), r.one()}
	p.Temperature = [2]float64{r.one(), r.one()}
	return p
}

func (r *rebuilding) finite(name string) float64 {
	x := r.one()
	if !finite(x) {
		r.fail("", &ParameterError{r.name, name, x, "finite"})
	}
	return x
}
