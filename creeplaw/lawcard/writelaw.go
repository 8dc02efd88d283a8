package lawcard

import (
	"fmt"
	"math"
	"strconv"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/creeplaw/curve"
)

// writing turns laws into what stands in a card. It keeps the first fault.
type writing struct {
	kinds kinds
	err   *CardError
}

func (w *writing) fail(path string, kind Fault, format string, a ...any) members {
	if w.err == nil {
		w.err = &CardError{Path: path, Fault: kind, Reason: fmt.Sprintf(format, a...)}
	}
	return nil
}

// law writes a law that is in the units given.
func (w *writing) law(law creeplaw.Law, path string, in creeplaw.Units) members {
	switch l := law.(type) {
	case creeplaw.Sum:
		return members{{"kind", sumKind}, {"laws", w.laws(l.Laws(), path+"/laws", in)}}
	case creeplaw.Series:
		return members{{"kind", seriesKind}, {"laws", w.laws(l.Laws(), path+"/laws", in)}}
	case creeplaw.Thermal:
		return members{{"kind", thermalKind}, {"factor", w.factor(l.Factor(), path+"/factor")},
			{"law", w.law(l.Law(), path+"/law", in)}}
	case creeplaw.Threshold:
		return members{{"kind", thresholdKind}, {"parameters", w.number(path, "threshold stress", l.ThresholdStress())},
			{"law", w.law(l.Law(), path+"/law", in)}}
	case creeplaw.Tabulated:
		laws := list{}
		for i, one := range l.Laws() {
			laws = append(laws, w.law(one, path+"/rows/"+strconv.Itoa(i)+"/law", in))
		}
		return table(tabulatedKind, l.Options(), l.Temperatures(), "law", laws)
	case creeplaw.Converted:
		return w.converted(l, path, in)
	case curve.StrainHardened:
		return w.hardened(l, path, in)
	case creeplaw.Omega:
		if l.InitialRate() != nil {
			return w.omega(l, path, in)
		}
	case nil:
		return w.fail(path, Unwritable, "is missing")
	}
	return w.plain(law, path, in)
}

// omega writes the law of an initial rate; one of polynomials is made of numbers.
func (w *writing) omega(l creeplaw.Omega, path string, in creeplaw.Units) members {
	own := l.Parameters()[:1]
	return members{{"kind", omegaKind}, {"parameters", w.parameters(own, path)},
		{"initial rate", w.law(l.InitialRate(), under(path, "initial rate"), in)}}
}

func (w *writing) laws(laws []creeplaw.Law, path string, in creeplaw.Units) list {
	all := list{}
	for i, one := range laws {
		all = append(all, w.law(one, path+"/"+strconv.Itoa(i), in))
	}
	return all
}

// number is one parameter of a composed law.
func (w *writing) number(path, name string, x float64) members {
	if !finite(x) {
		return w.fail(under(path+"/parameters", name), BadNumber, "is %v, which JSON has no number for", x)
	}
	return members{{name, x}}
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// converted writes a law in other units with these; one that is tied to units of its own says so by its kind.
func (w *writing) converted(l creeplaw.Converted, path string, in creeplaw.Units) members {
	own, wanted := l.Units()
	if wanted != in {
		return w.fail(path, Unwritable, "is a law in %v where the card is in %v", wanted, in)
	}
	if bound, ok := l.Law().(creeplaw.UnitBound); ok && bound.OwnUnits() == own {
		return w.plain(l.Law(), path, own)
	}
	return members{{"kind", unitsKind},
		{"units", members{{"stress", own.Stress.String()}, {"time", own.Time.String()}}},
		{"law", w.law(l.Law(), path+"/law", own)}}
}

// plain writes a law made of numbers.
func (w *writing) plain(law creeplaw.Law, path string, in creeplaw.Units) members {
	k, ok := w.kinds.of(law)
	if !ok {
		return w.fail(path, Unwritable, "is a %T, which no kind of law describes", law)
	}
	if bound, ok := law.(creeplaw.UnitBound); ok {
		if own := bound.OwnUnits(); own != in && own != (creeplaw.Units{}) {
			return w.fail(path, Unwritable, "is a law in %v where the card is in %v (see creeplaw.InUnits)", own, in)
		}
	}
	var factors []creeplaw.TemperatureFactor
	if k.strip != nil {
		law, factors = k.strip(law)
	}
	m := members{{"kind", k.name}, {"parameters", w.parameters(law.(creeplaw.Parametric).Parameters(), path)}}
	for i, factor := range factors {
		if factor != nil {
			m = append(m, named{k.factors[i], w.factor(factor, under(path, k.factors[i]))})
		}
	}
	return m
}

func (w *writing) parameters(ps []creeplaw.Parameter, path string) members {
	var all members
	for _, p := range ps {
		all = append(all, w.number(path, p.Name, p.Value)...)
	}
	return all
}

func (w *writing) factor(factor creeplaw.TemperatureFactor, path string) members {
	if t, ok := factor.(creeplaw.FactorTable); ok {
		values := valuesOf(t.Parameters())
		temperatures, factors := values[:len(values)/2], list{}
		for _, x := range values[len(temperatures):] {
			factors = append(factors, x)
		}
		return table(tableKind, t.Options(), temperatures, "factor", factors)
	}
	for _, k := range w.kinds.factors {
		for _, s := range k.specimens {
			if alike(s, factor) {
				return members{{"kind", k.name}, {"parameters", w.parameters(factor.(creeplaw.ParametricFactor).Parameters(), path)}}
			}
		}
	}
	return w.fail(path, Unwritable, "is a %T, which no kind of temperature factor describes", factor)
}

// table writes a table over temperature.
func table(kind string, o creeplaw.TableOptions, temperatures []float64, member string, values list) members {
	rows := list{}
	for i, t := range temperatures {
		rows = append(rows, members{{"temperature", t}, {member, values[i]}})
	}
	return members{{"kind", kind}, {"interpolated in", abscissas()[o.Against]}, {"outside", beyondTable()[o.Outside]},
		{"rows", rows}}
}
