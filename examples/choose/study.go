package main

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"sync"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/audit"
)

// inventedNumbers is the origin of the steel's laws; that of a published set is its status.
const inventedNumbers = "invented"

// row is a specimen with what the audit says of it and its creep curve.
type row struct {
	specimen
	conditions
	origin string
	report audit.Report
	course course
}

// study is all rows, and the settings they were made with.
type study struct {
	options
	rows []row
}

// domainAbout is a decade of stress and eight per cent of temperature to either side: the middle of the domain is the condition
// of the creep curves.
func domainAbout(stress, temperature, horizon float64) audit.Domain {
	const share = 1.08
	return audit.Domain{
		Stress:      audit.Range{Low: stress / math.Sqrt(10), High: stress * math.Sqrt(10)},
		Strain:      audit.Range{Low: 1e-6, High: 0.05},
		Temperature: audit.Range{Low: temperature / share, High: temperature * share},
		Time:        audit.Range{Low: horizon / 1e4, High: horizon},
	}
}

func middle(r audit.Range) float64 { return math.Sqrt(r.Low * r.High) }

// horizonOf is about the time in which the steel's Norton law creeps by 2 %, a round number.
func horizonOf(stress, temperature float64) float64 {
	shift, _ := arrhenius().LogFactor(temperature)
	t := 2 * commonTime / (math.Pow(stress/commonStress, 5) * math.Exp(shift))
	power := math.Pow(10, math.Floor(math.Log10(t)))
	for _, m := range []float64{1, 2, 5} {
		if t < 1.5*m*power {
			return m * power
		}
	}
	return 10 * power
}

// newStudy audits and integrates every specimen that the options ask for.
func newStudy(o options) (*study, error) {
	s := &study{options: o}
	horizon := horizonOf(o.stress, o.kelvin())
	own := conditions{domainAbout(o.stress, o.kelvin(), horizon), o.stress, o.kelvin(), horizon}
	for _, x := range invented() {
		c := own
		c.horizon *= x.patience()
		s.rows = append(s.rows, row{specimen: x, conditions: c, origin: inventedNumbers})
	}
	sets, err := library()
	if err != nil {
		return nil, err
	}
	for _, x := range sets {
		s.rows = append(s.rows, row{specimen: x.specimen, conditions: x.conditions, origin: x.status})
	}
	order := append(slices.Clone(families), publishedFamilies...)
	slices.SortStableFunc(s.rows, func(a, b row) int {
		return slices.Index(order, a.family) - slices.Index(order, b.family)
	})
	s.rows = chosen(s.rows, o.law)
	if len(s.rows) == 0 {
		return nil, fmt.Errorf("no law has %q in its name or family", o.law)
	}
	return s, s.examine()
}

func chosen(rows []row, part string) []row {
	var list []row
	for _, r := range rows {
		if strings.Contains(strings.ToLower(r.name+" "+string(r.family)), strings.ToLower(part)) {
			list = append(list, r)
		}
	}
	return list
}

// examine does the rows side by side; each writes to its own place only.
func (s *study) examine() error {
	errs := make([]error, len(s.rows))
	var group sync.WaitGroup
	gate := make(chan struct{}, 4)
	for i := range s.rows {
		group.Go(func() {
			gate <- struct{}{}
			errs[i] = s.rows[i].examine()
			<-gate
		})
	}
	group.Wait()
	for i, err := range errs {
		if err != nil {
			return fmt.Errorf("%s: %w", s.rows[i].name, err)
		}
	}
	return nil
}

func (r *row) examine() error {
	if r.err != nil {
		return r.err
	}
	settings := audit.Settings{Name: fmt.Sprintf("%s (%s)", r.name, r.origin), Units: units}
	var err error
	if r.clocked != nil {
		r.report, err = audit.RunClocked(r.clocked, r.domain, settings)
	} else {
		r.report, err = audit.Run(r.law, r.domain, settings)
	}
	if err != nil {
		return err
	}
	if r.horizon == 0 { // a published set: until one per cent of creep strain, if the law is steady
		r.horizon = commonStrain / r.rateAt(r.stress)
	}
	r.course = hold(r.built, r.conditions)
	return nil
}

// faulty is the worst an audit can find.
const faulty = audit.Fault

// logRateAt is ln of the rate [1/h] at a stress and the row's temperature: at half a per cent of creep strain, with the variables
// of virgin material, and on the clock at half the horizon.
func (r *row) logRateAt(stress float64) float64 {
	p := creeplaw.Point{Stress: stress, Strain: commonStrain / 2, Temperature: r.temperature}
	if r.clocked != nil {
		return r.clocked.MeanLogRate(p, r.horizon/2, r.horizon/2).Value
	}
	return creeplaw.Log(r.law).LogRate(p).Value
}

func (r *row) rateAt(stress float64) float64 { return math.Exp(r.logRateAt(stress)) }
