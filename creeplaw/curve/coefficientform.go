package curve

import "math"

// common is the form that nearly all coefficients have: a logarithm linear in ln σ, σ, T, σT and 1/T, times a power of a
// hyperbolic sine of stress. Constants, powers, exponentials, hyperbolic sines, Arrhenius factors and their products are of
// this one form.
type common struct {
	intercept, exponent, byStress        float64
	byTemperature, byProduct, activation float64
	sinhCoefficient, sinhExponent        float64 // B and n of sinhⁿ(Bσ); n = 0 for none
}

func (c *common) at(x condition) (v LogValue) {
	c.linear(&v, &x)
	if c.sinhExponent != 0 {
		logSinh, byLog := logSinh(c.sinhCoefficient * x.stress)
		v.Value += c.sinhExponent * logSinh
		v.ByLogStress += c.sinhExponent * byLog
	}
	return v
}

// linear is the logarithm without the hyperbolic sine.
func (c *common) linear(v *LogValue, x *condition) {
	byStress := c.byStress * x.stress
	v.Value = c.intercept + byStress
	v.ByLogStress = byStress
	if c.exponent != 0 { // its logarithm is infinite at zero stress
		v.Value += c.exponent * x.logStress
		v.ByLogStress += c.exponent
	}
	if c.activation != 0 {
		a := c.activation * x.inverse
		v.Value -= a
		v.ByLogTemperature = a
	}
	if c.byTemperature != 0 || c.byProduct != 0 {
		t, both := c.byTemperature*x.temperature, c.byProduct*x.stress*x.temperature
		v.Value += t + both
		v.ByLogStress += both
		v.ByLogTemperature += t + both
	}
}

func (c *common) plainAt(x condition) plainValue {
	var v LogValue
	c.linear(&v, &x)
	if c.sinhExponent == 0 {
		return plainOf(v)
	}
	y := c.sinhCoefficient * x.stress
	if !(y > 0.35 && y < 200) { // where the difference of exponentials keeps its digits
		return plainOf(c.at(x))
	}
	up := math.Exp(y)
	down := 1 / up
	sinh, cosh := 0.5*(up-down), 0.5*(up+down)
	p := plainValue{0, v.ByLogStress + c.sinhExponent*y*cosh/sinh, v.ByLogTemperature}
	switch c.sinhExponent {
	case 1:
		p.value = math.Exp(v.Value) * sinh
	case 3:
		p.value = math.Exp(v.Value) * sinh * sinh * sinh
	default:
		p.value = math.Exp(v.Value + c.sinhExponent*math.Log(sinh))
	}
	return p
}

// logSinh is ln sinh y and its derivative by ln y.
func logSinh(y float64) (value, byLog float64) {
	switch {
	case y > late:
		return y - math.Ln2, y
	case y > 0:
		e := -math.Expm1(-2 * y) // sinh y = eʸ·e/2
		return y - math.Ln2 + math.Log(e), y * (2 - e) / e
	}
	return math.Inf(-1), 1
}

// product is a common coefficient times any others.
type product struct {
	common common
	others []prepared
}

func (c *product) at(x condition) LogValue {
	all := c.common.at(x)
	for _, other := range c.others {
		l := other.at(x)
		all.Value += l.Value
		all.ByLogStress += l.ByLogStress
		all.ByLogTemperature += l.ByLogTemperature
	}
	return all
}

func (c *product) plainAt(x condition) plainValue { return plainOf(c.at(x)) }

// multiplied is a product with all common factors drawn together, as far as they are of one form.
func multiplied(a, b prepared) prepared {
	p, q := asProduct(a), asProduct(b)
	if p.common.sinhExponent != 0 && q.common.sinhExponent != 0 {
		kept := q.common
		p.others = append(p.others[:len(p.others):len(p.others)], &kept)
		q.common = common{}
	}
	p.common.intercept += q.common.intercept
	p.common.exponent += q.common.exponent
	p.common.byStress += q.common.byStress
	p.common.byTemperature += q.common.byTemperature
	p.common.byProduct += q.common.byProduct
	p.common.activation += q.common.activation
	p.common.sinhCoefficient += q.common.sinhCoefficient
	p.common.sinhExponent += q.common.sinhExponent
	p.others = append(p.others[:len(p.others):len(p.others)], q.others...)
	if len(p.others) == 0 {
		return &p.common
	}
	return &p
}

func asProduct(a prepared) product {
	switch a := a.(type) {
	case *common:
		return product{common: *a}
	case *product:
		return *a
	}
	return product{others: []prepared{a}}
}

// scale is a coefficient in its place in a term: the common form is kept by value, and called without indirection.
type scale struct {
	common common
	other  prepared // nil if the common form is all
}

func scaleOf(p prepared) scale {
	if c, ok := p.(*common); ok {
		return scale{common: *c}
	}
	return scale{other: p}
}

func (s *scale) at(x *condition) LogValue {
	if s.other != nil {
		return s.other.at(*x)
	}
	return s.common.at(*x)
}

func (s *scale) plainAt(x *condition) plainValue {
	if s.other != nil {
		return s.other.plainAt(*x)
	}
	return s.common.plainAt(*x)
}
