package dirk

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench/check"
)

// The coefficients of dirk.go again, as exact fractions: Kennedy & Carpenter 2003, from memory.
var (
	exactWeights = [Stages][]string{
		{"0"},
		{"1/4", "1/4"},
		{"8611/62500", "-1743/31250", "1/4"},
		{"5012029/34652500", "-654441/2922500", "174375/388108", "1/4"},
		{"15267082809/155376265600", "-71443401/120774400", "730878875/902184768", "2285395/8070912", "1/4"},
		{"82889/524892", "0", "15625/83664", "69875/102672", "-2260/8211", "1/4"},
	}
	exactEmbedded = []string{"4586570599/29645900160", "0", "178811875/945068544", "814220225/1159782912",
		"-3700637/11593932", "61727/225920"}
)

type vector []*big.Rat

func vectorOf(texts []string) vector {
	v := make(vector, Stages)
	for i := range v {
		v[i] = new(big.Rat)
		if i < len(texts) {
			if _, ok := v[i].SetString(texts[i]); !ok {
				panic(texts[i])
			}
		}
	}
	return v
}

func (a vector) dot(b vector) *big.Rat {
	sum := new(big.Rat)
	for i := range a {
		sum.Add(sum, new(big.Rat).Mul(a[i], b[i]))
	}
	return sum
}

func (a vector) times(b vector) vector {
	v := make(vector, Stages)
	for i := range v {
		v[i] = new(big.Rat).Mul(a[i], b[i])
	}
	return v
}

// TestMethodMeetsItsOrderConditions: the order conditions of Runge–Kutta methods up to order four (J. C. Butcher, 1963; the
// trees with up to four nodes), in exact arithmetic. They fix a fourth-order method's coefficients so tightly that a misprint
// could not pass.
func TestMethodMeetsItsOrderConditions(t *testing.T) {
	var a [Stages]vector
	ones := make(vector, Stages)
	for i := range a {
		a[i] = vectorOf(exactWeights[i])
		ones[i] = big.NewRat(1, 1)
	}
	times := func(v vector) vector {
		w := make(vector, Stages)
		for i := range w {
			w[i] = a[i].dot(v)
		}
		return w
	}
	c := times(ones)
	conditions := []struct {
		v    vector
		sum  *big.Rat
		most int // order that needs it
	}{
		{ones, big.NewRat(1, 1), 1},
		{c, big.NewRat(1, 2), 2},
		{c.times(c), big.NewRat(1, 3), 3}, {times(c), big.NewRat(1, 6), 3},
		{c.times(c).times(c), big.NewRat(1, 4), 4}, {c.times(times(c)), big.NewRat(1, 8), 4},
		{times(c.times(c)), big.NewRat(1, 12), 4}, {times(times(c)), big.NewRat(1, 24), 4},
	}
	b, lower := a[Stages-1], vectorOf(exactEmbedded)
	differs := false
	for _, k := range conditions {
		require.Zero(t, b.dot(k.v).Cmp(k.sum), "order %d", k.most)
		if k.most < Order {
			require.Zero(t, lower.dot(k.v).Cmp(k.sum), "embedded, order %d", k.most)
		} else if lower.dot(k.v).Cmp(k.sum) != 0 {
			differs = true
		}
	}
	require.True(t, differs, "an embedded result of the same order would estimate nothing")
	for i := range a {
		if i > 0 {
			require.Zero(t, a[i][i].Cmp(big.NewRat(1, 4)), "the diagonal is constant")
		}
		want, _ := c[i].Float64()
		check.ULP(t, "abscissa", Abscissae[i], want, 0)
		for j := range a[i] {
			want, _ := a[i][j].Float64()
			check.ULP(t, "weight", Weights[i][j], want, 1)
		}
		want, _ = lower[i].Float64()
		check.ULP(t, "embedded weight", Embedded[i], want, 1)
	}
	require.Equal(t, Diagonal, Weights[1][1])
}

// TestMethodIsLStable: on y' = λy the last stage's growth factor must vanish as λh → -∞, since a relaxed stress must stay so.
func TestMethodIsLStable(t *testing.T) {
	for _, z := range []float64{-1, -10, -1e3, -1e6, -1e9} {
		var y [Stages]float64
		y[0] = 1
		for i := 1; i < Stages; i++ {
			sum := 1.0
			for j := range i {
				sum += z * Weights[i][j] * y[j]
			}
			y[i] = sum / (1 - z*Weights[i][i])
		}
		growth := y[Stages-1]
		require.LessOrEqual(t, growth*growth, 1.0, "z = %v", z)
		if z <= -1e3 {
			check.Abs(t, "growth factor", growth, 0, 20/-z) // the limit is approached as 1/z
		}
	}
}

// TestFactorSettles: under a steady error that goes with the power of the method the length settles where the error is a good
// part of what is allowed, and a rejected step is always shortened.
func TestFactorSettles(t *testing.T) {
	length, before := 1e-3, 1.0
	for range 60 {
		now := length * length * length * length // allowed is 1 at length 1
		f := Factor(now, before)
		require.LessOrEqual(t, f, 6.0)
		length, before = length*f, now
	}
	require.Less(t, length, 1.0)
	require.Greater(t, length, 0.7)
	for _, now := range []float64{1.0001, 3, 1e3, 1e30} {
		require.Less(t, Factor(now, 1), 1.0)
		require.GreaterOrEqual(t, Factor(now, 1), 0.15)
	}
	require.Equal(t, 6.0, Factor(0, 1), "no error at all")
}
