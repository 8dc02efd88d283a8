package creeplaw_test

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/holdtime/creeplaw"
)

// The reference for rounding is math/big at 600 bits: enough for sinh x at x = 1e-30, where two exponentials cancel to a
// hundredth of a hundred bits, and for exp x at |x| = 1e4. Arguments are float64 and so exact in it.
const bigPrecision = 600

func bigOf(x float64) *big.Float { return new(big.Float).SetPrec(bigPrecision).SetFloat64(x) }

func bigMul(a, b *big.Float) *big.Float { return new(big.Float).Mul(a, b) }

// bigPow is xⁿ for a whole n > 0.
func bigPow(x *big.Float, n int) *big.Float {
	p := bigOf(1)
	for range n {
		p = bigMul(p, x)
	}
	return p
}

// bigExp sums the Taylor series of exp about zero at x/2^k and squares the sum k times.
func bigExp(x *big.Float) *big.Float {
	k := 8
	if e := x.MantExp(nil); e > 0 {
		k += e
	}
	small := new(big.Float).SetMantExp(x, -k)
	sum, term := bigOf(1), bigOf(1)
	for i := 1; i <= 90; i++ { // (1/256)⁹⁰ is far below 2⁻⁶⁰⁰
		term = new(big.Float).Quo(bigMul(term, small), bigOf(float64(i)))
		sum = new(big.Float).Add(sum, term)
	}
	for range k {
		sum = bigMul(sum, sum)
	}
	return sum
}

// bigSinhCosh is 2 sinh x and 2 cosh x.
func bigSinhCosh(x *big.Float) (sinh2, cosh2 *big.Float) {
	e := bigExp(x)
	inverse := new(big.Float).Quo(bigOf(1), e)
	return new(big.Float).Sub(e, inverse), new(big.Float).Add(e, inverse)
}

// relativeError is |got/want - 1|.
func relativeError(got, want *big.Float) float64 {
	q := new(big.Float).Quo(got, want)
	d, _ := q.Sub(q, bigOf(1)).Float64()
	return math.Abs(d)
}

// logError is |got - ln want|, formed without a logarithm: exp(got)/want - 1 is that difference, both being near zero.
func logError(got float64, want *big.Float) float64 { return relativeError(bigExp(bigOf(got)), want) }

// budget collects errors as multiples of what rounding explains.
type budget struct {
	worst, sum float64
	count      int
	at         string
}

func (b *budget) note(multiple float64, at string) {
	if !(multiple <= b.worst) {
		b.worst, b.at = multiple, at
	}
	b.sum += multiple
	b.count++
}

// within holds the worst to its limit. It prints the row that documentation may quote.
func (b *budget) within(t *testing.T, label string, limit float64) {
	t.Helper()
	t.Logf("%s: worst %.2f, mean %.2f of the unit of rounding; worst at %s", label, b.worst, b.sum/float64(b.count), b.at)
	assert.Truef(t, b.worst <= limit, "%s: %.3g units of rounding at %s, allowed %g", label, b.worst, b.at, limit)
	assert.Positive(t, b.count, label)
}

const epsilon = 0x1p-52

// A sanity check of the reference itself: e to 50 digits (OEIS A001113).
func TestReferenceExponential(t *testing.T) {
	e, _, err := big.ParseFloat("2.71828182845904523536028747135266249775724709369995", 10, bigPrecision, big.ToNearestEven)
	assert.NoError(t, err)
	assert.True(t, relativeError(bigExp(bigOf(1)), e) < 1e-49)
	tenth := bigPow(bigExp(new(big.Float).Quo(bigOf(1), bigOf(64))), 64)
	assert.True(t, relativeError(tenth, e) < 1e-49)
	assert.True(t, relativeError(bigMul(bigExp(bigOf(-2000)), bigExp(bigOf(2000))), bigOf(1)) < 1e-150)
}

// at is a point where neither strain nor temperature should matter.
func at(stress float64) creeplaw.Point {
	return creeplaw.Point{Stress: stress, Strain: 0.01, Temperature: 800}
}
