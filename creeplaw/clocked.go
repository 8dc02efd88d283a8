package creeplaw

import "math"

// Clocked is a creep rate that depends on a clock: time hardening. It is not a Law, on purpose: whoever wants it must ask for
// it by name. It exists to reproduce legacy analyses and published benchmarks. Under changing stress it contradicts tests
// (common practice is strain hardening), and a part left unloaded on the bench creeps differently afterwards.
//
// A Clocked is immutable, safe for concurrent use and free of allocation, like a Law.
type Clocked interface {
	// MeanLogRate returns the logarithm of the mean rate from one time to another [time since the clock was started],
	// 0 ≤ start ≤ end, at constant stress and temperature, with its exponents; for start = end the rate at that time. The
	// strain of the point does not count. "Not here" is NaN, also for times out of order.
	MeanLogRate(p Point, start, end float64) LogRate
}

// During makes a Law of a Clocked rate for one interval of time: the mean rate over it. A backward-Euler step over just that
// interval then adds, at constant stress, exactly the strain that the clocked curve grows by, also from time zero, where the
// rate itself is infinite. For any other interval it is the wrong law.
type During struct {
	Clocked    Clocked
	Start, End float64 // the interval [time since the clock was started], 0 ≤ Start ≤ End
}

var _ Logarithmic = During{}

// LogRate returns the logarithm of the mean rate.
func (d During) LogRate(p Point) LogRate {
	if d.Clocked == nil {
		return undefinedLog()
	}
	return d.Clocked.MeanLogRate(p, d.Start, d.End)
}

// Rate returns the mean rate and its derivatives; that by strain is zero.
func (d During) Rate(p Point) Rate {
	if p.Stress > 0 {
		return rateOf(p, d.LogRate(p))
	}
	r := Rate{Value: math.Exp(d.LogRate(p).Value)}
	// The slope at zero stress shows at a stress so faint that only the limiting exponent is left.
	p.Stress = 0x1p-1000
	switch l := d.LogRate(p); {
	case l.ByLogStress > 1+1e-9:
	case l.ByLogStress > 1e-9 && l.ByLogStress < 1-1e-9:
		r.ByStress = math.Inf(1)
	default:
		r.ByStress = derivative(l.Value, l.ByLogStress, p.Stress)
	}
	return r
}
