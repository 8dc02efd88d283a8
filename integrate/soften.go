package integrate

import (
	"math"

	"example.com/holdtime/creeplaw"
)

// soften finds the root connected to Δt → 0 for a law whose rate grows with creep strain. F can then rise, fall and rise again;
// only its first crossing of zero, met coming from u = 0, continues the history. It is the coupled problem without variables:
// where the softening is slight the root is the only one, otherwise the curve of solutions is followed, and where it turns back
// before the end of the step the step is beyond rupture.
func (a *relaxation) soften(x *relaxed) Code {
	c := a.coupled()
	var n node
	if code := c.solve(&n); code != 0 {
		return code
	}
	if !n.finish(&c) {
		return BeyondRupture
	}
	l := &n.rate.Creep
	*x = relaxed{
		fraction: n.fraction, kept: n.kept, strain: n.strain,
		rate: creeplaw.LogRate{Value: n.rate.LogRate, ByLogStress: l.ByLogStress, ByLogStrain: l.ByLogStrain,
			ByLogTemperature: l.ByLogTemperature},
		iterations: max(c.evaluations-1, 0),
		residual:   n.rest,
	}
	return 0
}

// coupled is the same problem in the form that can be followed.
func (a *relaxation) coupled() coupled {
	logElastic := math.Log(a.elastic)
	return coupled{plain: a.law, trial: a.trial, elastic: a.elastic, logElastic: logElastic, start: a.start,
		temperature: a.temperature, logTime: a.logTime + logElastic}
}
