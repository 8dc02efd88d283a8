package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// bench are two histories that differ by an unloaded wait: the stress is held, taken away for the wait or not, and held again.
type bench struct {
	at         creeplaw.Point // stress and temperature
	hold, wait float64        // [time]
}

// agreement is how closely the creep strains after the wait must agree; the two histories are computed in the same way.
const agreement = 1e-9

// unloadedWait follows two histories that differ only by an unloaded wait.
func unloadedWait(x *examination) answer {
	b := bench{at: x.domain.at(0.5, 0.5, 0.5), hold: x.domain.Time.middle(), wait: x.domain.Time.High}
	if x.domain.Time == (Range{}) {
		b.hold = x.domain.Strain.middle() / math.Exp(x.ln(b.at))
		b.wait = b.hold
	}
	switch {
	case !(b.hold > 0) || math.IsInf(b.hold, 1):
		return skipped("the law does not creep in the middle of the domain")
	case x.clock != nil:
		x.waitOnTheClock(b)
		return inOrder("the clock makes no difference")
	case x.measures.ZeroStressRate != 0:
		return skipped("the law creeps under no stress, which a wait would show once more")
	case x.undefinedUnloaded():
		return skipped("the law is undefined under no stress")
	case x.evolving != nil:
		return x.waitOfVariables(b)
	}
	without, with := x.follow(b, false), x.follow(b, true)
	x.judgeWait(b, without, with, Fault)
	return inOrder("an unloaded wait of %.3g %s changes nothing after it: history enters through the creep strain, as in strain "+
		"hardening (common practice)", b.wait, x.settings.timeUnit())
}

// judgeWait compares the creep strains of the second hold.
func (x *examination) judgeWait(b bench, without, with float64, severity Severity) {
	if math.Abs(with-without) <= agreement*math.Abs(without) {
		return
	}
	f := x.found(ClockDependence, severity, b.at)
	f.By = Time
	f.Numbers = []Number{{"creep strain of the second hold", without, ""}, {"the same after an unloaded wait", with, ""},
		{"hold", b.hold, x.settings.timeUnit()}, {"wait", b.wait, x.settings.timeUnit()}}
	f.Sentence = fmt.Sprintf("The rate depends on a clock: after a hold of %.3g %s a part left unloaded on the bench for %.3g %s creeps by "+
		"%.4g in the next hold where it would have crept by %.4g, as under time hardening; under strain hardening it would not "+
		"notice (common practice).", b.hold, x.settings.timeUnit(), b.wait, x.settings.timeUnit(), with, without)
	x.note(f, math.Abs(with-without), "")
}

// waitOnTheClock takes the strain of the second hold from the clocked rate itself, in which the strain does not count.
func (x *examination) waitOnTheClock(b bench) {
	second := func(start float64) float64 {
		x.last = inTension(b.at)
		x.evaluations++
		return b.hold * math.Exp(x.clock.MeanLogRate(b.at, start, start+b.hold).Value)
	}
	without, with := second(b.hold), second(b.hold+b.wait)
	x.judgeWait(b, without, with, Fault)
	if _, found := x.known(ClockDependence); !found {
		f := x.found(ClockDependence, Remark, b.at)
		f.By = Time
		f.Sentence = "The rate is handed a clock and makes no use of it: a law without one would serve."
		x.note(f, 0, "")
	}
}

// holdSteps are the steps of a hold, each as long as all before it together but for the first ones.
const holdSteps = 24

// follow is the creep strain that the second hold adds to a law that knows the strain only, or a clock behind its back.
func (x *examination) follow(b bench, waits bool) float64 {
	start := x.domain.Strain.Low
	p, clock := b.at, 0.0
	p.Strain = start
	x.hold(&p, &clock, b.hold)
	if waits {
		unloaded := p
		unloaded.Stress = 0
		for range holdSteps {
			clock += b.wait / holdSteps
			x.setClock(clock)
			p.Strain += b.wait / holdSteps * x.rate(unloaded).Value
		}
	}
	before := p.Strain
	x.hold(&p, &clock, b.hold)
	return p.Strain - before
}

func (x *examination) setClock(time float64) {
	if x.settings.SetClock != nil {
		x.settings.SetClock(time)
	}
}

// hold is backward Euler at constant stress. Accuracy does not matter: both histories are computed alike.
func (x *examination) hold(p *creeplaw.Point, clock *float64, length float64) {
	for i := range holdSteps {
		dt := length * math.Ldexp(1, max(i-1, 0)-(holdSteps-1))
		if i == 0 {
			dt = length * math.Ldexp(1, -(holdSteps-1))
		}
		*clock += dt
		x.setClock(*clock)
		p.Strain += x.increment(*p, dt)
	}
}

// increment solves Δp = Δt ṗ(p+Δp) by bisection in ln Δp.
func (x *examination) increment(p creeplaw.Point, dt float64) float64 {
	late := func(y float64) bool {
		q := p
		q.Strain += math.Exp(y)
		return y-x.ln(q) >= math.Log(dt)
	}
	low := math.Log(x.domain.Strain.Low) - 60
	high := math.Log(x.domain.Strain.High) + 10
	if late(low) {
		return math.Exp(low)
	}
	_, y := edge(low, high, late)
	return math.Exp(y)
}

func (x *examination) undefinedUnloaded() bool {
	_, known := x.known(UndefinedAtZeroStress)
	return known
}
