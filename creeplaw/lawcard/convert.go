package lawcard

import (
	"math"
	"math/big"

	"example.com/holdtime/creeplaw"
)

// A prefactor changes by the unit of stress to the power of the stress exponent: (10⁶)⁻⁵⁰ from MPa to Pa. The factors are
// formed at high precision, where nothing overflows and a power is exact for all a float64 can tell; a converted number is
// rounded once. What then leaves the range of a float64 is for the caller to avoid.

const precision = 128

func exact(x float64) *big.Float { return new(big.Float).SetPrec(precision).SetFloat64(x) }

func quotient(a, b float64) *big.Float { return new(big.Float).Quo(exact(a), exact(b)) }

// utmost is the largest power of a unit that is formed; no float64 would hold what comes of a larger one.
const utmost = 1e5

// power is x^n, n finite, |n| ≤ utmost: whole powers by squaring, the binary digits of the fraction by square roots.
func power(x *big.Float, n float64) *big.Float {
	result := exact(1)
	whole, fraction := math.Modf(math.Abs(n))
	square := new(big.Float).Copy(x)
	for k := uint64(whole); k > 0; k >>= 1 {
		if k&1 == 1 {
			result.Mul(result, square)
		}
		square.Mul(square, square)
	}
	root := new(big.Float).Copy(x)
	for fraction > 0 {
		fraction *= 2
		root.Sqrt(root)
		if fraction >= 1 {
			result.Mul(result, root)
			fraction--
		}
	}
	if n < 0 {
		return result.Quo(exact(1), result)
	}
	return result
}

// conversion takes numbers from the units of a card to those of the host.
type conversion struct {
	from units
	to   creeplaw.Units
}

// idle tells whether nothing changes.
func (c conversion) idle() bool { return c.from.Units == c.to && c.from.temperature == kelvin }

// factor is what a quantity of the dimension is multiplied by; false if its powers are beyond all use.
func (c conversion) factor(d creeplaw.Dimension) (*big.Float, bool) {
	result := exact(1)
	for _, part := range []struct {
		ratio *big.Float
		power float64
	}{
		{quotient(float64(c.from.Stress), float64(c.to.Stress)), d.Stress},
		{quotient(float64(c.from.Time), float64(c.to.Time)), d.Time},
		{c.from.temperature.degree(), d.Temperature},
	} {
		if part.ratio.Cmp(exact(1)) == 0 {
			continue
		}
		if !(math.Abs(part.power) <= utmost) {
			return result, false
		}
		result.Mul(result, power(part.ratio, part.power))
	}
	return result, true
}

// temperature reads a place on the temperature scale, in K. It goes by the decimal digits of the card, so that -273.15 degC is
// zero.
func (r *reading) temperature(v value, c conversion) float64 {
	x := r.number(v)
	if r.err != nil || c.from.temperature == kelvin {
		return x
	}
	t, _, err := big.ParseFloat(v.text, 10, precision, big.ToNearestEven)
	if err != nil {
		r.fail(v, BadNumber, "is %s, which cannot be converted", quoted(v.text))
		return x
	}
	t.Add(t, c.from.temperature.shift())
	return rounded(t.Mul(t, c.from.temperature.degree()))
}

// quantity converts a number of the dimension.
func (c conversion) quantity(x float64, d creeplaw.Dimension) (float64, bool) {
	if c.idle() || x == 0 || d == (creeplaw.Dimension{}) {
		return x, true
	}
	f, ok := c.factor(d)
	if !ok {
		return x, false
	}
	y := rounded(f.Mul(f, exact(x)))
	return y, normal(y) || !normal(x)
}

// parameter converts the value of a parameter; false if a float64 cannot hold what comes of it, or nothing can.
func (c conversion) parameter(p creeplaw.Parameter) (float64, bool) {
	switch p.Scale {
	case creeplaw.Proportional:
		return c.quantity(p.Value, p.Dimension)
	case creeplaw.OnTemperatureScale:
		return p.Value, true // in K since it was read
	case creeplaw.LogarithmOf:
		f, ok := c.factor(p.Dimension)
		if !ok {
			return p.Value, false
		}
		if f.Cmp(exact(1)) == 0 {
			return p.Value, true
		}
		return p.Value + logarithm(f), true
	}
	return p.Value, c.from.Units == c.to
}

// parameters converts all of them.
func (c conversion) parameters(ps []creeplaw.Parameter) ([]float64, bool) {
	values, all := make([]float64, len(ps)), true
	for i, p := range ps {
		var ok bool
		values[i], ok = c.parameter(p)
		all = all && ok
	}
	return values, all
}

// rounded is the nearest float64.
func rounded(x *big.Float) float64 {
	y, _ := x.Float64()
	return y
}

// normal tells whether a number has all its digits.
func normal(x float64) bool {
	x = math.Abs(x)
	return x >= 0x1p-1022 && !math.IsInf(x, 1)
}

// logarithm is ln x of a number that a float64 may not hold.
func logarithm(x *big.Float) float64 {
	mantissa := new(big.Float)
	exponent := x.MantExp(mantissa)
	return math.Log(rounded(mantissa)) + float64(exponent)*math.Ln2
}
