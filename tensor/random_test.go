package tensor_test

import (
	"flag"
	"math"
	"math/rand/v2"
	"testing"

	"example.com/holdtime/tensor"
)

// campaign multiplies the number of random cases: go test -campaign ./tensor/
var campaign = flag.Bool("campaign", false, "run the long random campaigns")

const eps = 0x1p-52 // spacing of float64 at one; rounding errs by half of it

// source returns a generator for a test, whose seed is printed when the test fails, and the number of cases to run.
func source(t *testing.T, seed uint64, cases int) (*rand.Rand, int) {
	t.Helper()
	t.Cleanup(func() {
		if t.Failed() {
			t.Logf("random source: PCG(%d, 1)", seed)
		}
	})
	if *campaign {
		cases *= 200
	}
	return rand.New(rand.NewPCG(seed, 1)), cases
}

// randomSym has a size log-uniform over 24 decades; each component is zero in one case out of eight, so that planes and
// axes of symmetry occur.
func randomSym(r *rand.Rand) tensor.Sym {
	size := math.Pow(10, 24*r.Float64()-12)
	var a tensor.Sym
	for i := range a {
		if r.IntN(8) != 0 {
			a[i] = size * (2*r.Float64() - 1)
		}
	}
	return a
}

// randomRotation turns about a uniform direction by a uniform angle up to half a turn.
func randomRotation(t *testing.T, r *rand.Rand) tensor.Rotation {
	t.Helper()
	q, err := tensor.AxisAngle([3]float64{r.NormFloat64(), r.NormFloat64(), r.NormFloat64()}, math.Pi*r.Float64())
	if err != nil {
		t.Fatal(err)
	}
	return q
}

// randomTangent has no major symmetry.
func randomTangent(r *rand.Rand) tensor.Tangent {
	size := math.Pow(10, 24*r.Float64()-12)
	var c tensor.Tangent
	for i := range c {
		for j := range c[i] {
			c[i][j] = size * (2*r.Float64() - 1)
		}
	}
	return c
}

// flat returns the rows of a tangent one after the other.
func flat(c tensor.Tangent) []float64 {
	var rows []float64
	for i := range c {
		rows = append(rows, c[i][:]...)
	}
	return rows
}

func maxAbs(values []float64) float64 {
	m := 0.0
	for _, v := range values {
		m = max(m, math.Abs(v))
	}
	return m
}
