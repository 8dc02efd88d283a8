package bench_test

import (
	"fmt"
	"os"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/bench"
	"example.com/holdtime/bench/check"
)

// TestFortyDigits holds the problems against arithmetic of 40 digits (mpmath; testdata/closedforms.py says how) over 80
// random parameter sets each: exponents from 0.3 to 50, n within 1e-6 of 1, units over 12 decades.
//
// Tolerance 1e-12, which the package promises; the worst is printed with -v.
func TestFortyDigits(t *testing.T) {
	text, err := os.ReadFile("testdata/closedforms.csv")
	require.NoError(t, err)
	worst, counts := map[string]float64{}, map[string]int{}
	for line := range strings.Lines(string(text)) {
		if strings.HasPrefix(line, "#") {
			continue
		}
		name, rest, _ := strings.Cut(strings.TrimSpace(line), ",")
		left, right, ok := strings.Cut(rest, ",->,")
		require.True(t, ok, "a line without answers: %s", line)
		a, want := floats(t, left), floats(t, right)
		got := answers(t, name, a)
		require.Len(t, got, len(want))
		for i := range want {
			label := fmt.Sprintf("%s, answer %d", name, i)
			check.Rel(t, label+" of "+line, got[i], want[i], 1e-12)
			worst[label] = max(worst[label], abs(got[i]/want[i]-1))
		}
		counts[name]++
	}
	require.Equal(t, map[string]int{"bar": 80, "sinh": 80, "hardening": 80, "rate": 80, "parallel": 80}, counts)
	for label, e := range worst {
		t.Logf("%-20s worst relative error %.1e", label, e)
	}
}

func abs(x float64) float64 { return max(x, -x) }

func floats(t *testing.T, list string) (all []float64) {
	t.Helper()
	for word := range strings.SplitSeq(list, ",") {
		x, err := strconv.ParseFloat(word, 64)
		require.NoError(t, err)
		all = append(all, x)
	}
	return all
}

// answers computes a row with the package.
func answers(t *testing.T, name string, a []float64) []float64 {
	t.Helper()
	switch name {
	case "bar":
		p := valid(t, bench.BarRelaxation{Young: a[0], Law: bench.Norton{Rate: a[1], Stress: a[2], Exponent: a[3]}, Stress: a[4]})
		return []float64{p.StressAt(a[5]), p.CreepAt(a[5]), p.TimeTo(a[6])}
	case "sinh":
		p := valid(t, bench.SinhRelaxation{Young: a[0], Prefactor: a[1], Coefficient: a[2], Stress: a[3]})
		return []float64{p.StressAt(a[4])}
	case "hardening":
		curve := bench.BaileyNorton{Strain: a[1], Stress: a[2], Time: a[3], StressExponent: a[4], TimeExponent: a[5]}
		p := valid(t, bench.StrainHardeningRelaxation{Young: a[0], Stress: a[6], Curve: curve})
		return []float64{p.TimeTo(a[7]), bench.TimeHardeningRelaxation(p).StressAt(a[8])}
	case "rate":
		p := valid(t, bench.ConstantRateTension{Young: a[0], StrainRate: a[1],
			Law: bench.Norton{Rate: a[1], Stress: a[2], Exponent: a[3]}})
		return []float64{p.TimeTo(a[4])}
	case "parallel":
		p := valid(t, bench.ParallelCreep{Stress: 1, Secondary: bench.Norton{Rate: a[3], Stress: 1, Exponent: 1},
			Primary: bench.BaileyNorton{Strain: a[0], Stress: 1, Time: a[1], StressExponent: 1, TimeExponent: a[2]}})
		return []float64{p.CreepAt(a[4])}
	}
	t.Fatalf("unknown problem %q", name)
	return nil
}
