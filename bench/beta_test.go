package bench

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/holdtime/bench/check"
)

// betaTolerance on ln I: the trapezoidal sum is good to rounding, and the logarithm of I is formed from terms of up to 1e5.
const betaTolerance = 1e-13

// TestBetaElementary holds the quadrature against the cases that need none.
func TestBetaElementary(t *testing.T) {
	for z := -600.0; z <= 600; z += 37.5 {
		w, logRest := 1/(1+math.Exp(-z)), -softplus(z) // and ln(1-w)
		for _, c := range []struct {
			name    string
			a, b, i float64 // i is ln I
		}{
			{"b = a + 1: [w/(1-w)]ᵃ", 3.5, 4.5, 3.5 * z},
			{"a = b = 1: -ln(1-w)", 1, 1, math.Log(-logRest)},
			{"a = 1, b = 20: [(1-w)^(-19) - 1]/19", 1, 20, logExpm1(-19*logRest) - math.Log(19)},
			{"a = 1/2, b = 1: artanh √w", 0.5, 1, math.Log(atanhSqrt(w, logRest))},
		} {
			got, slope := incompleteBeta{c.a, c.b}.log(z)
			check.Scaled(t, c.name, got, c.i, 1+math.Abs(c.i), betaTolerance)
			check.Scaled(t, c.name+", inverse", incompleteBeta{c.a, c.b}.odds(got), z, (1+math.Abs(got))/slope, betaTolerance)
		}
	}
}

// logExpm1 is ln(eˣ - 1).
func logExpm1(x float64) float64 { return x + math.Log(-math.Expm1(-x)) }

func atanhSqrt(w, logRest float64) float64 {
	root := math.Sqrt(w)
	return math.Log1p(root) - logRest/2 // ½ ln[(1+√w)²/(1-w)]
}

// TestBetaQuadrature holds the general case against Gauss–Legendre quadrature of gonum on the definition, in panels that
// halve towards v = 0 where vᵃ may have a root.
func TestBetaQuadrature(t *testing.T) {
	for _, i := range []incompleteBeta{{2.5, 12.5}, {2, 10}, {4, 4}, {1.25, 1.25}, {10, 30}, {20, 200}, {1, 50}} {
		for _, w := range []float64{0.01, 0.1, 0.3, 0.6, 0.9} {
			f := func(v float64) float64 { return i.a * math.Exp((i.a-1)*math.Log(v)-i.b*math.Log1p(-v)) }
			want := 0.0
			for high := w; high > w*0x1p-60; high /= 2 {
				want += quad.Fixed(f, high/2, high, 200, quad.Legendre{}, 0)
			}
			got, _ := i.log(math.Log(w / (1 - w)))
			// Rounding: exponents of up to 1e3 lose three digits in f.
			check.Rel(t, "incomplete beta", math.Exp(got), want, 1e-12)
		}
	}
}

// TestBetaInverse goes to the limits of the parameters: the iteration must come back to where it started, wherever that is.
func TestBetaInverse(t *testing.T) {
	for _, i := range []incompleteBeta{{1, 1}, {1, 1.001}, {20, 1000}, {20, 20}, {0.02, 1}, {2, 1}, {1, 50}, {1.05, 1.06}, {20, 21.5}} {
		for z := -650.0; z <= 650; z += 13 {
			v, slope := i.log(z)
			check.Scaled(t, "inverse", i.odds(v), z, (1+math.Abs(v))/slope, betaTolerance)
		}
	}
	check.Abs(t, "before the start", incompleteBeta{2, 5}.odds(math.Inf(-1)), math.Inf(-1), 0)
	check.Abs(t, "after all", incompleteBeta{2, 1}.odds(1e300), math.Inf(1), 0)
	if z := (incompleteBeta{2, 5}).odds(math.NaN()); !math.IsNaN(z) {
		t.Errorf("NaN became %v", z)
	}
}
