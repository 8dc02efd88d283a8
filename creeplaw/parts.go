package creeplaw

import "slices"

// Laws returns the laws that add up, in the order given.
func (s Sum) Laws() []Law { return partsOf(s.laws) }

// Laws returns the laws in sequence, in the order given.
func (s Series) Laws() []Law { return partsOf(s.laws) }

// Law returns the law whose rate is multiplied.
func (t Thermal) Law() Law { return partOf(t.law) }

// Factor returns the temperature factor.
func (t Thermal) Factor() TemperatureFactor { return t.factor }

// Law returns the law that sees the stress above the threshold.
func (t Threshold) Law() Law { return partOf(t.law) }

// ThresholdStress returns σₜ [stress].
func (t Threshold) ThresholdStress() float64 { return t.threshold }

// Temperatures returns the temperatures of the table [K].
func (t Tabulated) Temperatures() []float64 { return slices.Clone(t.table.temperatures) }

// Laws returns the law of each temperature.
func (t Tabulated) Laws() []Law { return partsOf(t.laws) }

// Options returns how the table is read between and beyond its temperatures.
func (t Tabulated) Options() TableOptions { return t.table.options }

// Options returns how the table is read between and beyond its temperatures.
func (f FactorTable) Options() TableOptions { return f.table.options }

// Law returns the law within, in its own units.
func (c Converted) Law() Law { return partOf(c.law) }

// Units returns the units of the law within and those it was taken to.
func (c Converted) Units() (own, wanted Units) {
	if c.units == nil {
		return Units{}, Units{}
	}
	return c.units.own, c.units.wanted
}

func partOf(l Logarithmic) Law {
	if a, ok := l.(logOfRate); ok {
		return a.Law
	}
	return l
}

func partsOf(ls []Logarithmic) []Law {
	laws := make([]Law, len(ls))
	for i, l := range ls {
		laws[i] = partOf(l)
	}
	return laws
}
