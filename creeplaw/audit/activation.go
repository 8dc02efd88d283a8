package audit

import (
	"fmt"
	"math"

	"example.com/holdtime/creeplaw"
)

// activation reads the apparent activation energy, -R ∂ln ṗ/∂(1/T) at fixed stress and strain, off the lines along temperature.
func activation(x *examination) answer {
	lines := x.scan(Temperature)
	if len(lines) == 0 {
		return skipped("the domain has one temperature only")
	}
	energies := newSpread()
	n := 0
	for _, l := range lines {
		for i := range len(l.f) - 1 {
			if math.IsNaN(l.slope(i)) {
				continue
			}
			change := math.Exp(-l.u[i]) - math.Exp(-l.u[i+1]) // of -1/T
			q := creeplaw.GasConstant * (l.f[i+1] - l.f[i]) / change
			noise := creeplaw.GasConstant * (rounding(l.f[i]) + rounding(l.f[i+1])) / change
			if math.Abs(q) <= noise {
				q = 0
			}
			n++
			energies.add(q)
			x.judgeActivation(l, i, q)
		}
	}
	x.measures.ActivationEnergy = energies.known()
	if n == 0 {
		return skipped("there is no rate along the lines")
	}
	if energies.High == 0 {
		return inOrder("no dependence on temperature, which a range of %.3g K lets pass",
			x.domain.Temperature.High-x.domain.Temperature.Low)
	}
	return inOrder("the apparent activation energy is %s kJ/mol, usual for creep (bounds: common practice)",
		between(energies.Range, 1e-3, ""))
}

func (x *examination) judgeActivation(l *line, i int, q float64) {
	p := l.point((l.u[i] + l.u[i+1]) / 2)
	width := x.domain.Temperature.High - x.domain.Temperature.Low
	bounds := x.settings.Activation
	var f Finding
	badness := 0.0
	switch {
	case q < 0:
		f = x.found(NegativeActivation, Fault, p)
		f.Sentence = fmt.Sprintf("Creep slows down on heating: the apparent activation energy is %.4g kJ/mol, most often a slip of sign.",
			q/1000)
		badness = -q
	case q == 0 && width > x.settings.WideTemperature:
		f = x.found(NoTemperature, Warning, p)
		f.Sentence = fmt.Sprintf("The rate does not depend on temperature, over a domain %.4g K wide: creep of metals changes by a "+
			"factor of two in 10 to 20 K (common practice). Narrow the domain or give the law its temperature.", width)
	case q == 0:
		return
	case q < bounds.Low:
		f = x.found(UnusualActivation, Warning, p)
		badness = bounds.Low / q
	case q > bounds.High:
		f = x.found(UnusualActivation, Warning, p)
		badness = q / bounds.High
	default:
		return
	}
	if f.Kind == UnusualActivation {
		f.Sentence = fmt.Sprintf("The apparent activation energy is %.4g kJ/mol, outside %.4g to %.4g (common practice): look for a slip "+
			"of units, calories for joules or degrees for kelvin, or for two mechanisms fitted as one.", q/1000, bounds.Low/1000,
			bounds.High/1000)
	}
	f.By = Temperature
	f.Numbers = []Number{{"apparent activation energy", q / 1000, "kJ/mol"}}
	x.note(f, badness, "")
}
