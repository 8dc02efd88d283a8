package main

import (
	"errors"
	"math"
)

// report is everything that is printed and drawn.
type report struct {
	joint       *joint
	history     *history
	settings    settings
	course      *course
	without     []*course // with none, with the first, … of the retightenings, all but the last
	uncertainty float64   // largest change of a load in the table at a tenth of the tolerance [N], one bolt
	byBolt      float64   // load of one bolt per kelvin [N/K]
	byFlange    float64
	opened      error // the joint opened
}

// newReport computes everything: the history as it is, without the later retightenings, and at a tenth of the tolerance.
func newReport(j *joint, h *history, s settings) (*report, error) {
	p := &report{joint: j, history: h, settings: s}
	var err error
	var opened *jointOpen
	if p.course, err = run(j, h, s); errors.As(err, &opened) {
		p.opened = err
	} else if err != nil {
		return nil, err
	}
	if p.opened == nil {
		for only := range h.retightenings() {
			fewer := s
			fewer.only = only
			c, err := run(j, h, fewer)
			if errors.As(err, &opened) { // its hours cannot be compared
				p.without = nil
				break
			}
			if err != nil {
				return nil, err
			}
			p.without = append(p.without, c)
		}
	}
	if p.uncertainty, err = p.compareFiner(); err != nil {
		return nil, err
	}
	p.byBolt, p.byFlange, err = newBalance(j, h.rows[0].bolt).sensitivity(&p.course.hot)
	return p, err
}

// compareFiner repeats the run at a tenth of the tolerance and returns the largest change of a load at the hours of the
// table.
func (p *report) compareFiner() (float64, error) {
	s := p.settings
	s.tolerance /= 10
	finer, err := run(p.joint, p.history, s)
	var opened *jointOpen
	if err != nil && !errors.As(err, &opened) {
		return 0, err
	}
	// Lines at which the load crosses the requirement have the same load but their own times: leave them out.
	kept := func(c *course) (list []sample) {
		for _, s := range c.samples {
			if s.stop && s.event != crossingEvents[true] && s.event != crossingEvents[false] {
				list = append(list, s)
			}
		}
		return list
	}
	a, b := kept(p.course), kept(finer)
	largest := 0.0
	for i := range min(len(a), len(b)) {
		largest = math.Max(largest, math.Abs(a[i].load-b[i].load))
	}
	return largest, nil
}
